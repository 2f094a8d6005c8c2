import { index, integer, primaryKey, real, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { users } from './club';
import { clips } from './film';

/** How closely a coach places the same joints twice, and what that was found from. */

/** Some marked frames of a clip, marked again by one coach without seeing the marks from before. */
export const markingRounds = sqliteTable(
  'marking_rounds',
  {
    id: text().primaryKey(),
    userId: text()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    clipId: text()
      .notNull()
      .references(() => clips.id, { onDelete: 'cascade' }),
    createdAt: text().notNull(),
    finishedAt: text(),
  },
  (table) => [index('marking_rounds_user').on(table.userId), index('marking_rounds_clip').on(table.clipId)],
);

/**
 * The frames of a round in the order shown. The first mark is kept as it was when the round began, with who had placed
 * it: it may be moved afterwards, and then it would no longer be a reading made without the second.
 */
export const roundMarks = sqliteTable(
  'round_marks',
  {
    roundId: text()
      .notNull()
      .references(() => markingRounds.id, { onDelete: 'cascade' }),
    position: integer().notNull(),
    arm: text({ enum: ['left', 'right'] }).notNull(),
    frame: integer().notNull(),
    /** Null when their account is gone. */
    firstBy: text().references(() => users.id, { onDelete: 'set null' }),
    firstShoulderX: real().notNull(),
    firstShoulderY: real().notNull(),
    firstElbowX: real().notNull(),
    firstElbowY: real().notNull(),
    firstWristX: real().notNull(),
    firstWristY: real().notNull(),
    /** Null until marked again, all six together. */
    shoulderX: real(),
    shoulderY: real(),
    elbowX: real(),
    elbowY: real(),
    wristX: real(),
    wristY: real(),
  },
  (table) => [primaryKey({ columns: [table.roundId, table.position] })],
);

/** A coach's own spread, of the finished rounds: what stands in the uncertainties of clips that they marked. */
export const markingFigures = sqliteTable('marking_figures', {
  userId: text()
    .primaryKey()
    .references(() => users.id, { onDelete: 'cascade' }),
  /** Standard deviation of one placing, per coordinate, in pixels of a picture whose shorter side is 1080. */
  shoulderAt1080: real().notNull(),
  elbowAt1080: real().notNull(),
  wristAt1080: real().notNull(),
  frames: integer().notNull(),
  measuredAt: text().notNull(),
});
