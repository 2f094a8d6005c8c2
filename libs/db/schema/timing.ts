import { index, integer, real, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { clips, strokes } from './film';

/** What is known of a clip's way through the water, and what both arms do together. */

/** How far the swimmer travelled between two frames of a clip. */
export const clipDistances = sqliteTable('clip_distances', {
  clipId: text()
    .primaryKey()
    .references(() => clips.id, { onDelete: 'cascade' }),
  metres: real().notNull(),
  /** Standard uncertainty of the metres. */
  uncertaintyM: real().notNull(),
  fromFrame: integer().notNull(),
  toFrame: integer().notNull(),
  updatedAt: text().notNull(),
  updatedBy: text(),
});

/**
 * Index of coordination of each passage arm – other arm – arm, kept like stroke figures and written anew for the whole
 * clip with any change of a stroke, since all passages share the clip's mean cycle.
 */
export const coordinationFigures = sqliteTable(
  'coordination_figures',
  {
    /** The stroke that the passage begins with. */
    strokeId: text()
      .primaryKey()
      .references(() => strokes.id, { onDelete: 'cascade' }),
    clipId: text()
      .notNull()
      .references(() => clips.id, { onDelete: 'cascade' }),
    /** Share of the mean cycle; − gap, + overlap. */
    value: real().notNull(),
    /** Standard uncertainty of it. */
    uncertainty: real().notNull(),
    /** A breath on one of the two strokes whose pull ends in it. */
    breath: integer({ mode: 'boolean' }).notNull(),
    /** Where to look at it: the exit that it begins with. */
    frame: integer().notNull(),
  },
  (table) => [index('coordination_figures_clip').on(table.clipId)],
);
