import type { BodyAxes } from '../calibration/plumb';
import type { ArmMark, FrameMark } from '../arm';
import { type Outcome, ok, refused } from '../outcome';
import type { MarkingContext } from '../uncertainty/arm-uncertainty';
import { combine, type CombinedUncertainty, type UncertaintyPart } from '../uncertainty/parts';
import type { FrameIndex } from '../units/frame-index';
import type { Microseconds } from '../units/microseconds';
import type { Share } from '../units/share';
import { eventInput, type EventOptions } from './event-moment';
import { type FrameTimesUs, nearestFrame } from './frame-times';
import {
  propagateMarks,
  type PullMark,
  type PullMarks,
  pullMarks,
  type PullMarksReason,
  shareOfPull,
  wristAhead,
} from './pull-marks';
import type { StrokeEvents } from './stroke';

/** The moment the hand passes under the shoulder. The wrist stands in for the hand. */
export interface MidPull {
  /** File time, interpolated between marked frames. */
  readonly timeUs: Microseconds;
  /** Standard uncertainty of the time from placing the joints and the roll, microseconds of file time. */
  readonly uncertaintyUs: number;
  readonly parts: readonly UncertaintyPart[];
  /** Place in the pull, 0 catch to 1 exit. */
  readonly share: Share;
  /** Standard uncertainty of that place, with the choice of catch and exit, and what it is made of. */
  readonly shareUncertainty: number;
  readonly shareParts: readonly UncertaintyPart[];
  /** The frame nearest in time. */
  readonly frame: FrameIndex;
  /** The marked frames on either side. */
  readonly frames: readonly [number, number];
  /** Distance in time between them as a share of the pull: the smaller, the better supported. */
  readonly gapShare: number;
}

export type MidPullReason =
  PullMarksReason | 'too-few-marks' | 'hand-behind-at-first-mark' | 'hand-never-under-shoulder';

/** Mid-pull of a stroke: the first time, between catch and exit, that the wrist is no longer ahead of the shoulder. */
export function midPull(
  stroke: StrokeEvents,
  marks: readonly FrameMark[],
  times: FrameTimesUs,
  context: MarkingContext,
): Outcome<MidPull, MidPullReason> {
  const pull = pullMarks(stroke, marks, times, context);
  return pull.ok ? midPullOf(pull.value, times) : pull;
}

/** Two neighbouring marks between which the hand passes under the shoulder. */
export interface MidPullBracket {
  readonly before: PullMark;
  readonly after: PullMark;
}

/** Mid-pull of marks already sorted out. */
export function midPullOf(
  pull: PullMarks,
  times: FrameTimesUs,
  options: EventOptions = {},
): Outcome<MidPull, MidPullReason> {
  const found = midPullBracket(pull);
  if (!found.ok) return found;
  const bracket = found.value;
  const { before, after } = bracket;
  const timeUs = crossingTime(bracket, before.mark, after.mark, pull.axes);
  const u = propagateMarks(pull, [before.mark, after.mark], ([first, second], axes) =>
    first && second ? crossingTime(bracket, first, second, axes) : timeUs,
  );
  const share = shareOfPull(pull.span, timeUs);
  const shareU = shareUncertainty(pull, share, u.parts, times, options);
  return ok({
    timeUs: timeUs as Microseconds,
    uncertaintyUs: u.standard,
    parts: u.parts,
    share: share as Share,
    shareUncertainty: shareU.standard,
    shareParts: shareU.parts,
    frame: nearestFrame(times, timeUs, pull.stroke.catch, pull.stroke.exit),
    frames: [before.mark.frame, after.mark.frame],
    gapShare: (after.timeUs - before.timeUs) / pull.span.lengthUs,
  });
}

/**
 * Of s = (m − c)/(e − c) of mid-pull, catch and exit. With L = e − c,
 * u(s)² = (u_m² + (1 − s)²·u_c² + s²·u_e²)/L² (JCGM 100:2008, eq. (10)).
 */
function shareUncertainty(
  { stroke, span }: PullMarks,
  share: number,
  mid: readonly UncertaintyPart[],
  times: FrameTimesUs,
  options: EventOptions,
): CombinedUncertainty {
  const of = (event: 'catch' | 'exit', slope: number) => {
    const { source, standard } = eventInput(stroke, event, times, options);
    return { source, alone: Math.abs(slope * standard) / span.lengthUs };
  };
  return combine([
    ...mid.map(({ source, alone }) => ({ source, alone: alone / span.lengthUs })),
    of('catch', 1 - share),
    of('exit', share),
  ]);
}

export function midPullBracket(pull: PullMarks): Outcome<MidPullBracket, MidPullReason> {
  const [first] = pull.marks;
  if (!first || pull.marks.length < 2) return refused('too-few-marks');
  if (wristAhead(first.mark, pull.axes) <= 0) return refused('hand-behind-at-first-mark');
  const at = pull.marks.findIndex(({ mark }) => wristAhead(mark, pull.axes) <= 0);
  const before = pull.marks[at - 1];
  const after = pull.marks[at];
  return before && after ? ok({ before, after }) : refused('hand-never-under-shoulder');
}

/** Time at which the straight line between the two marks' wrist-ahead distances meets zero. */
export function crossingTime(
  bracket: MidPullBracket,
  first: ArmMark,
  second: ArmMark,
  axes: BodyAxes,
): number {
  const from = wristAhead(first, axes);
  const to = wristAhead(second, axes);
  const { before, after } = bracket;
  return before.timeUs + (from / (from - to)) * (after.timeUs - before.timeUs);
}
