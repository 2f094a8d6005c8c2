import type { Db } from '@stillstroke/db/open';
import { users } from '@stillstroke/db/schema/club';
import { clips, marks } from '@stillstroke/db/schema/film';
import { markingFigures } from '@stillstroke/db/schema/repeatability';
import { OWN_UNCERTAINTY_FRAMES, ownUncertaintyPx } from '@stillstroke/geometry/uncertainty/own-uncertainty';
import { count, desc, eq, max } from 'drizzle-orm';
import type { ClipRow } from '../clips/clip-answer';

type Writer = Pick<Db, 'select' | 'insert' | 'delete' | 'update'>;

/**
 * Whose spread the uncertainties of a clip are made with: the coach's who placed most of its marks, the later one of two
 * who placed as many. One clip has one spread: a stroke marked by two people would otherwise have an uncertainty for
 * each joint that nobody could follow. Answers whether the readings of the clip have changed by it.
 */
export function settleMarker(tx: Writer, clipId: string): boolean {
  const markerId = mainMarker(tx, clipId);
  const clip = tx.select().from(clips).where(eq(clips.id, clipId)).get();
  if (!clip) return false;
  const joints = jointColumns(tx, clip, markerId);
  const changed = (Object.keys(joints) as (keyof typeof joints)[]).some((key) => clip[key] !== joints[key]);
  if (changed || clip.markerId !== markerId)
    tx.update(clips)
      .set({ markerId, ...joints })
      .where(eq(clips.id, clipId))
      .run();
  return changed;
}

/** Only a mark by someone else can change who has placed most. */
export function settleMarkerAfter(tx: Writer, clip: ClipRow, userId: string): boolean {
  return clip.markerId === userId ? false : settleMarker(tx, clip.id);
}

function mainMarker(tx: Writer, clipId: string): string | null {
  const most = tx
    .select({ userId: marks.updatedBy, placed: count(), latest: max(marks.updatedAt) })
    .from(marks)
    .innerJoin(users, eq(users.id, marks.updatedBy))
    .where(eq(marks.clipId, clipId))
    .groupBy(marks.updatedBy)
    .orderBy(desc(count()), desc(max(marks.updatedAt)))
    .limit(1)
    .get();
  return most?.userId ?? null;
}

function jointColumns(tx: Writer, clip: ClipRow, markerId: string | null) {
  const own =
    markerId === null
      ? undefined
      : tx.select().from(markingFigures).where(eq(markingFigures.userId, markerId)).get();
  if (!own || own.frames < OWN_UNCERTAINTY_FRAMES) {
    return { jointShoulderPx: null, jointElbowPx: null, jointWristPx: null };
  }
  const px = ownUncertaintyPx(clip, {
    shoulder: own.shoulderAt1080,
    elbow: own.elbowAt1080,
    wrist: own.wristAt1080,
  });
  return { jointShoulderPx: px.shoulder, jointElbowPx: px.elbow, jointWristPx: px.wrist };
}
