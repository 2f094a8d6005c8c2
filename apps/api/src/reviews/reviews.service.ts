import { randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf, QueryOf } from '@stillstroke/contract/endpoint';
import type {
  createReview as createCall,
  listReviews as listCall,
  Review,
  ReviewList,
  updateReview as updateCall,
} from '@stillstroke/contract/reviews';
import { findings, reviews, stills } from '@stillstroke/db/schema/review';
import { and, asc, count, desc, eq, sql } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { badField, changedMeanwhile, HttpProblem, notFound } from '../platform/problem';
import { athleteInReach } from '../reach/reach';
import { liveSession } from '../sessions/live-film';
import { dropPictures } from '../stills/still-store';
import { reviewAnswer } from './review-answer';
import { readReviewCursor, reviewCursor } from './review-cursor';
import { refuseSent, reviewInReach, type Reader, type ReviewRow } from './review-reach';
import { reviewSummaries, unreadOf } from './review-summary';

type Context = Pick<AppContext, 'db' | 'now' | 'settings'>;

/** Reviews of an athlete, newest first; for the athlete those that were sent. */
export function listReviews(
  { db }: Context,
  user: SignedInUser,
  athleteId: string,
  { sessionId, cursor, limit }: QueryOf<typeof listCall>,
): ReviewList {
  const athlete = athleteInReach(db, user, athleteId);
  const seen = and(
    eq(reviews.athleteId, athlete.id),
    user.role === 'athlete' ? eq(reviews.state, 'sent') : undefined,
  );
  const filter = and(seen, sessionId === undefined ? undefined : eq(reviews.sessionId, sessionId));
  const after = cursor === undefined ? undefined : readReviewCursor(cursor);
  const rows = db
    .select()
    .from(reviews)
    .where(and(filter, after && sql`(${reviews.createdAt}, ${reviews.id}) < (${after[0]}, ${after[1]})`))
    .orderBy(desc(reviews.createdAt), desc(reviews.id))
    .limit(limit + 1)
    .all();
  const page = rows.slice(0, limit);
  const last = rows.length > limit ? page.at(-1) : undefined;
  return {
    items: reviewSummaries(db, page),
    nextCursor: last ? reviewCursor([last.createdAt, last.id]) : null,
    total: db.select({ n: count() }).from(reviews).where(filter).get()?.n ?? 0,
    unread: unreadOf(db, athlete.id),
  };
}

export function getReview({ db }: Context, user: SignedInUser, reviewId: string): Review {
  return reviewAnswer(db, reviewInReach(db, user, reviewId).review.id);
}

/** Begins a review of a session. Sent twice under the same id it is one review. */
export function createReview(
  { db, now }: Context,
  user: SignedInUser,
  athleteId: string,
  { id = randomUUID(), sessionId }: BodyOf<typeof createCall>,
): Review {
  const athlete = athleteInReach(db, user, athleteId);
  const session = sessionOf(db, user, sessionId);
  if (session?.athleteId !== athlete.id)
    throw badField('sessionId', 'There is no such session of this athlete.');
  return db.transaction(
    (tx) => {
      const there = tx.select().from(reviews).where(eq(reviews.id, id)).get();
      if (there) {
        if (there.athleteId === athlete.id && there.sessionId === sessionId) return reviewAnswer(tx, id);
        throw new HttpProblem(409, 'conflict', 'This id is taken; choose another.');
      }
      const at = now().toISOString();
      tx.insert(reviews)
        .values({ id, athleteId: athlete.id, sessionId, authorId: user.id, createdAt: at, updatedAt: at })
        .run();
      return reviewAnswer(tx, id);
    },
    { behavior: 'immediate' },
  );
}

/** What cannot be seen and what is not there are refused alike. */
function sessionOf(db: AppContext['db'], user: SignedInUser, sessionId: string) {
  try {
    return liveSession(db, user, sessionId).session;
  } catch (error) {
    if (error instanceof HttpProblem && error.status === 404) return null;
    throw error;
  }
}

/** Puts the findings of a draft in another order, or chooses the main focus. */
export function updateReview(
  { db, now }: Context,
  user: SignedInUser,
  reviewId: string,
  { version, order, mainFocus }: BodyOf<typeof updateCall>,
): Review {
  reviewInReach(db, user, reviewId);
  return db.transaction(
    (tx) => {
      const review = draftOf(tx, reviewId, version);
      const ids = findingIds(tx, reviewId);
      if (order) {
        const same = order.length === ids.length && new Set(order).size === ids.length;
        if (!same || !order.every((id) => ids.includes(id)))
          throw badField('order', 'Name every finding of the review once.');
        order.forEach((id, position) => {
          tx.update(findings).set({ position }).where(eq(findings.id, id)).run();
        });
      }
      if (mainFocus !== undefined) {
        if (mainFocus !== null && !ids.includes(mainFocus))
          throw badField('mainFocus', 'There is no such finding in this review.');
        tx.update(findings).set({ mainFocus: false }).where(eq(findings.reviewId, reviewId)).run();
        if (mainFocus !== null)
          tx.update(findings).set({ mainFocus: true }).where(eq(findings.id, mainFocus)).run();
      }
      touch(tx, review, now());
      return reviewAnswer(tx, reviewId);
    },
    { behavior: 'immediate' },
  );
}

/** Throws a draft away with its pictures. */
export function deleteReview(
  { db, settings }: Context,
  user: SignedInUser,
  reviewId: string,
  version: number,
): void {
  reviewInReach(db, user, reviewId);
  const files = db.transaction(
    (tx) => {
      draftOf(tx, reviewId, version);
      const pictures = tx
        .select({ fileId: stills.fileId })
        .from(stills)
        .innerJoin(findings, eq(findings.id, stills.findingId))
        .where(eq(findings.reviewId, reviewId))
        .all();
      tx.delete(reviews).where(eq(reviews.id, reviewId)).run();
      return pictures.map(({ fileId }) => fileId);
    },
    { behavior: 'immediate' },
  );
  dropPictures(settings, files);
}

/** The draft, when it is one and nobody changed it meanwhile. */
export function draftOf(tx: Reader, reviewId: string, version?: number): ReviewRow {
  const review = tx.select().from(reviews).where(eq(reviews.id, reviewId)).get();
  if (!review) throw notFound('review');
  refuseSent(review);
  if (version !== undefined && version !== review.version)
    throw changedMeanwhile('review', reviewAnswer(tx, reviewId));
  return review;
}

function findingIds(tx: Reader, reviewId: string): string[] {
  return tx
    .select({ id: findings.id })
    .from(findings)
    .where(eq(findings.reviewId, reviewId))
    .orderBy(asc(findings.position))
    .all()
    .map(({ id }) => id);
}

/** Counts a change of the review itself. */
export function touch(tx: Pick<AppContext['db'], 'update'>, review: ReviewRow, at: Date): void {
  tx.update(reviews)
    .set({ version: review.version + 1, updatedAt: at.toISOString() })
    .where(eq(reviews.id, review.id))
    .run();
}
