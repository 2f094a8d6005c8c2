import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Clip } from '@stillstroke/contract/clip-facts';
import type {
  getClipFrames as framesCall,
  putCalibration,
  updateClip as updateCall,
} from '@stillstroke/contract/clips';
import type { AnswerOf, BodyOf } from '@stillstroke/contract/endpoint';
import { clipFrames, clips } from '@stillstroke/db/schema/film';
import { cameraRoll } from '@stillstroke/geometry/calibration/plumb';
import { eq } from 'drizzle-orm';
import { refreshClipFigures } from '../measures/figures';
import { unpackFrames } from '../media/frame-blobs';
import type { AppContext } from '../platform/context';
import { HttpProblem, notFound } from '../platform/problem';
import { liveClip, restorableClip } from '../sessions/live-film';
import { undoUntil } from '../sessions/undo';
import { clipAnswer } from './clip-answer';

type Context = Pick<AppContext, 'db' | 'now' | 'settings'>;

export function getClip({ db }: Context, user: SignedInUser, clipId: string): Clip {
  return clipAnswer(db, liveClip(db, user, clipId).clip.id);
}

/** Changes what is said about a clip; its measures follow in the same transaction. */
export function updateClip(
  { db }: Context,
  user: SignedInUser,
  clipId: string,
  { view, travel, stroke, captureRateFactor, fieldOfView }: BodyOf<typeof updateCall>,
): Clip {
  const { clip } = liveClip(db, user, clipId);
  return db.transaction(
    (tx) => {
      tx.update(clips)
        .set({
          ...(view !== undefined && { view }),
          ...(travel !== undefined && { travel }),
          ...(stroke !== undefined && { stroke }),
          ...(captureRateFactor !== undefined && { captureRateFactor }),
          ...(fieldOfView !== undefined && {
            fieldOfViewDeg: fieldOfView?.deg ?? null,
            fieldOfViewMedium: fieldOfView?.medium ?? null,
          }),
        })
        .where(eq(clips.id, clip.id))
        .run();
      refreshClipFigures(tx, clip.id);
      return clipAnswer(tx, clip.id);
    },
    { behavior: 'immediate' },
  );
}

/** Takes a clip out of sight; until the instant answered it can be brought back with everything on it. */
export function deleteClip(context: Context, user: SignedInUser, clipId: string): { undoUntil: string } {
  const { db } = context;
  const { clip } = liveClip(db, user, clipId);
  const deletedAt = context.now().toISOString();
  db.update(clips).set({ deletedAt }).where(eq(clips.id, clip.id)).run();
  return { undoUntil: undoUntil(context.settings, deletedAt) };
}

/** Brings a deleted clip back; one that is not deleted stays as it is. */
export function restoreClip(context: Context, user: SignedInUser, clipId: string): Clip {
  const { db } = context;
  const { clip } = restorableClip(context, user, clipId);
  db.update(clips).set({ deletedAt: null }).where(eq(clips.id, clip.id)).run();
  return clipAnswer(db, clip.id);
}

/** Frame times in whole microseconds and key frames, in presentation order. */
export function getClipFrames(
  { db }: Context,
  user: SignedInUser,
  clipId: string,
): AnswerOf<typeof framesCall> {
  const { clip } = liveClip(db, user, clipId);
  const blobs = db.select().from(clipFrames).where(eq(clipFrames.clipId, clip.id)).get();
  if (!blobs) throw notFound('clip');
  return unpackFrames(blobs);
}

/** Sets the plumb of a clip or takes it away; its measures follow in the same transaction. */
export function setCalibration(
  { db }: Context,
  user: SignedInUser,
  clipId: string,
  { plumb }: BodyOf<typeof putCalibration>,
): Clip {
  const { clip } = liveClip(db, user, clipId);
  const roll = cameraRoll(plumb);
  if (!roll.ok)
    throw new HttpProblem(422, 'plumb-too-short', plumbWords[roll.reason] ?? 'Draw the plumb again.');
  return db.transaction(
    (tx) => {
      tx.update(clips)
        .set({
          plumbTopX: plumb?.top.x ?? null,
          plumbTopY: plumb?.top.y ?? null,
          plumbBottomX: plumb?.bottom.x ?? null,
          plumbBottomY: plumb?.bottom.y ?? null,
        })
        .where(eq(clips.id, clip.id))
        .run();
      refreshClipFigures(tx, clip.id);
      return clipAnswer(tx, clip.id);
    },
    { behavior: 'immediate' },
  );
}

const plumbWords: Record<string, string> = {
  'plumb-too-short':
    'The plumb is too short to tell the vertical from. Draw it at least 20 pixels long, better over half the picture.',
  'plumb-level':
    'The plumb lies level, so which end is the lower one cannot be told. Draw it along something that hangs or stands.',
};
