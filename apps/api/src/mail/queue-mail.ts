import { randomUUID } from 'node:crypto';
import type { MailKind } from '@stillstroke/contract/mail';
import type { Db } from '@stillstroke/db/open';
import { users } from '@stillstroke/db/schema/club';
import { mails } from '@stillstroke/db/schema/mail';
import { and, eq } from 'drizzle-orm';
import { mailDataSchemas, type MailData } from './mail-data';

export interface NewMail<K extends MailKind> {
  readonly kind: K;
  /** Id of the person it goes to. */
  readonly to: string;
  readonly data: MailData<K>;
  readonly now: Date;
  /** Not before then; at once where nothing is said. */
  readonly due?: Date;
  /** Id of the thing it is about, for {@link callOffMails}. */
  readonly about?: string;
}

/**
 * Queues a mail. Call it inside the transaction of the change it tells of: either both are there or neither. Whether
 * the person wants mails of this kind is asked when it is sent, not here.
 *
 * @returns the mail's id
 * @throws when there is no such person or the data is not what the kind needs: faults of the caller
 */
export function queueMail<K extends MailKind>(tx: Db, mail: NewMail<K>): string {
  const { kind, to, now, due, about } = mail;
  const data = mailDataSchemas[kind].parse(mail.data);
  const person = tx
    .select({ clubId: users.clubId, address: users.email })
    .from(users)
    .where(eq(users.id, to))
    .get();
  if (!person) throw new Error(`no person to send a mail of kind ${kind} to`);
  const id = randomUUID();
  tx.insert(mails)
    .values({
      id,
      ...person,
      personId: to,
      kind,
      data,
      about: about ?? null,
      status: 'waiting',
      nextAttemptAt: (due ?? now).toISOString(),
      createdAt: now.toISOString(),
    })
    .run();
  return id;
}

/** Calls off what still waits about a thing: a reminder whose promise has been kept, or moved to another date. */
export function callOffMails(tx: Db, what: { kind: MailKind; about: string; now: Date }): void {
  tx.update(mails)
    .set({
      status: 'withheld',
      lastError: 'It was no longer needed when its time came.',
      finishedAt: what.now.toISOString(),
    })
    .where(and(eq(mails.kind, what.kind), eq(mails.about, what.about), eq(mails.status, 'waiting')))
    .run();
}
