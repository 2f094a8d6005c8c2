import { integer, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { clips } from './film';

/** What metres of a clip are taken from: a known length or a rectangle with known sides, one for each clip. */
export const clipScales = sqliteTable('clip_scales', {
  clipId: text()
    .primaryKey()
    .references(() => clips.id, { onDelete: 'cascade' }),
  /** As the contract describes a scale; checked when it is written and when it is read. */
  scale: text({ mode: 'json' }).notNull(),
  version: integer().notNull().default(1),
  updatedAt: text().notNull(),
  updatedBy: text(),
});
