import { randomUUID } from 'node:crypto';
import { mails } from '@stillstroke/db/schema/mail';
import { and, asc, eq, inArray, lte } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { backOffMs, mostAttempts } from './back-off';
import type { Outcome } from './delivery';
import type { MailRow } from './write-letter';

type Context = Pick<AppContext, 'db' | 'now' | 'settings'>;

/** Whoever takes a mail has this long to send it; after that it is due again. */
export const leaseMs = 5 * 60_000;

/** A mail that only its taker may settle. */
export interface TakenMail {
  readonly mail: MailRow;
  readonly messageId: string;
  readonly takenBy: string;
}

/** Takes the mail that has been due longest, also one that somebody took and never settled. Null: nothing is due. */
export function takeMail({ db, now, settings }: Context): TakenMail | null {
  const due = and(
    inArray(mails.status, ['waiting', 'sending']),
    lte(mails.nextAttemptAt, now().toISOString()),
  );
  // Looked for first without a lock, since mostly there is nothing.
  if (!db.select({ id: mails.id }).from(mails).where(due).limit(1).get()) return null;
  return db.transaction(
    (tx) => {
      const mail = tx.select().from(mails).where(due).orderBy(asc(mails.nextAttemptAt)).limit(1).get();
      if (!mail) return null;
      const takenBy = randomUUID();
      const messageId = mail.messageId ?? `<${mail.id}@${new URL(settings.publicUrl).hostname}>`;
      tx.update(mails)
        .set({
          status: 'sending',
          takenBy,
          messageId,
          attempts: mail.attempts + 1,
          nextAttemptAt: new Date(now().getTime() + leaseMs).toISOString(),
        })
        .where(eq(mails.id, mail.id))
        .run();
      return { mail: { ...mail, attempts: mail.attempts + 1 }, messageId, takenBy };
    },
    { behavior: 'immediate' },
  );
}

/** Writes down how it went, unless somebody else has taken the mail since. */
export function settleMail(
  { db, now }: Context,
  { mail, takenBy }: TakenMail,
  outcome: Outcome | { readonly how: 'withheld'; readonly reason: string },
): void {
  const at = now();
  db.update(mails)
    .set({ takenBy: null, ...settled(mail, outcome, at) })
    .where(and(eq(mails.id, mail.id), eq(mails.takenBy, takenBy)))
    .run();
}

function settled(
  mail: MailRow,
  outcome: Outcome | { readonly how: 'withheld'; readonly reason: string },
  at: Date,
): Partial<MailRow> {
  const finishedAt = at.toISOString();
  switch (outcome.how) {
    case 'sent':
      return { status: 'sent', lastError: null, finishedAt };
    case 'withheld':
      return { status: 'withheld', lastError: outcome.reason, finishedAt };
    case 'refused':
      return { status: 'given-up', lastError: outcome.reason, finishedAt };
    case 'later':
      if (mail.attempts >= mostAttempts) {
        const lastError = `${outcome.reason} Tried ${mail.attempts} times.`;
        return { status: 'given-up', lastError, finishedAt };
      }
      return {
        status: 'waiting',
        lastError: outcome.reason,
        nextAttemptAt: new Date(at.getTime() + backOffMs(mail.attempts, Math.random())).toISOString(),
      };
  }
}
