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
    entrySource: row.entrySource,
    catchSource: row.catchSource,
    exitSource: row.exitSource,
    nextEntrySource: row.nextEntrySource,
    version: row.version,
  };
}

/** What of a stroke can be changed, as its row keeps it. */
export function strokeColumns(fields: Omit<Stroke, 'id' | 'clipId' | 'arm' | 'version'>) {
  return {
    entryFrame: fields.entry,
    catchFrame: fields.catch,
    exitFrame: fields.exit,
    nextEntryFrame: fields.nextEntry,
    breath: fields.breath,
    entrySource: fields.entrySource,
    catchSource: fields.catchSource,
    exitSource: fields.exitSource,
    nextEntrySource: fields.nextEntrySource,
  };
}
