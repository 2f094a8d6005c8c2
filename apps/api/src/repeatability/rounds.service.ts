import { randomInt, randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf, ParamsOf } from '@stillstroke/contract/endpoint';
import type {
  MarkingRound,
  MarkingRoundWithMarks,
  putRoundMark as putCall,
  RoundMark,
  startRound as startCall,
} from '@stillstroke/contract/repeatability';
import { marks } from '@stillstroke/db/schema/film';
import { markingRounds, roundMarks } from '@stillstroke/db/schema/repeatability';
import { and, eq } from 'drizzle-orm';
import { checkJoints } from '../marks/mark-rules';
import type { MarkRow } from '../measures/clip-reading';
import type { AppContext } from '../platform/context';
import { HttpProblem, notFound } from '../platform/problem';
import { liveClip } from '../sessions/live-film';
import { refreshOwnFigures } from './figures.service';
import { marksOfRound, roundAnswers, roundMarkAnswer, type RoundRow } from './round-rows';

type Context = Pick<AppContext, 'db' | 'now'>;

/** A round of fewer frames would say next to nothing. */
const LEAST_FRAMES = 3;

export function listClipRounds({ db }: Context, user: SignedInUser, clipId: string): MarkingRound[] {
  const { clip } = liveClip(db, user, clipId);
  return roundAnswers(db, and(eq(markingRounds.clipId, clip.id), eq(markingRounds.userId, user.id)));
}

/** Begins a round on a clip: marked frames in random order, those that the caller marked themselves before others. */
export function startRound(
  { db, now }: Context,
  user: SignedInUser,
  clipId: string,
  { frames }: BodyOf<typeof startCall>,
): MarkingRoundWithMarks {
  const { clip } = liveClip(db, user, clipId);
  const id = randomUUID();
  return db.transaction(
    (tx) => {
      const there = tx.select().from(marks).where(eq(marks.clipId, clip.id)).all();
      if (there.length < LEAST_FRAMES) {
        throw new HttpProblem(
          422,
          'too-few-marks',
          `Only ${there.length} of this clip’s frames are marked; mark at least ${LEAST_FRAMES}, then they can be marked again.`,
        );
      }
      const own = shuffled(there.filter(({ updatedBy }) => updatedBy === user.id));
      const others = shuffled(there.filter(({ updatedBy }) => updatedBy !== user.id));
      const chosen = shuffled([...own, ...others].slice(0, frames));
      tx.insert(markingRounds)
        .values({ id, userId: user.id, clipId: clip.id, createdAt: now().toISOString() })
        .run();
      tx.insert(roundMarks)
        .values(chosen.map((mark, position) => ({ roundId: id, position, ...firstMark(mark) })))
        .run();
      return answerOf(tx, id);
    },
    { behavior: 'immediate' },
  );
}

export function getRound({ db }: Context, user: SignedInUser, roundId: string): MarkingRoundWithMarks {
  ownRound(db, user, roundId);
  return answerOf(db, roundId);
}

/** Sets the joints of one frame. A finished round stays as it is: its figures stand in people's uncertainties. */
export function putRoundMark(
  { db }: Context,
  user: SignedInUser,
  { id, position }: ParamsOf<typeof putCall>,
  joints: BodyOf<typeof putCall>,
): RoundMark {
  const { round, clip } = ownRound(db, user, id);
  refuseFinished(round);
  checkJoints(joints, clip);
  const { shoulder, elbow, wrist } = joints;
  const row = db
    .update(roundMarks)
    .set({
      shoulderX: shoulder.x,
      shoulderY: shoulder.y,
      elbowX: elbow.x,
      elbowY: elbow.y,
      wristX: wrist.x,
      wristY: wrist.y,
    })
    .where(and(eq(roundMarks.roundId, round.id), eq(roundMarks.position, position)))
    .returning()
    .get();
  if (!row) throw notFound('frame of this round');
  return roundMarkAnswer(row);
}

/** Ends a round; the coach's figures and every uncertainty that rests on them follow. Ended twice it is ended. */
export async function finishRound(
  context: Context,
  user: SignedInUser,
  roundId: string,
): Promise<MarkingRound> {
  const { db, now } = context;
  const { round } = ownRound(db, user, roundId);
  const missing = marksOfRound(db, round.id).filter(({ shoulderX }) => shoulderX === null).length;
  if (missing > 0) {
    throw new HttpProblem(
      422,
      'round-not-done',
      `${missing} ${missing === 1 ? 'frame is' : 'frames are'} still to be marked again.`,
    );
  }
  if (round.finishedAt === null) {
    db.update(markingRounds)
      .set({ finishedAt: now().toISOString() })
      .where(eq(markingRounds.id, round.id))
      .run();
  }
  await refreshOwnFigures(context, user.id);
  const { marks: _, ...answer } = answerOf(db, round.id);
  return answer;
}

export async function deleteRound(context: Context, user: SignedInUser, roundId: string): Promise<void> {
  const { db } = context;
  const { round } = ownRound(db, user, roundId);
  db.delete(markingRounds).where(eq(markingRounds.id, round.id)).run();
  if (round.finishedAt !== null) await refreshOwnFigures(context, user.id);
}

/** A round of the caller on a clip in their reach, or 404: nobody sees how others repeat themselves. */
function ownRound(db: Context['db'], user: SignedInUser, roundId: string) {
  const round = db.select().from(markingRounds).where(eq(markingRounds.id, roundId)).get();
  if (!round || round.userId !== user.id) throw notFound('round');
  return { round, clip: liveClip(db, user, round.clipId).clip };
}

function refuseFinished({ finishedAt }: RoundRow): void {
  if (finishedAt === null) return;
  throw new HttpProblem(409, 'round-finished', 'This round is finished. Start a new one to mark more.');
}

function answerOf(db: Pick<Context['db'], 'select'>, roundId: string): MarkingRoundWithMarks {
  const [round] = roundAnswers(db, eq(markingRounds.id, roundId));
  if (!round) throw notFound('round');
  return { ...round, marks: marksOfRound(db, roundId).map(roundMarkAnswer) };
}

function firstMark(mark: MarkRow) {
  return {
    arm: mark.arm,
    frame: mark.frame,
    firstBy: mark.updatedBy,
    firstShoulderX: mark.shoulderX,
    firstShoulderY: mark.shoulderY,
    firstElbowX: mark.elbowX,
    firstElbowY: mark.elbowY,
    firstWristX: mark.wristX,
    firstWristY: mark.wristY,
  };
}

/** Every order is as likely as any other (Fisher and Yates), so that nobody can know what comes next. */
function shuffled<T>(items: readonly T[]): T[] {
  const order = [...items];
  for (let last = order.length - 1; last > 0; last--) {
    const other = randomInt(last + 1);
    [order[last], order[other]] = [order[other] as T, order[last] as T];
  }
  return order;
}
