import type { ArmMarkReason, FrameMark } from '../arm';
import type { FrameTimesUs } from '../events/frame-times';
import { type ElbowAtMidPull, elbowAtMidPullOf } from '../events/elbow-at-mid-pull';
import { type SpeedReason, swimSpeed } from '../events/known-distance';
import { type MidPull, midPullOf, type MidPullReason } from '../events/mid-pull';
import { peakDropOf, type PeakDropReason } from '../events/peak-drop';
import { type Phases, type PhasesReason, strokePhases } from '../events/phases';
import { type PullMarks, pullMarks, type PullMarksReason, shareOfPull } from '../events/pull-marks';
import { strokeLength } from '../events/stroke-length';
import { strokeRate, type StrokeRate, type StrokeRateReason } from '../events/stroke-rate';
import type { StrokeEvents } from '../events/stroke';
import { type VerticalAt, verticalAtOf, type VerticalAtReason } from '../events/vertical-at';
import { type Outcome, ok, refused } from '../outcome';
import type { Measured } from './measured';
import type { ReadingContext } from './reading-context';

/** A marked frame of the pull on a curve. */
export interface CurvePoint {
  readonly frame: number;
  /** Place in the pull, 0 catch to 1 exit, by time. */
  readonly share: number;
  readonly deg: number;
  /** Standard uncertainty, degrees. */
  readonly uncertaintyDeg: number;
}

/** Everything measured on one stroke. What the marks do not support is a reason, never a number. */
export interface StrokeMeasures {
  readonly phases: Outcome<Phases, PhasesReason>;
  /** Cycles a minute of this cycle alone, world time. */
  readonly strokeRate: Outcome<StrokeRate, StrokeRateReason>;
  /** Metres per cycle and speed × length, m²/s: the clip's known distance and this cycle's duration. */
  readonly strokeLength: Outcome<Measured, StrokeLengthReason>;
  readonly strokeIndex: Outcome<Measured, StrokeLengthReason>;
  readonly midPull: Outcome<MidPull, MidPullReason>;
  readonly verticalAt: Outcome<VerticalAt, VerticalAtReason>;
  readonly peakDrop: Outcome<Measured, PeakDropReason>;
  readonly elbowAtMidPull: Outcome<ElbowAtMidPull, MidPullReason>;
  /** Entry to next entry in world seconds; null while the next entry is not known. */
  readonly durationS: number | null;
  /** Forearm over the marked frames from catch to exit, in order. */
  readonly forearmCurve: readonly CurvePoint[];
  /** Elbow drop over the same frames. */
  readonly dropCurve: readonly CurvePoint[];
  /** Marked frames of the pull that could not be read. */
  readonly unusable: readonly { readonly frame: number; readonly reason: ArmMarkReason }[];
}

export type StrokeLengthReason = StrokeRateReason | SpeedReason;

/**
 * The measures of one stroke from its events and the marks of that arm (others than this stroke's are left aside).
 * Desk and server call the same function, so that they cannot disagree.
 */
export function strokeMeasures(
  stroke: StrokeEvents,
  marks: readonly FrameMark[],
  times: FrameTimesUs,
  context: ReadingContext,
): StrokeMeasures {
  const pull = pullMarks(stroke, marks, times, context);
  const midPull = pull.ok ? midPullOf(pull.value, times, context) : pull;
  const phases = strokePhases(stroke, midPull.ok ? midPull.value : null, times, context);
  const rates = ratesOf(stroke, times, context);
  const common = { phases, midPull, ...rates, durationS: phases.ok ? phases.value.cycleS : null };
  if (!pull.ok) return { ...common, ...nothing(pull.reason) };
  return {
    ...common,
    verticalAt: verticalAtOf(pull.value, times, context),
    peakDrop: peakDropOf(pull.value),
    elbowAtMidPull: elbowAtMidPullOf(pull.value, times),
    forearmCurve: curve(pull.value, 'forearmDeg'),
    dropCurve: curve(pull.value, 'elbowDropDeg'),
    unusable: pull.value.unusable,
  };
}

type Timed = 'phases' | 'midPull' | 'durationS' | 'strokeRate' | 'strokeLength' | 'strokeIndex';

function ratesOf(
  stroke: StrokeEvents,
  times: FrameTimesUs,
  context: ReadingContext,
): Pick<StrokeMeasures, 'strokeRate' | 'strokeLength' | 'strokeIndex'> {
  const rate = strokeRate([stroke], times, context);
  const speed = swimSpeed(context.distance ?? null, times, context);
  if (!speed.ok) return { strokeRate: rate, strokeLength: speed, strokeIndex: speed };
  if (!rate.ok) return { strokeRate: rate, strokeLength: rate, strokeIndex: rate };
  const both = strokeLength(speed.value, rate.value);
  if (!both.ok) return { strokeRate: rate, strokeLength: both, strokeIndex: both };
  return { strokeRate: rate, strokeLength: ok(both.value.length), strokeIndex: ok(both.value.index) };
}

function nothing(reason: PullMarksReason): Omit<StrokeMeasures, Timed> {
  const none = refused(reason);
  return {
    verticalAt: none,
    peakDrop: none,
    elbowAtMidPull: none,
    forearmCurve: [],
    dropCurve: [],
    unusable: [],
  };
}

function curve(pull: PullMarks, angle: 'forearmDeg' | 'elbowDropDeg'): CurvePoint[] {
  return pull.marks.map(({ mark, timeUs, angles, uncertainty }) => ({
    frame: mark.frame,
    share: shareOfPull(pull.span, timeUs),
    deg: angles[angle],
    uncertaintyDeg: uncertainty[angle],
  }));
}
