import type { Stroke } from '@stillstroke/contract/strokes';
import type { strokes } from '@stillstroke/db/schema/film';

/** A stroke's row as the contract describes it. */
export function strokeAnswer(row: typeof strokes.$inferSelect): Stroke {
  return {
    id: row.id,
    clipId: row.clipId,
    arm: row.arm,
    entry: row.entryFrame,
    catch: row.catchFrame,
    exit: row.exitFrame,
    nextEntry: row.nextEntryFrame,
    breath: row.breath,
    version: row.version,
  };
}

/** What of a stroke can be changed, as its row keeps it. */
export function strokeColumns(fields: Pick<Stroke, 'entry' | 'catch' | 'exit' | 'nextEntry' | 'breath'>) {
  return {
    entryFrame: fields.entry,
    catchFrame: fields.catch,
    exitFrame: fields.exit,
    nextEntryFrame: fields.nextEntry,
    breath: fields.breath,
  };
}
