import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Agreements, MeasureAgreement } from '@stillstroke/contract/repeatability';
import { users } from '@stillstroke/db/schema/club';
import { markingRounds, roundMarks } from '@stillstroke/db/schema/repeatability';
import { agreement } from '@stillstroke/geometry/statistics/agreement';
import {
  type AngleName,
  anglesTwice,
  type ReadTwice,
} from '@stillstroke/geometry/uncertainty/own-uncertainty';
import { and, eq, inArray, isNotNull, ne } from 'drizzle-orm';
import { grouped } from '../measures/grouped';
import type { AppContext } from '../platform/context';
import { liveClip } from '../sessions/live-film';
import { markedTwice, placedTwice, type TwiceRow } from './round-rows';

type Pair = Agreements['items'][number];

/** Every pair of coaches of whom one has marked again what the other had marked on this clip. */
export function getAgreement(
  { db }: Pick<AppContext, 'db'>,
  user: SignedInUser,
  clipId: string,
): Agreements['items'] {
  const { clip } = liveClip(db, user, clipId);
  const rows = newestOfEach(
    markedTwice(
      db,
      and(
        eq(markingRounds.clipId, clip.id),
        isNotNull(roundMarks.firstBy),
        ne(roundMarks.firstBy, markingRounds.userId),
      ),
    ),
  );
  const ids = [...new Set(rows.flatMap(({ row, againBy }) => [row.firstBy ?? '', againBy]))];
  const names = new Map(
    db
      .select({ id: users.id, name: users.name })
      .from(users)
      .where(inArray(users.id, ids))
      .all()
      .map(({ id, name }) => [id, name]),
  );
  const coach = (id: string) => ({ id, name: names.get(id) ?? 'Someone' });
  return [...grouped(rows, ({ row, againBy }) => `${row.firstBy ?? ''} ${againBy}`).values()].flatMap(
    (of) => {
      const [one] = of;
      if (!one?.row.firstBy) return [];
      return [{ first: coach(one.row.firstBy), second: coach(one.againBy), ...agreementOf(of) }];
    },
  );
}

/** A frame that someone marked again in two rounds counts once, as it was last: two of one frame are not independent. */
function newestOfEach(rows: readonly TwiceRow[]): TwiceRow[] {
  const key = ({ row, againBy }: TwiceRow) => `${againBy} ${row.arm} ${row.frame}`;
  return [...new Map(rows.map((row) => [key(row), row])).values()];
}

function agreementOf(rows: readonly TwiceRow[]): Pick<Pair, 'frames' | 'measures'> {
  const read = rows.flatMap((twice) => {
    const placed = placedTwice(twice);
    const angles = placed && anglesTwice(placed);
    return angles ? [{ arm: twice.row.arm, frame: twice.row.frame, angles }] : [];
  });
  const of = (name: AngleName): MeasureAgreement | null => {
    const pairs = read.map(({ angles }): ReadTwice => angles[name]);
    const found = agreement(
      pairs.map(({ first }) => first),
      pairs.map(({ second }) => second),
    );
    if (!found.ok) return null;
    const { count: _, ...figures } = found.value;
    const points = read.map(({ arm, frame, angles }) => {
      const { first, second } = angles[name];
      return { arm, frame, mean: (first + second) / 2, difference: first - second };
    });
    return { ...figures, points };
  };
  const [forearmDeg, upperArmDeg] = [of('forearmDeg'), of('upperArmDeg')];
  const [elbowDeg, elbowDropDeg] = [of('elbowDeg'), of('elbowDropDeg')];
  const measures =
    forearmDeg && upperArmDeg && elbowDeg && elbowDropDeg
      ? { forearmDeg, upperArmDeg, elbowDeg, elbowDropDeg }
      : null;
  return { frames: read.length, measures };
}
