import type { SignedInUser } from '@stillstroke/contract/auth';
import type { AnswerOf, QueryOf } from '@stillstroke/contract/endpoint';
import type { getOutboxMail, listOutbox as listCall, OutboxMail } from '@stillstroke/contract/mail';
import { users } from '@stillstroke/db/schema/club';
import { mails } from '@stillstroke/db/schema/mail';
import { and, count, desc, eq, getTableColumns, sql } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { readCursor, writeCursor } from '../platform/cursor';
import { HttpProblem, notFound } from '../platform/problem';
import { mailFile } from './file-delivery';
import { writeLetter, type MailRow } from './write-letter';

type Context = Pick<AppContext, 'db' | 'now' | 'settings'>;

const order = 'newest';
const columns = { ...getTableColumns(mails), name: users.name };
type NamedRow = MailRow & { name: string };

/** Mails to people of the admin's club, newest first. */
export function listOutbox({ db, settings }: Context, user: SignedInUser, query: QueryOf<typeof listCall>) {
  const { status, cursor, limit } = query;
  const filter = and(eq(mails.clubId, user.clubId), status && eq(mails.status, status));
  const place = cursor === undefined ? undefined : readCursor(cursor, order);
  const found = db
    .select(columns)
    .from(mails)
    .innerJoin(users, eq(users.id, mails.personId))
    .where(and(filter, place && sql`(${mails.createdAt}, ${mails.id}) < (${place.value}, ${place.id})`))
    .orderBy(desc(mails.createdAt), desc(mails.id))
    .limit(limit + 1)
    .all();
  const page = found.slice(0, limit);
  const last = found.length > limit ? page.at(-1) : undefined;
  return {
    items: page.map(answerOf),
    nextCursor: last ? writeCursor({ order, value: last.createdAt, name: '', id: last.id }) : null,
    total: db.select({ n: count() }).from(mails).where(filter).get()?.n ?? 0,
    delivery: {
      by: settings.mail.server ? ('server' as const) : ('file' as const),
      linksTo: settings.publicUrl,
    },
  };
}

/**
 * One mail. Its text is shown only where it lies in a file of the outbox, for want of a mail server: else it is between
 * us and its reader.
 */
export function outboxMail(context: Context, user: SignedInUser, id: string): AnswerOf<typeof getOutboxMail> {
  const mail = mailOfClub(context, user, id);
  const inFile = context.settings.mail.server === null && mail.status === 'sent';
  return {
    ...answerOf(mail),
    written: inFile ? { ...writeLetter(context, mail), file: mailFile(mail.id) } : null,
  };
}

/** Puts a mail that was given up back in the queue, due now and with a fresh count of attempts. */
export function retryMail(context: Context, user: SignedInUser, id: string): OutboxMail {
  const { db, now } = context;
  mailOfClub(context, user, id);
  const again = db
    .update(mails)
    .set({ status: 'waiting', attempts: 0, nextAttemptAt: now().toISOString(), finishedAt: null })
    .where(and(eq(mails.id, id), eq(mails.status, 'given-up')))
    .run();
  if (again.changes === 0) {
    throw new HttpProblem(
      409,
      'conflict',
      'This mail is not one that was given up; there is nothing to try again.',
    );
  }
  return answerOf(mailOfClub(context, user, id));
}

function mailOfClub({ db }: Context, user: SignedInUser, id: string): NamedRow {
  const mail = db
    .select(columns)
    .from(mails)
    .innerJoin(users, eq(users.id, mails.personId))
    .where(and(eq(mails.id, id), eq(mails.clubId, user.clubId)))
    .get();
  if (!mail) throw notFound('mail');
  return mail;
}

function answerOf(mail: NamedRow): OutboxMail {
  const { id, kind, name, address, status, attempts, nextAttemptAt, lastError, createdAt, finishedAt } = mail;
  return {
    id,
    kind,
    to: { name, address },
    status,
    attempts,
    nextAttemptAt: status === 'waiting' ? nextAttemptAt : null,
    reason: lastError,
    createdAt,
    finishedAt,
  };
}
