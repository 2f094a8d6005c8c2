import type { ArmSide, FrameMark, TravelDirection } from '../arm';
import { apparentScale } from '../calibration/projection';
import { armAngleUncertainty } from '../uncertainty/arm-uncertainty';
import { cautionOf, type ViewCaution } from './caution';
import { type CameraView, isFromTheSide, type ViewContext } from './view-context';

/** How much more loosely joints behind water, bubbles and the body are placed. Our own assumption; no source. */
const HIDDEN_SPREAD = 2;
/** Two-sided 95 % of a normal distribution. */
const COVERAGE = 1.96;
/** Smaller than this a caution says nothing that the ± does not. */
const LEAST_DEG = 1;

/** An arm's plane lies about this far before or behind the body's, half a shoulder's width and some; no source. */
export const ARM_FROM_BODY_M = 0.25;
/** Distance from camera to swimmer taken where none is known; common practice, no source. */
export const ASSUMED_DISTANCE_M = 5;

/**
 * The arm that is nearer to the camera: seen from the side, a swimmer who travels to the right shows the right side. Null
 * where the view does not tell. Holds for a picture that is not mirrored.
 */
export function nearArm(view: CameraView, travel: TravelDirection): ArmSide | null {
  return isFromTheSide(view) ? travel : null;
}

/**
 * How much longer the same length appears on the near arm than on the far one, as a share:
 * D/(D − a) over D/(D + a), less 1; D distance to the body, a from body to either arm, metres.
 */
export function nearFarLengthShare(distanceM = ASSUMED_DISTANCE_M, armM = ARM_FROM_BODY_M): number {
  return apparentScale(distanceM, armM) / apparentScale(distanceM, -armM) - 1;
}

/**
 * The far arm: its angles are not shifted by being smaller in the picture, but its joints are less sure. The size is what a
 * spread twice the near arm's would add, 95 %: 1.96·√(u₂² − u₁²).
 */
export function farArm(context: ViewContext, arm: ArmSide, mark: FrameMark): ViewCaution | null {
  const near = nearArm(context.view, context.travel);
  if (near === null || near === arm) return null;
  const { shoulder, elbow, wrist } = context.jointUncertaintyPx;
  const looser = {
    shoulder: shoulder * HIDDEN_SPREAD,
    elbow: elbow * HIDDEN_SPREAD,
    wrist: wrist * HIDDEN_SPREAD,
  };
  const plumbPointUncertaintyPx = context.plumbPointUncertaintyPx ?? elbow;
  const usual = armAngleUncertainty(mark, { ...context, plumbPointUncertaintyPx });
  const hidden = armAngleUncertainty(mark, {
    ...context,
    plumbPointUncertaintyPx,
    jointUncertaintyPx: looser,
  });
  if (!usual.ok || !hidden.ok) return null;
  const added = (angle: 'forearmDeg' | 'upperArmDeg' | 'elbowDeg' | 'elbowDropDeg'): number =>
    COVERAGE * Math.sqrt(Math.max(0, hidden.value[angle] ** 2 - usual.value[angle] ** 2));
  return cautionOf(
    { code: 'far-arm', arm, causeDeg: null, assumed: true, frames: [mark.frame] },
    {
      forearm: added('forearmDeg'),
      upperArm: added('upperArmDeg'),
      elbow: added('elbowDeg'),
      elbowDrop: added('elbowDropDeg'),
    },
    LEAST_DEG,
  );
}
