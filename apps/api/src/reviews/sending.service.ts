import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf } from '@stillstroke/contract/endpoint';
import type { Finding, Review, sendReview as sendCall } from '@stillstroke/contract/reviews';
import { findingMessages, findingReadings, findings, reviews } from '@stillstroke/db/schema/review';
import { and, eq, inArray, isNotNull, isNull } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { changedMeanwhile, HttpProblem } from '../platform/problem';
import { LiveReadings, readSource } from './earlier-reading';
import { reviewAnswer } from './review-answer';
import { mailReviewSent } from './review-mails';
import { reviewInReach, type ReviewRow } from './review-reach';
import { draftOf } from './reviews.service';

type Context = Pick<AppContext, 'db' | 'now'>;
type Transaction = Parameters<Parameters<AppContext['db']['transaction']>[0]>[0];

/**
 * Sends a review. What it rests on is copied at this moment: readings with value, uncertainty, frame and target, and the
 * names of observations; stills are files of their own. From then on nothing in it changes.
 */
export function sendReview(
  { db, now }: Context,
  user: SignedInUser,
  reviewId: string,
  { version, findings: looked }: BodyOf<typeof sendCall>,
): Review {
  reviewInReach(db, user, reviewId);
  return db.transaction(
    (tx) => {
      const draft = draftOf(tx, reviewId, version);
      const current = reviewAnswer(tx, reviewId);
      const seen = new Map(looked.map(({ id, version }) => [id, version]));
      if (
        looked.length !== current.findings.length ||
        !current.findings.every((f) => seen.get(f.id) === f.version)
      )
        throw changedMeanwhile('review', current);
      refuseUnready(current.findings);
      freeze(tx, draft, current.findings);
      const sentAt = now().toISOString();
      tx.update(reviews)
        .set({ state: 'sent', sentAt, updatedAt: sentAt, authorId: user.id, version: draft.version + 1 })
        .where(eq(reviews.id, reviewId))
        .run();
      mailReviewSent(tx, { by: user, reviewId, now: now() }, draft.athleteId);
      return reviewAnswer(tx, reviewId);
    },
    { behavior: 'immediate' },
  );
}

/** @throws HttpProblem review-not-ready with everything that is missing */
function refuseUnready(told: readonly Finding[]): void {
  const missing: string[] = [];
  if (told.length === 0) missing.push('Write at least one finding.');
  const empty = told.flatMap(({ words }, at) => (words.trim() === '' ? [at + 1] : []));
  if (empty.length > 0)
    missing.push(
      empty.length === 1
        ? `Finding ${empty[0]} has no words yet.`
        : `Findings ${empty.join(', ')} have no words yet.`,
    );
  if (told.length > 0 && told.filter(({ mainFocus }) => mainFocus).length !== 1)
    missing.push('Choose the one finding that is the main focus.');
  if (missing.length > 0) throw new HttpProblem(422, 'review-not-ready', missing.join(' '));
}

function freeze(tx: Transaction, draft: ReviewRow, told: readonly Finding[]): void {
  const live = new LiveReadings(tx, draft);
  const ids = told.map(({ id }) => id);
  const rows = tx.select().from(findingReadings).where(inArray(findingReadings.findingId, ids)).all();
  for (const { id, source } of rows) {
    const frozen = JSON.stringify(live.standOf(readSource(source)));
    tx.update(findingReadings).set({ frozen }).where(eq(findingReadings.id, id)).run();
  }
  for (const { id, observation } of told) {
    if (observation)
      tx.update(findings).set({ observationName: observation.name }).where(eq(findings.id, id)).run();
  }
}

/** Notes that the athlete has opened the review and what was answered; the first opening counts. */
export function readReview({ db, now }: Context, user: SignedInUser, reviewId: string): Review {
  const { review } = reviewInReach(db, user, reviewId);
  return db.transaction(
    (tx) => {
      const readAt = now().toISOString();
      tx.update(reviews)
        .set({ readAt })
        .where(and(eq(reviews.id, review.id), isNull(reviews.readAt)))
        .run();
      const ids = tx.select({ id: findings.id }).from(findings).where(eq(findings.reviewId, review.id)).all();
      tx.update(findingMessages)
        .set({ readAt })
        .where(
          and(
            inArray(
              findingMessages.findingId,
              ids.map(({ id }) => id),
            ),
            isNotNull(findingMessages.questionId),
            isNull(findingMessages.readAt),
          ),
        )
        .run();
      return reviewAnswer(tx, review.id);
    },
    { behavior: 'immediate' },
  );
}
