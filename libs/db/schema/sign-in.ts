import { index, integer, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { users } from './club';

/** Signed-in browsers: what express-session keeps. The key is the SHA-256 of the cookie's id, so a copied database signs nobody in. */
export const signIns = sqliteTable(
  'sign_ins',
  {
    idHash: text().primaryKey(),
    userId: text().references(() => users.id, { onDelete: 'cascade' }),
    data: text().notNull(),
    /** Milliseconds since 1970. */
    expiresAt: integer().notNull(),
  },
  (table) => [index('sign_ins_expires').on(table.expiresAt), index('sign_ins_user').on(table.userId)],
);

/** Links that let a person set their own password, each usable once. Only the SHA-256 of the token is kept. */
export const invitations = sqliteTable(
  'invitations',
  {
    id: text().primaryKey(),
    userId: text()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    tokenHash: text().notNull(),
    expiresAt: text().notNull(),
    usedAt: text(),
    createdAt: text().notNull(),
  },
  (table) => [
    uniqueIndex('invitations_token').on(table.tokenHash),
    index('invitations_user').on(table.userId),
  ],
);
