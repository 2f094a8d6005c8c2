import type { Finding, Question, Review } from '@stillstroke/contract/reviews';
import type { ReviewReading } from '@stillstroke/contract/review-readings';
import { athletes, users } from '@stillstroke/db/schema/club';
import { sessions } from '@stillstroke/db/schema/film';
import {
  findingMessages,
  findingReadings,
  findings,
  observations,
  reviews,
  stills,
} from '@stillstroke/db/schema/review';
import { and, asc, eq, inArray, isNull } from 'drizzle-orm';
import { grouped } from '../measures/grouped';
import { notFound } from '../platform/problem';
import { stillAnswer } from '../stills/still-answer';
import { LiveReadings, readSource, readStand } from './earlier-reading';
import type { FindingRow, Reader, ReviewRow } from './review-reach';

/** One review whole; the caller has made sure that it may be seen. */
export function reviewAnswer(db: Reader, reviewId: string): Review {
  const row = db.select().from(reviews).where(eq(reviews.id, reviewId)).get();
  if (!row) throw notFound('review');
  return { ...headOf(db, row), findings: findingAnswers(db, row) };
}

/** What stands over a review: whose, of which session, by whom, in which state. */
export function headOf(db: Reader, row: ReviewRow): Omit<Review, 'findings'> {
  const athlete = db
    .select({ name: athletes.name })
    .from(athletes)
    .where(eq(athletes.id, row.athleteId))
    .get();
  const session =
    row.sessionId === null
      ? undefined
      : db
          .select({ date: sessions.date })
          .from(sessions)
          .where(and(eq(sessions.id, row.sessionId), isNull(sessions.deletedAt)))
          .get();
  const { id, athleteId, sessionId, state, createdAt, updatedAt, sentAt, readAt, version } = row;
  return {
    id,
    athleteId,
    athleteName: athlete?.name ?? '',
    sessionId: session ? sessionId : null,
    sessionDate: session?.date ?? null,
    authorName: nameOf(db, row.authorId),
    state,
    createdAt,
    updatedAt,
    sentAt,
    readAt,
    version,
  };
}

export function findingAnswer(db: Reader, review: ReviewRow, findingId: string): Finding {
  const answer = findingAnswers(db, review, findingId)[0];
  if (!answer) throw notFound('finding');
  return answer;
}

/** Findings of a review in the order of telling, or one of them. */
function findingAnswers(db: Reader, review: ReviewRow, only?: string): Finding[] {
  const rows = db
    .select({ finding: findings, observation: observations.name, updatedBy: users.name })
    .from(findings)
    .leftJoin(observations, eq(observations.id, findings.observationId))
    .leftJoin(users, eq(users.id, findings.updatedBy))
    .where(and(eq(findings.reviewId, review.id), only === undefined ? undefined : eq(findings.id, only)))
    .orderBy(asc(findings.position), asc(findings.id))
    .all();
  const ids = rows.map(({ finding }) => finding.id);
  const readings = readingsOf(db, review, ids);
  const pictures = grouped(
    db
      .select()
      .from(stills)
      .where(inArray(stills.findingId, ids))
      .orderBy(asc(stills.position), asc(stills.id))
      .all(),
    ({ findingId }) => findingId,
  );
  const questions = questionsOf(db, ids);
  return rows.map(({ finding, observation, updatedBy }) => ({
    id: finding.id,
    reviewId: finding.reviewId,
    kind: finding.kind,
    words: finding.words,
    arm: finding.arm,
    phase: finding.phase,
    observation: observationOf(finding, observation),
    mainFocus: finding.mainFocus,
    readings: readings.get(finding.id) ?? [],
    stills: (pictures.get(finding.id) ?? []).map(stillAnswer),
    questions: questions.get(finding.id) ?? [],
    version: finding.version,
    updatedBy,
    updatedAt: finding.updatedAt,
  }));
}

/** In a sent review by the name it had then, even when the list no longer knows it. */
function observationOf(finding: FindingRow, name: string | null): Finding['observation'] {
  const shown = finding.observationName ?? name;
  return shown === null ? null : { id: finding.observationId, name: shown };
}

function readingsOf(db: Reader, review: ReviewRow, ids: readonly string[]): Map<string, ReviewReading[]> {
  const live = new LiveReadings(db, review);
  const rows = db
    .select()
    .from(findingReadings)
    .where(inArray(findingReadings.findingId, [...ids]))
    .orderBy(asc(findingReadings.position), asc(findingReadings.id))
    .all();
  const byFinding = new Map<string, ReviewReading[]>();
  for (const [findingId, of] of grouped(rows, (row) => row.findingId)) {
    byFinding.set(
      findingId,
      of.map(({ source, frozen }) => {
        const read = readSource(source);
        return { source: read, stand: frozen === null ? live.standOf(read) : readStand(frozen) };
      }),
    );
  }
  return byFinding;
}

/** Questions under findings with their answers, oldest first. */
export function questionsOf(db: Reader, findingIds: readonly string[]): Map<string, Question[]> {
  const rows = db
    .select({ message: findingMessages, author: users.name })
    .from(findingMessages)
    .leftJoin(users, eq(users.id, findingMessages.authorId))
    .where(inArray(findingMessages.findingId, [...findingIds]))
    .orderBy(asc(findingMessages.createdAt), asc(findingMessages.id))
    .all();
  const answers = grouped(
    rows.filter(({ message }) => message.questionId !== null),
    ({ message }) => message.questionId,
  );
  const said = ({ message, author }: (typeof rows)[number]) => ({
    id: message.id,
    words: message.words,
    authorName: author ?? 'somebody who has left',
    createdAt: message.createdAt,
  });
  const byFinding = new Map<string, Question[]>();
  for (const row of rows) {
    if (row.message.questionId !== null) continue;
    const listed = byFinding.get(row.message.findingId) ?? [];
    listed.push({
      ...said(row),
      answers: (answers.get(row.message.id) ?? []).map((answer) => ({
        ...said(answer),
        readAt: answer.message.readAt,
      })),
    });
    byFinding.set(row.message.findingId, listed);
  }
  return byFinding;
}

function nameOf(db: Reader, userId: string | null): string | null {
  if (userId === null) return null;
  return db.select({ name: users.name }).from(users).where(eq(users.id, userId)).get()?.name ?? null;
}
