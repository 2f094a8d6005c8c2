import type { ArmMark, FrameMark, Joint } from '../arm';
import { checkArmMark } from '../arm';
import { distance } from '../points/video-point';
import type { JointUncertaintyPx } from '../uncertainty/joint-uncertainty';
import { type Degrees, type Radians, toDegrees } from '../units/angle';
import { largestDirectionError } from './projection';

export type Segment = 'upper-arm' | 'forearm';

/** A segment that appears clearly shorter than the same arm's longest one: it points out of the picture's plane. */
export interface Foreshortening {
  readonly frame: number;
  readonly segment: Segment;
  /** Apparent length over the longest seen, 0 to 1. */
  readonly lengthShare: number;
  /** How far it points out of the plane, at least: acos of that share. Towards or away cannot be told. */
  readonly outOfPlaneDeg: Degrees;
  /** By how much a direction may be off for that reason. */
  readonly directionErrorDeg: Degrees;
}

const ENDS: Record<Segment, readonly [Joint, Joint]> = {
  'upper-arm': ['shoulder', 'elbow'],
  forearm: ['elbow', 'wrist'],
};

/** Below this tilt the direction error stays under half a degree. */
const WORTH_SAYING_DEG = 15;

/**
 * Hints from the segment lengths of one arm over frames at the same distance from the camera. Only what two standard
 * uncertainties of the lengths do not explain, and only above 15° out of plane.
 */
export function foreshortening(
  marks: readonly FrameMark[],
  joints: JointUncertaintyPx,
): readonly Foreshortening[] {
  const usable = marks.filter((mark) => checkArmMark(mark).ok);
  return (Object.keys(ENDS) as Segment[]).flatMap((segment) => {
    const [from, to] = ENDS[segment];
    const lengths = usable.map((mark) => ({ frame: mark.frame, px: lengthOf(mark, from, to) }));
    const longest = Math.max(...lengths.map(({ px }) => px));
    const spread = Math.SQRT2 * Math.hypot(joints[from], joints[to]);
    return lengths.flatMap(({ frame, px }) => {
      const outOfPlaneDeg = toDegrees(Math.acos(Math.min(1, (px + 2 * spread) / longest)) as Radians);
      if (outOfPlaneDeg < WORTH_SAYING_DEG) return [];
      const directionErrorDeg = largestDirectionError(outOfPlaneDeg);
      return [{ frame, segment, lengthShare: px / longest, outOfPlaneDeg, directionErrorDeg }];
    });
  });
}

function lengthOf(mark: ArmMark, from: Joint, to: Joint): number {
  return distance(mark[from], mark[to]);
}
