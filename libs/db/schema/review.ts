import { sql } from 'drizzle-orm';
import { index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { athletes, clubs, users } from './club';
import { sessions } from './film';

/** Reviews: what a coach found, in the order in which it is told, with pictures, and what was asked about it. */

export const reviews = sqliteTable(
  'reviews',
  {
    id: text().primaryKey(),
    athleteId: text()
      .notNull()
      .references(() => athletes.id, { onDelete: 'cascade' }),
    /** A review outlives its session: what was sent stays. */
    sessionId: text().references(() => sessions.id, { onDelete: 'set null' }),
    requestId: text(),
    authorId: text().references(() => users.id, { onDelete: 'set null' }),
    state: text({ enum: ['draft', 'sent'] })
      .notNull()
      .default('draft'),
    createdAt: text().notNull(),
    updatedAt: text().notNull(),
    sentAt: text(),
    readAt: text(),
    version: integer().notNull().default(1),
  },
  (table) => [
    index('reviews_athlete').on(table.athleteId, table.createdAt),
    index('reviews_session').on(table.sessionId),
  ],
);

/** What a club looks for that is not an angle. */
export const observations = sqliteTable(
  'observations',
  {
    id: text().primaryKey(),
    clubId: text()
      .notNull()
      .references(() => clubs.id, { onDelete: 'cascade' }),
    name: text().notNull(),
    retired: integer({ mode: 'boolean' }).notNull().default(false),
    createdAt: text().notNull(),
    version: integer().notNull().default(1),
  },
  (table) => [uniqueIndex('observations_club_name').on(table.clubId, sql`lower(${table.name})`)],
);

export const findings = sqliteTable(
  'findings',
  {
    id: text().primaryKey(),
    reviewId: text()
      .notNull()
      .references(() => reviews.id, { onDelete: 'cascade' }),
    /** Ascending in the order of telling; gaps mean nothing. */
    position: integer().notNull(),
    kind: text({ enum: ['good', 'to-work-on'] }).notNull(),
    words: text().notNull(),
    arm: text({ enum: ['left', 'right', 'both', 'none'] }).notNull(),
    phase: text({ enum: ['entry-and-catch', 'pull', 'push', 'recovery', 'whole'] }).notNull(),
    observationId: text().references(() => observations.id, { onDelete: 'set null' }),
    /** Its name when the review was sent. */
    observationName: text(),
    mainFocus: integer({ mode: 'boolean' }).notNull().default(false),
    drillId: text(),
    version: integer().notNull().default(1),
    updatedAt: text().notNull(),
    updatedBy: text().references(() => users.id, { onDelete: 'set null' }),
  },
  (table) => [
    index('findings_review').on(table.reviewId, table.position),
    uniqueIndex('findings_main_focus')
      .on(table.reviewId)
      .where(sql`${table.mainFocus} = 1`),
  ],
);

/** What a finding rests on. Films may go; what was frozen at sending stays. */
export const findingReadings = sqliteTable(
  'finding_readings',
  {
    id: text().primaryKey(),
    findingId: text()
      .notNull()
      .references(() => findings.id, { onDelete: 'cascade' }),
    position: integer().notNull(),
    /** JSON: `ReadingSource` of the contract. */
    source: text().notNull(),
    /** JSON: `ReadingStand` of the contract as it was at sending; null in a draft. */
    frozen: text(),
  },
  (table) => [index('finding_readings_finding').on(table.findingId, table.position)],
);

/** Pictures in reviews. The file lies in the data folder under `fileId`; a new picture gets a new one. */
export const stills = sqliteTable(
  'stills',
  {
    id: text().primaryKey(),
    findingId: text()
      .notNull()
      .references(() => findings.id, { onDelete: 'cascade' }),
    position: integer().notNull(),
    /** Null once the picture was taken out of a sent review. */
    fileId: text(),
    layout: text({ enum: ['single', 'left-right', 'then-now', 'breathing-other'] }).notNull(),
    /** JSON: `StillPart[]` of the contract. */
    parts: text().notNull(),
    overlays: integer({ mode: 'boolean' }).notNull(),
    /** JSON: `Drawing[]` of the contract. */
    drawings: text().notNull(),
    words: text().notNull(),
    width: integer().notNull(),
    height: integer().notNull(),
    removedAt: text(),
    version: integer().notNull().default(1),
  },
  (table) => [index('stills_finding').on(table.findingId, table.position)],
);

/** What the athlete asks about a finding, and what is answered (`questionId` says to what). */
export const findingMessages = sqliteTable(
  'finding_messages',
  {
    id: text().primaryKey(),
    findingId: text()
      .notNull()
      .references(() => findings.id, { onDelete: 'cascade' }),
    questionId: text(),
    words: text().notNull(),
    authorId: text().references(() => users.id, { onDelete: 'set null' }),
    createdAt: text().notNull(),
    /** When the athlete opened an answer. */
    readAt: text(),
  },
  (table) => [index('finding_messages_finding').on(table.findingId, table.createdAt)],
);

/** Texts that a coach uses often. */
export const snippets = sqliteTable(
  'snippets',
  {
    id: text().primaryKey(),
    userId: text()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    words: text().notNull(),
    createdAt: text().notNull(),
    version: integer().notNull().default(1),
  },
  (table) => [index('snippets_user').on(table.userId, table.createdAt)],
);
