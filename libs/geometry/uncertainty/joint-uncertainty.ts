import type { Joint } from '../arm';
import { type Outcome, ok, refused } from '../outcome';

/** Standard uncertainty of a placed joint, per coordinate, in pixels of the picture as shown. */
export type JointUncertaintyPx = Readonly<Record<Joint, number>>;

export interface PictureSize {
  readonly width: number;
  readonly height: number;
}

/** How many pixels of a picture of this size stand for one of a picture of 1080 lines; 1 for a size that is none. */
export function pictureScale(size: PictureSize): number {
  const shorter = Math.min(size.width, size.height);
  return Number.isFinite(shorter) && shorter > 0 ? shorter / 1080 : 1;
}

export type JointUncertaintyReason = 'uncertainty-not-finite' | 'uncertainty-negative';

/**
 * Spread assumed for a picture whose shorter side is 1080 pixels. Our own assumption (common practice, no source),
 * meant to be replaced by the coach's own repeatability as soon as it is known. The shoulder is wider than the
 * other joints because its centre lies under muscle and often behind the head.
 */
const AT_1080: JointUncertaintyPx = { shoulder: 3, elbow: 2, wrist: 2 };
/** Nobody places a joint better than this, however small the picture. */
const FLOOR_PX = 1;

/**
 * Default uncertainty for a picture size: grows with the shorter side, since a joint covers more pixels in a larger
 * picture. A default, replaced by the coach's own. A size that is no size counts as 1080.
 */
export function defaultJointUncertaintyPx(size: PictureSize): JointUncertaintyPx {
  const scale = pictureScale(size);
  return {
    shoulder: Math.max(FLOOR_PX, AT_1080.shoulder * scale),
    elbow: Math.max(FLOOR_PX, AT_1080.elbow * scale),
    wrist: Math.max(FLOOR_PX, AT_1080.wrist * scale),
  };
}

export function checkJointUncertainty(
  value: JointUncertaintyPx,
): Outcome<JointUncertaintyPx, JointUncertaintyReason> {
  const all = [value.shoulder, value.elbow, value.wrist];
  if (!all.every(Number.isFinite)) return refused('uncertainty-not-finite');
  return all.some((px) => px < 0) ? refused('uncertainty-negative') : ok(value);
}
