import { randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Question } from '@stillstroke/contract/reviews';
import { findingMessages } from '@stillstroke/db/schema/review';
import { count, eq } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { HttpProblem, notFound } from '../platform/problem';
import { questionsOf } from './review-answer';
import { mailSaid } from './review-mails';
import { findingInReach, questionInReach, type Reader } from './review-reach';

type Context = Pick<AppContext, 'db' | 'now'>;
interface Said {
  readonly id?: string | undefined;
  readonly words: string;
}

/** Enough for any conversation; keeps a runaway page from filling the database. */
const MOST_MESSAGES = 200;

/** Asks about a finding of a review that was sent. Sent twice under the same id it is one question. */
export function askQuestion(
  { db, now }: Context,
  user: SignedInUser,
  findingId: string,
  { id = randomUUID(), words }: Said,
): Question {
  // An athlete knows of sent reviews only.
  const { finding, review } = findingInReach(db, user, findingId);
  return db.transaction(
    (tx) => {
      const there = tx.select().from(findingMessages).where(eq(findingMessages.id, id)).get();
      if (there) {
        refuseOther(there, { findingId: finding.id, questionId: null, words, authorId: user.id });
        return questionAnswer(tx, finding.id, id);
      }
      refuseTooMany(tx, finding.id);
      tx.insert(findingMessages)
        .values({ id, findingId: finding.id, words, authorId: user.id, createdAt: now().toISOString() })
        .run();
      mailSaid(tx, 'question', { by: user, reviewId: review.id, now: now() }, review.authorId);
      return questionAnswer(tx, finding.id, id);
    },
    { behavior: 'immediate' },
  );
}

/** Answers a question. Sent twice under the same id it is one answer. */
export function answerQuestion(
  { db, now }: Context,
  user: SignedInUser,
  questionId: string,
  { id = randomUUID(), words }: Said,
): Question {
  const { finding, review, question } = questionInReach(db, user, questionId);
  return db.transaction(
    (tx) => {
      const there = tx.select().from(findingMessages).where(eq(findingMessages.id, id)).get();
      if (there) {
        refuseOther(there, { findingId: finding.id, questionId, words, authorId: user.id });
        return questionAnswer(tx, finding.id, questionId);
      }
      refuseTooMany(tx, finding.id);
      tx.insert(findingMessages)
        .values({
          id,
          findingId: finding.id,
          questionId,
          words,
          authorId: user.id,
          createdAt: now().toISOString(),
        })
        .run();
      mailSaid(tx, 'answer', { by: user, reviewId: review.id, now: now() }, question.authorId);
      return questionAnswer(tx, finding.id, questionId);
    },
    { behavior: 'immediate' },
  );
}

type Message = typeof findingMessages.$inferSelect;

function refuseOther(
  there: Message,
  wanted: Pick<Message, 'findingId' | 'questionId' | 'words' | 'authorId'>,
): void {
  const same = (Object.keys(wanted) as (keyof typeof wanted)[]).every((key) => there[key] === wanted[key]);
  if (!same) throw new HttpProblem(409, 'conflict', 'This id is taken; choose another.');
}

function refuseTooMany(db: Reader, findingId: string): void {
  const said = db
    .select({ n: count() })
    .from(findingMessages)
    .where(eq(findingMessages.findingId, findingId))
    .get();
  if ((said?.n ?? 0) >= MOST_MESSAGES)
    throw new HttpProblem(
      409,
      'conflict',
      'There is no more room under this finding; talk about it at the pool.',
    );
}

function questionAnswer(db: Reader, findingId: string, questionId: string): Question {
  const question = questionsOf(db, [findingId])
    .get(findingId)
    ?.find(({ id }) => id === questionId);
  if (!question) throw notFound('question');
  return question;
}
