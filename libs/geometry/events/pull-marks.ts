import { type ArmAngles, anglesInAxes, signedElbow } from '../angles/arm-angles';
import { type ArmMark, type ArmMarkReason, checkArmMark, type FrameMark, type Joint } from '../arm';
import { bodyAxes, type BodyAxes, bodyVector, rollUncertaintyDeg, turnedAxes } from '../calibration/plumb';
import { type Outcome, ok, refused } from '../outcome';
import {
  armAngleUncertainty,
  type ArmAngleUncertainty,
  type ArmUncertaintyReason,
  type MarkingContext,
} from '../uncertainty/arm-uncertainty';
import { checkJointUncertainty } from '../uncertainty/joint-uncertainty';
import type { CombinedUncertainty } from '../uncertainty/parts';
import { propagate, type UncertainInput } from '../uncertainty/propagate';
import { type FrameTimesUs, frameTimeUs } from './frame-times';
import { type PullReason, type PullSpan, pullSpan, type StrokeEvents } from './stroke';

/** A usable mark between catch and exit. */
export interface PullMark {
  readonly mark: FrameMark;
  readonly timeUs: number;
  readonly angles: ArmAngles;
  readonly uncertainty: ArmAngleUncertainty;
}

/** The marks of a stroke that lie in its pull, in order, with what is needed to read them. */
export interface PullMarks {
  readonly stroke: StrokeEvents;
  readonly span: PullSpan;
  readonly axes: BodyAxes;
  readonly rollUncertaintyRad: number;
  readonly context: MarkingContext;
  readonly marks: readonly PullMark[];
  /** Marks in the pull that cannot be read, with the reason. */
  readonly unusable: readonly { readonly frame: number; readonly reason: ArmMarkReason }[];
}

export type PullMarksReason = PullReason | ArmUncertaintyReason;

/** Sorts out the marks (both ends included) of the pull of a stroke. Marks outside it are left aside. */
export function pullMarks(
  stroke: StrokeEvents,
  marks: readonly FrameMark[],
  times: FrameTimesUs,
  context: MarkingContext,
): Outcome<PullMarks, PullMarksReason> {
  const span = pullSpan(stroke, times);
  if (!span.ok) return span;
  const axes = bodyAxes(context.plumb, context.travel);
  if (!axes.ok) return axes;
  const joints = checkJointUncertainty(context.jointUncertaintyPx);
  if (!joints.ok) return joints;
  const rollDeg = rollUncertaintyDeg(context.plumb, context.plumbPointUncertaintyPx ?? joints.value.elbow);
  if (!rollDeg.ok) return rollDeg;

  const usable: PullMark[] = [];
  const unusable: { frame: number; reason: ArmMarkReason }[] = [];
  for (const mark of [...marks].sort((a, b) => a.frame - b.frame)) {
    if (mark.frame < stroke.catch || mark.frame > stroke.exit) continue;
    const time = frameTimeUs(times, mark.frame);
    if (!time.ok) continue;
    const checked = checkArmMark(mark);
    if (!checked.ok) {
      unusable.push({ frame: mark.frame, reason: checked.reason });
      continue;
    }
    const uncertainty = armAngleUncertainty(mark, context);
    if (!uncertainty.ok) return refused(uncertainty.reason);
    const angles = anglesInAxes(mark, axes.value);
    usable.push({ mark, timeUs: time.value, angles, uncertainty: uncertainty.value });
  }
  const rollUncertaintyRad = (rollDeg.value * Math.PI) / 180;
  return ok({
    stroke,
    span: span.value,
    axes: axes.value,
    rollUncertaintyRad,
    context,
    marks: usable,
    unusable,
  });
}

/** Place in the pull: 0 at the catch, 1 at the exit, by time. */
export function shareOfPull(span: PullSpan, timeUs: number): number {
  return (timeUs - span.catchUs) / span.lengthUs;
}

/** The four angles of a mark that has been checked. */
export function readMark(mark: ArmMark, axes: BodyAxes): ArmAngles {
  return anglesInAxes(mark, axes);
}

/** Elbow angle that does not fold at straight, 0 to 360. */
export function readSignedElbow(mark: ArmMark, axes: BodyAxes): number {
  const { forearmDeg, upperArmDeg } = anglesInAxes(mark, axes);
  return signedElbow(forearmDeg, upperArmDeg);
}

/** How far the wrist is ahead of the shoulder, pixels. */
export function wristAhead(mark: ArmMark, axes: BodyAxes): number {
  return bodyVector(axes, mark.shoulder, mark.wrist).f;
}

const JOINTS: readonly Joint[] = ['shoulder', 'elbow', 'wrist'];

/**
 * Propagates the placing of every joint of some marks, and the roll they share, to a number computed from them.
 * `more` adds further inputs, handed to `compute` after the marks in the order given.
 */
export function propagateMarks(
  pull: Pick<PullMarks, 'axes' | 'rollUncertaintyRad' | 'context'>,
  marks: readonly ArmMark[],
  compute: (marks: readonly ArmMark[], axes: BodyAxes, more: readonly number[]) => number,
  more: readonly UncertainInput[] = [],
): CombinedUncertainty {
  const joints = pull.context.jointUncertaintyPx;
  const coordinates = marks.flatMap((mark) =>
    JOINTS.flatMap((joint) => [
      { source: `${joint}-mark` as const, value: mark[joint].x, standard: joints[joint] },
      { source: `${joint}-mark` as const, value: mark[joint].y, standard: joints[joint] },
    ]),
  );
  const roll: UncertainInput = { source: 'roll', value: 0, standard: pull.rollUncertaintyRad };
  return propagate([...coordinates, roll, ...more], (values) => {
    const moved = marks.map((_, at) => markAt(values, at * 6));
    const rest = values.slice(marks.length * 6);
    return compute(moved, turnedAxes(pull.axes, rest[0] ?? 0), rest.slice(1));
  });
}

function markAt(values: readonly number[], from: number): ArmMark {
  const point = (at: number) => ({ x: values[from + at] ?? 0, y: values[from + at + 1] ?? 0 });
  return { shoulder: point(0), elbow: point(2), wrist: point(4) };
}
