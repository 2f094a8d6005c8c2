import { type ArmMark, type ArmMarkReason, checkArmMark, type TravelDirection } from '../arm';
import { bodyAxes, type BodyAxes, bodyVector, type PlumbLine, type PlumbReason } from '../calibration/plumb';
import { type Outcome, ok } from '../outcome';
import { type Degrees, directionDegrees, wrapDegrees } from '../units/angle';

/** Angles of the arm as projected into the picture. Signs do not depend on the travel direction nor on the arm. */
export interface ArmAngles {
  /** atan2(f, d) of wrist − elbow, (−180, 180]: 0 vertical, + hand ahead of the elbow, 90 level. */
  readonly forearmDeg: Degrees;
  /** atan2(f, d) of elbow − shoulder, (−180, 180]: 0 vertical, + elbow ahead of the shoulder. */
  readonly upperArmDeg: Degrees;
  /** Interior angle at the elbow, 0 to 180: 180 straight. */
  readonly elbowDeg: Degrees;
  /** Angle at the shoulder from the wrist to the elbow, (−180, 180]: + elbow on the trailing, lower side of the line. */
  readonly elbowDropDeg: Degrees;
}

export interface ClipAxes {
  readonly travel: TravelDirection;
  /** null: the picture's own vertical is assumed. */
  readonly plumb: PlumbLine | null;
}

export type ArmAnglesReason = ArmMarkReason | PlumbReason;

/** The four angles of a mark. */
export function armAngles(mark: ArmMark, clip: ClipAxes): Outcome<ArmAngles, ArmAnglesReason> {
  const axes = bodyAxes(clip.plumb, clip.travel);
  if (!axes.ok) return axes;
  const checked = checkArmMark(mark);
  return checked.ok ? ok(anglesInAxes(checked.value, axes.value)) : checked;
}

/** The four angles of a mark that has been checked, in axes already known. */
export function anglesInAxes(mark: ArmMark, axes: BodyAxes): ArmAngles {
  const forearm = bodyVector(axes, mark.elbow, mark.wrist);
  const elbow = bodyVector(axes, mark.shoulder, mark.elbow);
  const wrist = bodyVector(axes, mark.shoulder, mark.wrist);
  const forearmDeg = directionDegrees(forearm.f, forearm.d);
  const upperArmDeg = directionDegrees(elbow.f, elbow.d);
  const elbowDropDeg = directionDegrees(
    wrist.f * elbow.d - wrist.d * elbow.f,
    wrist.f * elbow.f + wrist.d * elbow.d,
  );
  return {
    forearmDeg,
    upperArmDeg,
    elbowDeg: interiorElbow(signedElbow(forearmDeg, upperArmDeg)),
    elbowDropDeg,
  };
}

/**
 * Elbow angle that does not fold at straight, 0 to 360: 180 straight, below 180 with the forearm turned back from the
 * upper arm's line, above 180 with it turned ahead. Averages and intervals near straight are taken of this one.
 */
export function signedElbow(forearmDeg: number, upperArmDeg: number): Degrees {
  return (180 - wrapDegrees(upperArmDeg - forearmDeg)) as Degrees;
}

/** Interior angle (0 to 180) of a signed elbow angle. */
export function interiorElbow(signedDeg: number): Degrees {
  return (180 - Math.abs(wrapDegrees(signedDeg - 180))) as Degrees;
}
