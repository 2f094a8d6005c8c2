import { sql } from 'drizzle-orm';
import { index, integer, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { athletes, users } from './club';

/** Bands that coaches set for a measure of an athlete; at most one at a time for a measure and arm. */
export const targets = sqliteTable(
  'targets',
  {
    id: text().primaryKey(),
    athleteId: text()
      .notNull()
      .references(() => athletes.id, { onDelete: 'cascade' }),
    /** A measure of the contract; which ones there are is checked on the way in and grows with it. */
    measure: text().notNull(),
    arm: text({ enum: ['both', 'left', 'right'] }).notNull(),
    /** Ends in the unit of the measure (shares 0–1, degrees, a minute); null = open on that side, never both. */
    low: real(),
    high: real(),
    /** What the coach means by it, as typed. */
    words: text().notNull(),
    setBy: text().references(() => users.id, { onDelete: 'set null' }),
    setAt: text().notNull(),
    version: integer().notNull().default(1),
    /** Set while a deletion can still be undone; purged afterwards. */
    deletedAt: text(),
  },
  (table) => [
    uniqueIndex('targets_one_each')
      .on(table.athleteId, table.measure, table.arm)
      .where(sql`${table.deletedAt} is null`),
    index('targets_deleted')
      .on(table.deletedAt)
      .where(sql`${table.deletedAt} is not null`),
  ],
);
