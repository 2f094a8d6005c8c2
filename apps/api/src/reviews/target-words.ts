import type { ReadingStand } from '@stillstroke/contract/review-readings';
import { targets } from '@stillstroke/db/schema/targets';
import { and, eq, inArray, isNull } from 'drizzle-orm';
import type { Reader } from './review-reach';

type Unit = ReadingStand['unit'];

/** The coach's band for a reading's measure, in words: `Vertical early (up to 40 %)`. An arm's own counts before one for both. */
export function targetWords(
  db: Reader,
  athleteId: string,
  { measure, arm, unit }: Pick<ReadingStand, 'measure' | 'arm' | 'unit'>,
): string | null {
  if (measure === null || arm === null) return null;
  const there = db
    .select()
    .from(targets)
    .where(
      and(
        eq(targets.athleteId, athleteId),
        eq(targets.measure, measure),
        inArray(targets.arm, ['both', arm]),
        isNull(targets.deletedAt),
      ),
    )
    .all();
  const target = there.find((one) => one.arm === arm) ?? there[0];
  return target ? `${target.words} (${sayBand(target, unit)})` : null;
}

function sayBand({ low, high }: { low: number | null; high: number | null }, unit: Unit): string {
  if (low === null) return high === null ? 'open' : `up to ${sayEnd(high, unit)}`;
  return high === null ? `from ${sayEnd(low, unit)}` : `${sayEnd(low, unit)} to ${sayEnd(high, unit)}`;
}

/** With a decimal only where the coach set one. */
function sayEnd(end: number, unit: Unit): string {
  const shown = Math.round((unit === 'share' ? end * 100 : end) * 10) / 10;
  const sign: Partial<Record<Unit, string>> = { share: ' %', deg: '°', perMinute: ' a minute' };
  return `${String(shown).replace('-', '−')}${sign[unit] ?? ''}`;
}
