import type { ArmSide, FrameMark } from '../arm';
import { foreshortening } from '../calibration/foreshortening';
import { largestDirectionError } from '../calibration/projection';
import type { JointUncertaintyPx } from '../uncertainty/joint-uncertainty';
import { toDegrees, type Radians } from '../units/angle';
import { cautionOf, type ViewCaution } from './caution';

/** How far upper arm and forearm point out of the picture's plane, degrees, 0 to 90; which way cannot be told. */
export interface ArmTilt {
  readonly upperArmDeg: number;
  readonly forearmDeg: number;
}

/**
 * By how much elbow and elbow drop of the arm in space may differ from the projected ones, whichever way each segment
 * points: the largest of all signs. The joints get the depths z = ± length·tan(tilt); cos of an angle in space is the scalar
 * product of the vectors over their lengths, which for the elbow is cos e₁ cos e₂ cos α′ + sin e₁ sin e₂.
 */
export function biasOfTilt(
  mark: FrameMark,
  { upperArmDeg, forearmDeg }: ArmTilt,
): { readonly elbowDeg: number; readonly elbowDropDeg: number } {
  const depth = (length: number, tiltDeg: number): number => length * Math.tan((tiltDeg * Math.PI) / 180);
  const upper = { x: mark.elbow.x - mark.shoulder.x, y: mark.elbow.y - mark.shoulder.y };
  const fore = { x: mark.wrist.x - mark.elbow.x, y: mark.wrist.y - mark.elbow.y };
  const upperZ = depth(Math.hypot(upper.x, upper.y), upperArmDeg);
  const foreZ = depth(Math.hypot(fore.x, fore.y), forearmDeg);
  const angles = (uz: number, fz: number): readonly [number, number] => {
    const toElbow = { ...upper, z: uz };
    const toWrist = { x: upper.x + fore.x, y: upper.y + fore.y, z: uz + fz };
    const elbow = 180 - angleBetween(toElbow, { ...fore, z: fz });
    return [elbow, angleBetween(toElbow, toWrist)];
  };
  const flat = angles(0, 0);
  const turned = [angles(upperZ, foreZ), angles(upperZ, -foreZ), angles(upperZ, 0), angles(0, foreZ)];
  const largest = (which: 0 | 1): number =>
    Math.max(...turned.map((angle) => Math.abs(angle[which] - flat[which])));
  return { elbowDeg: largest(0), elbowDropDeg: largest(1) };
}

/**
 * Cautions for those of `shown` whose segments appear clearly shorter than the longest of the same arm in `seen` (marks at
 * about the same distance from the camera, such as those of one stroke): one a frame.
 */
export function foreshortened(
  arm: ArmSide,
  seen: readonly FrameMark[],
  shown: readonly FrameMark[],
  joints: JointUncertaintyPx,
): readonly ViewCaution[] {
  const hints = foreshortening(seen, joints);
  if (hints.length === 0) return [];
  return shown.flatMap((mark) => {
    const tiltOf = (segment: 'upper-arm' | 'forearm'): number =>
      hints.find((hint) => hint.frame === mark.frame && hint.segment === segment)?.outOfPlaneDeg ?? 0;
    const tilt = { upperArmDeg: tiltOf('upper-arm'), forearmDeg: tiltOf('forearm') };
    const causeDeg = Math.max(tilt.upperArmDeg, tilt.forearmDeg);
    if (causeDeg === 0) return [];
    const { elbowDeg, elbowDropDeg } = biasOfTilt(mark, tilt);
    const caution = cautionOf(
      { code: 'foreshortened', arm, causeDeg, assumed: false, frames: [mark.frame] },
      {
        forearm: largestDirectionError(tilt.forearmDeg),
        upperArm: largestDirectionError(tilt.upperArmDeg),
        elbow: elbowDeg,
        elbowDrop: elbowDropDeg,
      },
      0.5,
    );
    return caution ? [caution] : [];
  });
}

interface Vector3 {
  readonly x: number;
  readonly y: number;
  readonly z: number;
}

/** Degrees, 0 to 180; atan2 of the cross product's length keeps its digits near 0 and 180. */
function angleBetween(a: Vector3, b: Vector3): number {
  const cross = Math.hypot(a.y * b.z - a.z * b.y, a.z * b.x - a.x * b.z, a.x * b.y - a.y * b.x);
  return toDegrees(Math.atan2(cross, a.x * b.x + a.y * b.y + a.z * b.z) as Radians);
}
