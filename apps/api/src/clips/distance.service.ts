import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Clip } from '@stillstroke/contract/clip-facts';
import type { putDistance } from '@stillstroke/contract/clips';
import type { BodyOf } from '@stillstroke/contract/endpoint';
import type { Db } from '@stillstroke/db/open';
import { clipDistances } from '@stillstroke/db/schema/timing';
import { swimSpeed, type KnownDistance } from '@stillstroke/geometry/events/known-distance';
import { eq } from 'drizzle-orm';
import { clipTimes, type Reader } from '../measures/clip-reading';
import { refreshClipFigures } from '../measures/figures';
import type { AppContext } from '../platform/context';
import { HttpProblem } from '../platform/problem';
import { liveClip } from '../sessions/live-film';
import { clipAnswer, type ClipRow } from './clip-answer';

/** Sets how far the swimmer travelled between two frames, or takes it away; stroke length and index follow at once. */
export function setDistance(
  { db, now }: Pick<AppContext, 'db' | 'now'>,
  user: SignedInUser,
  clipId: string,
  { distance }: BodyOf<typeof putDistance>,
): Clip {
  const { clip } = liveClip(db, user, clipId);
  if (distance !== null) checkDistance(db, clip, distance);
  return db.transaction(
    (tx) => {
      keepDistance(tx, clip.id, distance, { updatedAt: now().toISOString(), updatedBy: user.id });
      refreshClipFigures(tx, clip.id);
      return clipAnswer(tx, clip.id);
    },
    { behavior: 'immediate' },
  );
}

/** @throws HttpProblem where no speed can be told from it on that clip */
export function checkDistance(db: Reader, clip: ClipRow, distance: KnownDistance): void {
  const speed = swimSpeed(distance, clipTimes(db, clip.id));
  if (!speed.ok) throw refusal(speed.reason, clip.frameCount);
}

/** Writes a distance that has been checked; its figures are the caller's to compute again. */
export function keepDistance(
  tx: Pick<Db, 'insert' | 'delete'>,
  clipId: string,
  distance: KnownDistance | null,
  stamp: { readonly updatedAt: string; readonly updatedBy: string },
): void {
  tx.delete(clipDistances).where(eq(clipDistances.clipId, clipId)).run();
  if (distance !== null) {
    tx.insert(clipDistances)
      .values({ clipId, ...distance, ...stamp })
      .run();
  }
}

function refusal(reason: string, frameCount: number): HttpProblem {
  if (reason === 'frame-outside-clip') {
    return new HttpProblem(
      422,
      'frame-out-of-range',
      `The clip has frames 0 to ${frameCount - 1}; one of the two lies outside.`,
    );
  }
  return new HttpProblem(
    422,
    'distance-unusable',
    'No time passes between the two frames, so no speed can be told. Choose two frames further apart.',
  );
}
