import { armAngles, type ArmAnglesReason, type ClipAxes, signedElbow } from '../angles/arm-angles';
import type { ArmMark } from '../arm';
import { rollUncertaintyDeg } from '../calibration/plumb';
import { type Outcome, ok } from '../outcome';
import { distance } from '../points/video-point';
import type { Degrees } from '../units/angle';
import { elbowInterval, type Interval } from './elbow-interval';
import {
  checkJointUncertainty,
  type JointUncertaintyPx,
  type JointUncertaintyReason,
} from './joint-uncertainty';
import { combine, type CombinedUncertainty, type UncertaintyPart, type UncertaintySource } from './parts';

export type { Interval } from './elbow-interval';
export { defaultJointUncertaintyPx, type JointUncertaintyPx } from './joint-uncertainty';

/** Everything the uncertainty of a reading depends on beside the mark itself. */
export interface MarkingContext extends ClipAxes {
  readonly jointUncertaintyPx: JointUncertaintyPx;
  /** Standard uncertainty of an end of the plumb line, pixels per coordinate; the elbow's when left out. */
  readonly plumbPointUncertaintyPx?: number;
}

/** Standard uncertainties of the four angles, degrees, with what they are made of. */
export interface ArmAngleUncertainty {
  readonly forearmDeg: Degrees;
  readonly upperArmDeg: Degrees;
  /** Of the signed elbow angle; near straight do not write ± but use {@link elbowIntervalDeg}. */
  readonly elbowDeg: Degrees;
  readonly elbowDropDeg: Degrees;
  /** Elbow angle that does not fold at straight, 0 to 360, 180 straight: what is to be averaged. */
  readonly signedElbowDeg: Degrees;
  /** True when the elbow reads above 180 − 2u: a straight arm cannot be told from a bent one there. */
  readonly nearStraight: boolean;
  /** 95 % interval of the elbow angle, within 0 to 180; lopsided near straight. */
  readonly elbowIntervalDeg: Interval;
  /** The contributions of each angle, largest first. Roll is absent where it cancels. */
  readonly parts: {
    readonly forearmDeg: readonly UncertaintyPart[];
    readonly upperArmDeg: readonly UncertaintyPart[];
    readonly elbowDeg: readonly UncertaintyPart[];
    readonly elbowDropDeg: readonly UncertaintyPart[];
  };
}

export type ArmUncertaintyReason = ArmAnglesReason | JointUncertaintyReason;

/** An angle cannot be less certain than "any direction": a rectangular spread over the full circle. */
const ANY_DIRECTION_DEG = 180 / Math.sqrt(3);

/**
 * Standard uncertainties of a mark's angles, first order (JCGM 100:2008, eq. (10)). For a segment of length L,
 * u = √(u₁² + u₂²)/L with the roll added; for the angle at a joint J between P and Q,
 * u² = u_P²/p² + u_Q²/q² + u_J²·|PQ|²/(p²q²), which holds the covariance of the shared joint and in which roll cancels.
 */
export function armAngleUncertainty(
  mark: ArmMark,
  context: MarkingContext,
): Outcome<ArmAngleUncertainty, ArmUncertaintyReason> {
  const angles = armAngles(mark, context);
  if (!angles.ok) return angles;
  const joints = checkJointUncertainty(context.jointUncertaintyPx);
  if (!joints.ok) return joints;
  const roll = rollUncertaintyDeg(context.plumb, context.plumbPointUncertaintyPx ?? joints.value.elbow);
  if (!roll.ok) return roll;

  const { forearmDeg, upperArmDeg, elbowDeg } = angles.value;
  const forearm = segment(mark, ['elbow', 'wrist'], joints.value, roll.value);
  const upperArm = segment(mark, ['shoulder', 'elbow'], joints.value, roll.value);
  const elbow = jointAngle(mark, 'elbow', ['shoulder', 'wrist'], joints.value);
  const drop = jointAngle(mark, 'shoulder', ['elbow', 'wrist'], joints.value);
  return ok({
    forearmDeg: capped(forearm),
    upperArmDeg: capped(upperArm),
    elbowDeg: capped(elbow),
    elbowDropDeg: capped(drop),
    signedElbowDeg: signedElbow(forearmDeg, upperArmDeg),
    nearStraight: elbowDeg > 180 - 2 * elbow.standard,
    elbowIntervalDeg: elbowInterval(elbowDeg, capped(elbow)),
    parts: {
      forearmDeg: forearm.parts,
      upperArmDeg: upperArm.parts,
      elbowDeg: elbow.parts,
      elbowDropDeg: drop.parts,
    },
  });
}

type JointName = keyof JointUncertaintyPx;

const SOURCE: Record<JointName, UncertaintySource> = {
  shoulder: 'shoulder-mark',
  elbow: 'elbow-mark',
  wrist: 'wrist-mark',
};

function inDegrees(px: number, lengthPx: number): number {
  return ((px / lengthPx) * 180) / Math.PI;
}

function capped(u: CombinedUncertainty): Degrees {
  return Math.min(u.standard, ANY_DIRECTION_DEG) as Degrees;
}

/** Direction of the segment between two joints. */
function segment(
  mark: ArmMark,
  ends: readonly [JointName, JointName],
  joints: JointUncertaintyPx,
  rollDeg: number,
): CombinedUncertainty {
  const length = distance(mark[ends[0]], mark[ends[1]]);
  return combine([
    ...ends.map((end) => ({ source: SOURCE[end], alone: inDegrees(joints[end], length) })),
    { source: 'roll', alone: rollDeg },
  ]);
}

/** Angle at a joint between the directions to the other two. */
function jointAngle(
  mark: ArmMark,
  at: JointName,
  others: readonly [JointName, JointName],
  joints: JointUncertaintyPx,
): CombinedUncertainty {
  const [one, two] = others;
  const toOne = distance(mark[at], mark[one]);
  const toTwo = distance(mark[at], mark[two]);
  const across = distance(mark[one], mark[two]);
  return combine([
    { source: SOURCE[one], alone: inDegrees(joints[one], toOne) },
    { source: SOURCE[two], alone: inDegrees(joints[two], toTwo) },
    { source: SOURCE[at], alone: inDegrees(joints[at] * across, toOne * toTwo) },
  ]);
}
