import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Db } from '@stillstroke/db/open';
import { users } from '@stillstroke/db/schema/club';
import { and, eq, isNull } from 'drizzle-orm';
import { queueMail } from '../mail/queue-mail';

interface Told {
  /** In whose name. */
  readonly by: SignedInUser;
  readonly reviewId: string;
  readonly now: Date;
}

/** Tells the athlete, where they have an account, that a review is ready. */
export function mailReviewSent(tx: Db, { by, reviewId, now }: Told, athleteId: string): void {
  const readers = tx
    .select({ id: users.id })
    .from(users)
    .where(and(eq(users.athleteId, athleteId), eq(users.role, 'athlete'), isNull(users.deactivatedAt)))
    .all();
  for (const { id } of readers)
    queueMail(tx, { kind: 'review-sent', to: id, data: dataOf(by, reviewId), now });
}

/** Tells whoever sent the review that there is a question, or whoever asked that there is an answer. */
export function mailSaid(
  tx: Db,
  kind: 'question' | 'answer',
  { by, reviewId, now }: Told,
  to: string | null,
): void {
  if (to === null || to === by.id) return;
  const there = and(eq(users.id, to), isNull(users.deactivatedAt));
  if (!tx.select({ id: users.id }).from(users).where(there).get()) return;
  queueMail(tx, { kind, to, data: dataOf(by, reviewId), now });
}

const dataOf = (by: SignedInUser, reviewId: string) => ({ page: `/reviews/${reviewId}`, from: by.name });
