import { cameraRoll, rollUncertaintyDeg } from '../calibration/plumb';
import { cautionOf, type CautionCode, type ViewCaution } from './caution';
import type { ViewContext } from './view-context';

const COVERAGE = 1.96;
/** A plumb surer than this (95 %) needs no word. */
const LEAST_DEG = 1;
/** From this lean on the picture is said to stand crooked, although the plumb takes it out. */
const LEANS_FROM_DEG = 5;

/**
 * What is uncertain about the vertical of a clip, 95 %: 1.96·u(ρ), with u(ρ) = √2·u/L of a drawn plumb. Forearm and upper
 * arm carry it in full; elbow and elbow drop are angles between segments, in which it cancels. Only the roll can be read
 * from a plumb: a camera that also looks up or down is not seen by it.
 */
export function cameraTilt(context: ViewContext): ViewCaution | null {
  const roll = cameraRoll(context.plumb);
  const standard = rollUncertaintyDeg(
    context.plumb,
    context.plumbPointUncertaintyPx ?? context.jointUncertaintyPx.elbow,
  );
  if (!roll.ok || !standard.ok) return null;
  const sizeDeg = COVERAGE * standard.value;
  const leanDeg = Math.abs(roll.value.rollDeg);
  const { assumed } = roll.value;
  const caution = (code: CautionCode, least: number): ViewCaution | null =>
    cautionOf(
      { code, arm: null, causeDeg: assumed ? null : leanDeg, assumed, frames: [] },
      { forearm: sizeDeg, upperArm: sizeDeg },
      least,
    );
  if (assumed) return caution('plumb-assumed', 0);
  if (sizeDeg >= LEAST_DEG) return caution('plumb-short', LEAST_DEG);
  return leanDeg >= LEANS_FROM_DEG ? caution('camera-leans', 0) : null;
}
