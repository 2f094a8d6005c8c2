import { sql } from 'drizzle-orm';
import { index, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';

/** Clubs, the people with accounts in them, squads and athletes. Instants are ISO 8601 UTC text. */

export const clubs = sqliteTable('clubs', {
  id: text().primaryKey(),
  name: text().notNull(),
  createdAt: text().notNull(),
});

export const squads = sqliteTable(
  'squads',
  {
    id: text().primaryKey(),
    clubId: text()
      .notNull()
      .references(() => clubs.id, { onDelete: 'cascade' }),
    name: text().notNull(),
    deactivatedAt: text(),
    createdAt: text().notNull(),
  },
  (table) => [uniqueIndex('squads_club_name').on(table.clubId, sql`lower(${table.name})`)],
);

export const athletes = sqliteTable(
  'athletes',
  {
    id: text().primaryKey(),
    clubId: text()
      .notNull()
      .references(() => clubs.id, { onDelete: 'cascade' }),
    squadId: text()
      .notNull()
      .references(() => squads.id),
    name: text().notNull(),
    deactivatedAt: text(),
    createdAt: text().notNull(),
  },
  (table) => [index('athletes_squad').on(table.squadId), index('athletes_club').on(table.clubId)],
);

export const users = sqliteTable(
  'users',
  {
    id: text().primaryKey(),
    clubId: text()
      .notNull()
      .references(() => clubs.id, { onDelete: 'cascade' }),
    name: text().notNull(),
    /** Lower case. */
    email: text().notNull(),
    role: text({ enum: ['admin', 'coach', 'athlete', 'guardian'] }).notNull(),
    /** argon2id; null until the invitation is accepted. */
    passwordHash: text(),
    /** The athlete that this account is (role athlete). */
    athleteId: text().references(() => athletes.id, { onDelete: 'set null' }),
    deactivatedAt: text(),
    createdAt: text().notNull(),
  },
  (table) => [uniqueIndex('users_email').on(table.email), index('users_club').on(table.clubId)],
);

export const squadCoaches = sqliteTable(
  'squad_coaches',
  {
    squadId: text()
      .notNull()
      .references(() => squads.id, { onDelete: 'cascade' }),
    userId: text()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
  },
  (table) => [
    primaryKey({ columns: [table.squadId, table.userId] }),
    index('squad_coaches_user').on(table.userId),
  ],
);
