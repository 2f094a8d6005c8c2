import { mails, passwordResets } from '@stillstroke/db/schema/mail';
import { inArray, and, lte, notInArray } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { dropMailFile } from './file-delivery';

const dayMs = 24 * 60 * 60_000;
/** Who was written to and when is kept this long, then forgotten. */
const keptMs = 60 * dayMs;
const atOnce = 100;

/** Deletes mails that were settled long ago, rows first, then their files; and links that ran out. */
export async function forgetOldMails({ db, now, settings }: Pick<AppContext, 'db' | 'now' | 'settings'>) {
  const before = new Date(now().getTime() - keptMs).toISOString();
  const old = and(lte(mails.createdAt, before), notInArray(mails.status, ['waiting', 'sending']));
  const ids = db
    .select({ id: mails.id })
    .from(mails)
    .where(old)
    .limit(atOnce)
    .all()
    .map(({ id }) => id);
  if (ids.length === 0) return;
  db.delete(mails).where(inArray(mails.id, ids)).run();
  db.delete(passwordResets).where(lte(passwordResets.expiresAt, before)).run();
  for (const id of ids) await dropMailFile(settings, id);
}
