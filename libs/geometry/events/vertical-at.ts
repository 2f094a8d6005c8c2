import { anglesInAxes } from '../angles/arm-angles';
import type { ArmMark, FrameMark } from '../arm';
import type { BodyAxes } from '../calibration/plumb';
import type { Measured } from '../measures/measured';
import type { ReadingContext } from '../measures/reading-context';
import { type Outcome, ok, refused } from '../outcome';
import { normalInterval } from '../uncertainty/elbow-interval';
import { wrapDegrees } from '../units/angle';
import { eventInput } from './event-moment';
import { type FrameTimesUs, nearestFrame } from './frame-times';
import { propagateMarks, type PullMark, type PullMarks, pullMarks, type PullMarksReason } from './pull-marks';
import type { StrokeEvents } from './stroke';

/** The forearm counts as vertical within this many degrees, unless the coach says otherwise. */
export const VERTICAL_TOLERANCE_DEG = 15;

/** When the forearm first comes within the tolerance of vertical. `value` is a share of the pull, 0 catch to 1 exit. */
export interface VerticalAt extends Measured {
  /** The marked frames on either side; one frame twice when that frame's own mark is the first within tolerance. */
  readonly bracket: readonly [number, number];
  /** Distance in time between them as a share of the pull: the smaller, the better supported. */
  readonly gapShare: number;
}

export type VerticalAtReason =
  PullMarksReason | 'bad-tolerance' | 'too-few-marks' | 'vertical-before-first-mark' | 'vertical-not-reached';

/** Share of the pull (catch to exit, by time) at which the forearm first comes within tolerance, interpolated linearly. */
export function verticalAt(
  stroke: StrokeEvents,
  marks: readonly FrameMark[],
  times: FrameTimesUs,
  context: ReadingContext,
): Outcome<VerticalAt, VerticalAtReason> {
  const pull = pullMarks(stroke, marks, times, context);
  return pull.ok ? verticalAtOf(pull.value, times, context) : pull;
}

/** The same of marks already sorted out. */
export function verticalAtOf(
  pull: PullMarks,
  times: FrameTimesUs,
  context: ReadingContext,
): Outcome<VerticalAt, VerticalAtReason> {
  const tolerance = context.verticalToleranceDeg ?? VERTICAL_TOLERANCE_DEG;
  if (!(tolerance >= 0 && tolerance < 90)) return refused('bad-tolerance');
  const [first] = pull.marks;
  if (!first) return refused('too-few-marks');
  if (Math.abs(forearm(first.mark, pull.axes)) <= tolerance) {
    return first.mark.frame === pull.stroke.catch ? ok(atCatch(pull)) : refused('vertical-before-first-mark');
  }
  for (const [at, after] of pull.marks.entries()) {
    const before = pull.marks[at - 1];
    if (before && comesWithin(before.mark, after.mark, pull.axes, tolerance)) {
      return ok(between(pull, times, context, before, after, tolerance));
    }
  }
  return refused(pull.marks.length < 2 ? 'too-few-marks' : 'vertical-not-reached');
}

function forearm(mark: ArmMark, axes: BodyAxes): number {
  return anglesInAxes(mark, axes).forearmDeg;
}

/** Whether the forearm, turning the shorter way from one mark to the next, comes within tolerance of vertical. */
function comesWithin(before: ArmMark, after: ArmMark, axes: BodyAxes, tolerance: number): boolean {
  const share = crossing(before, after, axes, tolerance);
  return share > 0 && share <= 1;
}

/**
 * Where between two marks (0 the first, 1 the second) the edge of the tolerance on the first mark's side is met;
 * outside 0…1 when it is not met between them.
 */
function crossing(before: ArmMark, after: ArmMark, axes: BodyAxes, tolerance: number): number {
  const from = forearm(before, axes);
  const turn = wrapDegrees(forearm(after, axes) - from);
  return (Math.sign(from) * tolerance - from) / turn;
}

function between(
  pull: PullMarks,
  times: FrameTimesUs,
  context: ReadingContext,
  before: PullMark,
  after: PullMark,
  tolerance: number,
): VerticalAt {
  const { stroke, span } = pull;
  const events = (['catch', 'exit'] as const).map((event) => eventInput(stroke, event, times, context));
  const gapUs = after.timeUs - before.timeUs;
  const timeOf = (first: ArmMark, second: ArmMark, axes: BodyAxes): number =>
    before.timeUs + crossing(first, second, axes, tolerance) * gapUs;
  const timeUs = timeOf(before.mark, after.mark, pull.axes);
  const value = (timeUs - span.catchUs) / span.lengthUs;
  const u = propagateMarks(
    pull,
    [before.mark, after.mark],
    ([first, second], axes, [catchUs, exitUs]) => {
      if (!first || !second || catchUs === undefined || exitUs === undefined) return value;
      return (timeOf(first, second, axes) - catchUs) / (exitUs - catchUs);
    },
    events,
  );
  return {
    value,
    uncertainty: u.standard,
    interval: normalInterval(value, u.standard),
    parts: u.parts,
    frame: nearestFrame(times, timeUs, stroke.catch, stroke.exit),
    frames: [...new Set([stroke.catch, before.mark.frame, after.mark.frame, stroke.exit])],
    bracket: [before.mark.frame, after.mark.frame],
    gapShare: gapUs / span.lengthUs,
  };
}

/** Already within tolerance on the catch's own mark: vertical at 0, whatever the marks' spread. */
function atCatch({ stroke }: PullMarks): VerticalAt {
  const frame = stroke.catch;
  return {
    value: 0,
    uncertainty: 0,
    interval: { low: 0, high: 0 },
    parts: [],
    frame,
    frames: [frame],
    bracket: [frame, frame],
    gapShare: 0,
  };
}
