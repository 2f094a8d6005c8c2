import { setImmediate } from 'node:timers/promises';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { MarkingFigures } from '@stillstroke/contract/repeatability';
import type { Db } from '@stillstroke/db/open';
import { clips } from '@stillstroke/db/schema/film';
import { markingFigures, markingRounds, roundMarks } from '@stillstroke/db/schema/repeatability';
import { defaultJointUncertaintyPx } from '@stillstroke/geometry/uncertainty/joint-uncertainty';
import {
  OWN_UNCERTAINTY_FRAMES,
  ownRepeatability,
  type PlacedTwice,
  typicalErrors,
} from '@stillstroke/geometry/uncertainty/own-uncertainty';
import { and, eq } from 'drizzle-orm';
import { refreshClipFigures } from '../measures/figures';
import type { AppContext } from '../platform/context';
import { settleMarker } from './marker';
import { markedTwice, placedTwice, roundAnswers } from './round-rows';

type Context = Pick<AppContext, 'db' | 'now'>;
type Writer = Pick<Db, 'select' | 'insert' | 'delete' | 'update'>;

/** The caller's own repeatability with the rounds behind it. */
export function getMarking({ db }: Context, user: SignedInUser): MarkingFigures {
  const { placed, measuredAt, rounds } = ownFrames(db, user.id);
  const spread = ownRepeatability(placed);
  const errors = typicalErrors(placed);
  return {
    figures:
      spread.ok && measuredAt !== null
        ? {
            spreadAt1080: spread.value.jointUncertaintyPx,
            degreesOfFreedom: spread.value.degreesOfFreedom,
            frames: spread.value.frames,
            rounds,
            measuredAt,
            inUse: spread.value.frames >= OWN_UNCERTAINTY_FRAMES,
            typicalErrors: errors.ok
              ? {
                  forearmDeg: withoutFrames(errors.value.forearmDeg),
                  upperArmDeg: withoutFrames(errors.value.upperArmDeg),
                  elbowDeg: withoutFrames(errors.value.elbowDeg),
                  elbowDropDeg: withoutFrames(errors.value.elbowDropDeg),
                }
              : null,
          }
        : null,
    defaultAt1080: defaultJointUncertaintyPx({ width: 1920, height: 1080 }),
    framesNeeded: OWN_UNCERTAINTY_FRAMES,
    rounds: roundAnswers(db, eq(markingRounds.userId, user.id)),
  };
}

/** Forgets the caller's rounds and figures; every clip they marked goes back to the default. */
export async function forgetMarking(context: Context, user: SignedInUser): Promise<void> {
  context.db.delete(markingRounds).where(eq(markingRounds.userId, user.id)).run();
  await refreshOwnFigures(context, user.id);
}

/**
 * Works a coach's spread out of their finished rounds again and carries it into every clip that is mostly marked by them.
 * A clip at a time, so that others are answered in between. The clips are first noted as outdated together with the new
 * spread: what a crash leaves undone is done at the next start.
 */
export async function refreshOwnFigures(context: Context, userId: string): Promise<void> {
  const { db } = context;
  const clipIds = db.transaction((tx) => keepFigures(tx, userId), { behavior: 'immediate' });
  for (const clipId of clipIds) {
    db.transaction((tx) => refreshClipFigures(tx, clipId), { behavior: 'immediate' });
    await setImmediate();
  }
}

function keepFigures(tx: Writer, userId: string): string[] {
  const { placed, measuredAt } = ownFrames(tx, userId);
  const spread = ownRepeatability(placed);
  if (spread.ok && measuredAt !== null) {
    const { shoulder, elbow, wrist } = spread.value.jointUncertaintyPx;
    const row = {
      shoulderAt1080: shoulder,
      elbowAt1080: elbow,
      wristAt1080: wrist,
      frames: spread.value.frames,
      measuredAt,
    };
    tx.insert(markingFigures)
      .values({ userId, ...row })
      .onConflictDoUpdate({ target: markingFigures.userId, set: row })
      .run();
  } else {
    tx.delete(markingFigures).where(eq(markingFigures.userId, userId)).run();
  }
  const theirs = tx.select({ id: clips.id }).from(clips).where(eq(clips.markerId, userId)).all();
  const changed = theirs.map(({ id }) => id).filter((id) => settleMarker(tx, id));
  for (const id of changed) tx.update(clips).set({ figuresFormulas: 0 }).where(eq(clips.id, id)).run();
  return changed;
}

/** Frames that a coach has placed twice themselves. */
function ownFrames(db: Pick<Db, 'select'>, userId: string) {
  const rows = markedTwice(db, and(eq(markingRounds.userId, userId), eq(roundMarks.firstBy, userId)));
  return {
    placed: rows.map(placedTwice).filter((one): one is PlacedTwice => one !== null),
    measuredAt: rows.at(-1)?.finishedAt ?? null,
    rounds: new Set(rows.map(({ row }) => row.roundId)).size,
  };
}

function withoutFrames({
  typicalErrorDeg,
  minimalChangeDeg,
  biasDeg,
}: {
  readonly typicalErrorDeg: number;
  readonly minimalChangeDeg: number;
  readonly biasDeg: number;
}) {
  return { typicalErrorDeg, minimalChangeDeg, biasDeg };
}
