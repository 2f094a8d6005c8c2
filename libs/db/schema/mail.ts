import { index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { clubs, users } from './club';

/** What can be written to people; the words of each are with the server's templates. */
export const mailKinds = [
  'invitation',
  'review-sent',
  'question',
  'answer',
  'promise-reminder',
  'password-reset',
] as const;

/**
 * Mails to go out and those that went. A row holds what a mail is about, never its text: it is written when it is sent,
 * so that no link that opens an account lies in the database, and wishes and links are those of that moment.
 * Instants are ISO 8601 UTC text.
 */
export const mails = sqliteTable(
  'mails',
  {
    id: text().primaryKey(),
    clubId: text()
      .notNull()
      .references(() => clubs.id, { onDelete: 'cascade' }),
    personId: text()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    /** Where it goes: the person's address when it was queued. */
    address: text().notNull(),
    kind: text({ enum: mailKinds }).notNull(),
    data: text({ mode: 'json' }).$type<Record<string, unknown>>().notNull(),
    /** The thing it is about, so that waiting mails about it can be called off. */
    about: text(),
    /** Set at the first attempt and the same ever after, so that a second copy can be recognised as one. */
    messageId: text(),
    status: text({ enum: ['waiting', 'sending', 'sent', 'given-up', 'withheld'] }).notNull(),
    attempts: integer().notNull().default(0),
    /** While waiting: when it is due. While being sent: when whoever took it must be done, or it is due again. */
    nextAttemptAt: text().notNull(),
    /** Who has taken it: only they may say how it went. */
    takenBy: text(),
    /** Why the last attempt failed, or why it is withheld; in words of ours. */
    lastError: text(),
    createdAt: text().notNull(),
    finishedAt: text(),
  },
  (table) => [
    uniqueIndex('mails_message_id').on(table.messageId),
    index('mails_due').on(table.status, table.nextAttemptAt),
    index('mails_club').on(table.clubId, table.createdAt),
    index('mails_person').on(table.personId),
    index('mails_about').on(table.about),
  ],
);

/** Kinds of mail that a person has switched off; what is not here is on. */
export const mailsSwitchedOff = sqliteTable(
  'mails_switched_off',
  {
    personId: text()
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    kind: text({ enum: mailKinds }).notNull(),
    since: text().notNull(),
  },
  (table) => [primaryKey({ columns: [table.personId, table.kind] })],
);

/**
 * Addresses for which somebody asked for a new password; kept only until the sender has looked whether there is an
 * account, so that the answer takes as long for one as for none.
 */
export const passwordWishes = sqliteTable('password_wishes', {
  id: text().primaryKey(),
  email: text().notNull(),
  createdAt: text().notNull(),
});

/** Links that set a new password, each usable once and not for long. Only the SHA-256 of the token is kept. */
export const passwordResets = sqliteTable(
  'password_resets',
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
    uniqueIndex('password_resets_token').on(table.tokenHash),
    index('password_resets_user').on(table.userId),
  ],
);
