import { integer, primaryKey, real, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { strokes } from './film';

/**
 * What of the camera's view each measure of a stroke has to be read with, kept beside the stroke's figures so that Compare
 * and Trend need not look at every mark again. Written in the same transaction as the figures.
 */
export const strokeCautions = sqliteTable(
  'stroke_cautions',
  {
    strokeId: text()
      .notNull()
      .references(() => strokes.id, { onDelete: 'cascade' }),
    code: text({ enum: ['foreshortened', 'far-arm', 'flat-port'] }).notNull(),
    measure: text({ enum: ['verticalAt', 'peakDrop', 'elbowAtMidPull'] }).notNull(),
    /** By how much the angle behind the measure may be off, degrees. */
    sizeDeg: real().notNull(),
    /** The size rests on something that nobody has said of the clip. */
    assumed: integer({ mode: 'boolean' }).notNull(),
  },
  (table) => [primaryKey({ columns: [table.strokeId, table.code, table.measure] })],
);
