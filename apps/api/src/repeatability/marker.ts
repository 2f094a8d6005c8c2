import type { Db } from '@stillstroke/db/open';
import { users } from '@stillstroke/db/schema/club';
import { clips, marks } from '@stillstroke/db/schema/film';
import { markingFigures } from '@stillstroke/db/schema/repeatability';
import { OWN_UNCERTAINTY_FRAMES, ownUncertaintyPx } from '@stillstroke/geometry/uncertainty/own-uncertainty';
import {
  defaultJointUncertaintyPx,
  type JointUncertaintyPx,
} from '@stillstroke/geometry/uncertainty/joint-uncertainty';
import { count, desc, eq, max } from 'drizzle-orm';
import type { ClipRow } from '../clips/clip-answer';

/** A database or a transaction in it. */
export type Reader = Pick<Db, 'select'>;
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

/** A person's own spread in a clip's picture once it is known, else the default for its size. */
export function spreadOf(tx: Reader, clip: ClipRow, userId: string | null): JointUncertaintyPx {
  return ownSpread(tx, clip, userId) ?? defaultJointUncertaintyPx(clip);
}

function ownSpread(tx: Reader, clip: ClipRow, userId: string | null): JointUncertaintyPx | null {
  const own =
    userId === null
      ? undefined
      : tx.select().from(markingFigures).where(eq(markingFigures.userId, userId)).get();
  if (!own || own.frames < OWN_UNCERTAINTY_FRAMES) return null;
  return ownUncertaintyPx(clip, {
    shoulder: own.shoulderAt1080,
    elbow: own.elbowAt1080,
    wrist: own.wristAt1080,
  });
}

function jointColumns(tx: Writer, clip: ClipRow, markerId: string | null) {
  const px = ownSpread(tx, clip, markerId);
  return {
    jointShoulderPx: px?.shoulder ?? null,
    jointElbowPx: px?.elbow ?? null,
    jointWristPx: px?.wrist ?? null,
  };
}
