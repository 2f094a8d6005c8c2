import type { ReviewSummary } from '@stillstroke/contract/reviews';
import { findingMessages, findings, reviews } from '@stillstroke/db/schema/review';
import { and, eq, inArray, isNotNull, isNull, or, sql } from 'drizzle-orm';
import { grouped } from '../measures/grouped';
import { headOf } from './review-answer';
import type { Reader, ReviewRow } from './review-reach';

/** What lists say of reviews. */
export function reviewSummaries(db: Reader, rows: readonly ReviewRow[]): ReviewSummary[] {
  const ids = rows.map(({ id }) => id);
  const told = grouped(
    db.select().from(findings).where(inArray(findings.reviewId, ids)).all(),
    ({ reviewId }) => reviewId,
  );
  const said = grouped(
    db
      .select({ reviewId: findings.reviewId, message: findingMessages })
      .from(findingMessages)
      .innerJoin(findings, eq(findings.id, findingMessages.findingId))
      .where(inArray(findings.reviewId, ids))
      .all(),
    ({ reviewId }) => reviewId,
  );
  return rows.map((row) => {
    const of = told.get(row.id) ?? [];
    const messages = (said.get(row.id) ?? []).map(({ message }) => message);
    const answered = new Set(messages.map(({ questionId }) => questionId));
    const answers = messages.filter(({ questionId }) => questionId !== null);
    return {
      ...headOf(db, row),
      findingCount: of.length,
      mainFocus: of.find(({ mainFocus }) => mainFocus)?.words ?? null,
      openQuestions: messages.filter(({ id, questionId }) => questionId === null && !answered.has(id)).length,
      unread: row.state === 'sent' && (row.readAt === null || answers.some(({ readAt }) => readAt === null)),
    };
  });
}

/** How many sent reviews of an athlete wait to be opened, or have an answer that was not. */
export function unreadOf(db: Reader, athleteId: string): number {
  const row = db
    .select({ n: sql<number>`count(distinct ${reviews.id})` })
    .from(reviews)
    .leftJoin(findings, eq(findings.reviewId, reviews.id))
    .leftJoin(
      findingMessages,
      and(
        eq(findingMessages.findingId, findings.id),
        isNotNull(findingMessages.questionId),
        isNull(findingMessages.readAt),
      ),
    )
    .where(
      and(
        eq(reviews.athleteId, athleteId),
        eq(reviews.state, 'sent'),
        or(isNull(reviews.readAt), isNotNull(findingMessages.id)),
      ),
    )
    .get();
  return row?.n ?? 0;
}
