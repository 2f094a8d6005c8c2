import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Db } from '@stillstroke/db/open';
import { athletes } from '@stillstroke/db/schema/club';
import { findingMessages, findings, reviews, stills } from '@stillstroke/db/schema/review';
import { and, eq, type SQL } from 'drizzle-orm';
import { HttpProblem, notFound } from '../platform/problem';
import { athletesInReach } from '../reach/reach';

export type Reader = Pick<Db, 'select' | 'selectDistinct'>;
export type ReviewRow = typeof reviews.$inferSelect;
export type FindingRow = typeof findings.$inferSelect;
export type StillRow = typeof stills.$inferSelect;

/** Reviews that a caller may know of: of athletes in reach, and of those the athlete sees only what was sent. */
export function reviewsInReach(db: Db, user: SignedInUser): SQL {
  const reach = athletesInReach(db, user);
  const mayWrite = user.role === 'admin' || user.role === 'coach';
  return and(reach, mayWrite ? undefined : eq(reviews.state, 'sent')) ?? reach;
}

/** The review with its athlete, or 404. */
export function reviewInReach(db: Db, user: SignedInUser, reviewId: string) {
  return one(db, user, eq(reviews.id, reviewId), 'review');
}

/** The review that a finding belongs to, or 404. */
export function findingInReach(db: Db, user: SignedInUser, findingId: string) {
  const finding = db.select().from(findings).where(eq(findings.id, findingId)).get();
  if (!finding) throw notFound('finding');
  return { ...one(db, user, eq(reviews.id, finding.reviewId), 'finding'), finding };
}

/** The still with its finding and review, or 404. */
export function stillInReach(db: Db, user: SignedInUser, stillId: string) {
  const still = db.select().from(stills).where(eq(stills.id, stillId)).get();
  if (!still) throw notFound('picture');
  return { ...findingInReach(db, user, still.findingId), still };
}

/** The question with its finding and review, or 404. */
export function questionInReach(db: Db, user: SignedInUser, questionId: string) {
  const question = db.select().from(findingMessages).where(eq(findingMessages.id, questionId)).get();
  if (!question || question.questionId !== null) throw notFound('question');
  return { ...findingInReach(db, user, question.findingId), question };
}

function one(db: Db, user: SignedInUser, which: SQL, what: string) {
  const found = db
    .select({ review: reviews, athlete: athletes })
    .from(reviews)
    .innerJoin(athletes, eq(athletes.id, reviews.athleteId))
    .where(and(which, reviewsInReach(db, user)))
    .get();
  if (!found) throw notFound(what);
  return found;
}

/** @throws HttpProblem review-sent when the review can no longer be changed */
export function refuseSent({ state, sentAt }: Pick<ReviewRow, 'state' | 'sentAt'>): void {
  if (state === 'draft') return;
  throw new HttpProblem(
    409,
    'review-sent',
    `This review was sent on ${sentAt?.slice(0, 10) ?? 'an earlier day'}; what was sent stays as it is. Write a new one to say more.`,
  );
}
