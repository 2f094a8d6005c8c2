import { type Outcome, ok, refused } from './outcome';
import { checkPoint, distance, type PointReason, type VideoPoint } from './points/video-point';

export type ArmSide = 'left' | 'right';

/** The way the swimmer travels in the picture as shown. */
export type TravelDirection = 'left' | 'right';

export type Joint = 'shoulder' | 'elbow' | 'wrist';

/** Shoulder, elbow and wrist of one arm on one frame. */
export interface ArmMark {
  readonly shoulder: VideoPoint;
  readonly elbow: VideoPoint;
  readonly wrist: VideoPoint;
}

/** A mark with the frame it was made on. */
export interface FrameMark extends ArmMark {
  /** 0-based, presentation order. */
  readonly frame: number;
}

export type ArmMarkReason = 'missing-joint' | Exclude<PointReason, 'missing-point'> | 'coincident-joints';

/** Below this distance (pixels) two joints are one point and no direction can be read. */
const SAME_POINT_PX = 1e-6;

/** The mark itself when all three joints are there, finite and apart from each other. */
export function checkArmMark<M extends ArmMark>(mark: M): Outcome<M, ArmMarkReason> {
  for (const joint of [mark.shoulder, mark.elbow, mark.wrist]) {
    const point = checkPoint(joint);
    if (!point.ok) return refused(point.reason === 'missing-point' ? 'missing-joint' : point.reason);
  }
  const { shoulder, elbow, wrist } = mark;
  const closest = Math.min(distance(shoulder, elbow), distance(elbow, wrist), distance(shoulder, wrist));
  return closest < SAME_POINT_PX ? refused('coincident-joints') : ok(mark);
}
