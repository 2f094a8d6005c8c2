import { interiorElbow } from '../angles/arm-angles';
import type { ArmMark, FrameMark } from '../arm';
import type { BodyAxes } from '../calibration/plumb';
import type { Measured } from '../measures/measured';
import { type Outcome, ok } from '../outcome';
import type { MarkingContext } from '../uncertainty/arm-uncertainty';
import { elbowInterval } from '../uncertainty/elbow-interval';
import { wrapDegrees } from '../units/angle';
import { type FrameTimesUs, nearestFrame } from './frame-times';
import { crossingTime, midPullBracket, type MidPullReason } from './mid-pull';
import { propagateMarks, type PullMarks, pullMarks, readSignedElbow } from './pull-marks';
import type { StrokeEvents } from './stroke';

/** Interior elbow angle (degrees, 180 straight) at mid-pull, interpolated between the marked frames on either side. */
export interface ElbowAtMidPull extends Measured {
  /** The same before it folds at straight, 0 to 360: what is to be averaged. */
  readonly signedDeg: number;
  /** True above 180 − 2u: a straight arm cannot be told from a bent one there. */
  readonly nearStraight: boolean;
}

export function elbowAtMidPull(
  stroke: StrokeEvents,
  marks: readonly FrameMark[],
  times: FrameTimesUs,
  context: MarkingContext,
): Outcome<ElbowAtMidPull, MidPullReason> {
  const pull = pullMarks(stroke, marks, times, context);
  return pull.ok ? elbowAtMidPullOf(pull.value, times) : pull;
}

/** The same of marks already sorted out. */
export function elbowAtMidPullOf(
  pull: PullMarks,
  times: FrameTimesUs,
): Outcome<ElbowAtMidPull, MidPullReason> {
  const found = midPullBracket(pull);
  if (!found.ok) return found;
  const { before, after } = found.value;
  const span = after.timeUs - before.timeUs;
  const elbow = (first: ArmMark, second: ArmMark, axes: BodyAxes): number => {
    const share = (crossingTime(found.value, first, second, axes) - before.timeUs) / span;
    const from = readSignedElbow(first, axes);
    return from + share * wrapDegrees(readSignedElbow(second, axes) - from);
  };
  const signedDeg = elbow(before.mark, after.mark, pull.axes);
  const u = propagateMarks(pull, [before.mark, after.mark], ([first, second], axes) =>
    first && second ? elbow(first, second, axes) : signedDeg,
  );
  const value = interiorElbow(signedDeg);
  const timeUs = crossingTime(found.value, before.mark, after.mark, pull.axes);
  return ok({
    value,
    signedDeg,
    nearStraight: value > 180 - 2 * u.standard,
    uncertainty: u.standard,
    interval: elbowInterval(value, u.standard),
    parts: u.parts,
    frame: nearestFrame(times, timeUs, pull.stroke.catch, pull.stroke.exit),
    frames: [before.mark.frame, after.mark.frame],
  });
}
