import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf, QueryOf } from '@stillstroke/contract/endpoint';
import type {
  ClipScale,
  deleteScale as deleteCall,
  putScale as putCall,
  Scale,
} from '@stillstroke/contract/scale';
import { clipScales } from '@stillstroke/db/schema/scale';
import { checkKnown, checkScale, type ScaleReason } from '@stillstroke/geometry/calibration/picture-scale';
import { eq } from 'drizzle-orm';
import { isDeepStrictEqual } from 'node:util';
import type { ClipRow } from '../clips/clip-answer';
import type { AppContext } from '../platform/context';
import { changedMeanwhile, HttpProblem, notFound } from '../platform/problem';
import { liveClip } from '../sessions/live-film';
import { scaleAnswer, scaleRow } from './scale-row';

type Context = Pick<AppContext, 'db' | 'now'>;

export function getScale({ db }: Context, user: SignedInUser, clipId: string): ClipScale {
  return scaleAnswer(db, liveClip(db, user, clipId).clip.id);
}

/**
 * Sets the scale of a clip. Sent twice it is the same scale, of the same version; with a version, it is refused when that is
 * not the newest (0: when there is one already) and what is there is not what is sent.
 */
export function putScale(
  { db, now }: Context,
  user: SignedInUser,
  clipId: string,
  { scale, version }: BodyOf<typeof putCall>,
): ClipScale {
  const { clip } = liveClip(db, user, clipId);
  checkUsable(scale, clip);
  return db.transaction(
    (tx) => {
      const there = scaleRow(tx, clip.id);
      if (there && isDeepStrictEqual(there.scale, scale)) return there;
      if (version !== undefined && version !== (there?.version ?? 0))
        throw changedMeanwhile('scale', scaleAnswer(tx, clip.id));
      const changed = {
        scale,
        version: (there?.version ?? 0) + 1,
        updatedAt: now().toISOString(),
        updatedBy: user.id,
      };
      tx.insert(clipScales)
        .values({ clipId: clip.id, ...changed })
        .onConflictDoUpdate({ target: clipScales.clipId, set: changed })
        .run();
      return scaleAnswer(tx, clip.id);
    },
    { behavior: 'immediate' },
  );
}

/** Takes the scale away; with a version, only when that is the newest. */
export function deleteScale(
  { db }: Context,
  user: SignedInUser,
  clipId: string,
  { version }: QueryOf<typeof deleteCall>,
): void {
  const { clip } = liveClip(db, user, clipId);
  db.transaction(
    (tx) => {
      const there = scaleRow(tx, clip.id);
      if (!there) throw notFound('scale');
      if (version !== undefined && version !== there.version) throw changedMeanwhile('scale', there);
      tx.delete(clipScales).where(eq(clipScales.clipId, clip.id)).run();
    },
    { behavior: 'immediate' },
  );
}

function checkUsable(scale: Scale, { width, height }: ClipRow): void {
  const picture = { width, height };
  const checked = checkScale(scale, picture);
  const known = scale.check ? checkKnown(scale.check, picture) : checked;
  const reason = checked.ok ? (known.ok ? null : known.reason) : checked.reason;
  if (reason) throw new HttpProblem(422, 'scale-unusable', words[reason]);
}

const words: Readonly<Record<ScaleReason, string>> = {
  'not-finite': 'A point or length of the scale is no number.',
  'outside-picture': 'A point of the scale lies too far outside the picture.',
  'not-positive': 'Give lengths above 0 metres.',
  'too-long': 'Give lengths of at most 200 metres.',
  'too-short': 'The two ends lie too close together to take a scale from. Use something longer.',
  'points-in-line': 'The four corners fix no plane. Put them on the corners of a rectangle.',
  'corners-too-close': 'Two corners lie on each other. Put each on its own corner of the rectangle.',
  'corners-cross':
    'The sides of the rectangle cross. Put the corners in the order in which you walk round it.',
  'corners-not-convex': 'One corner points inward. Put the corners in the order in which you walk round it.',
  'corners-in-line': 'Three corners lie in one line. Put them on the corners of a rectangle.',
};
