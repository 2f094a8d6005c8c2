import type { FrameMark } from '../arm';
import type { Measured } from '../measures/measured';
import { type Outcome, ok, refused } from '../outcome';
import type { MarkingContext } from '../uncertainty/arm-uncertainty';
import { largestInterval } from '../uncertainty/largest-of';
import type { FrameTimesUs } from './frame-times';
import { type PullMarks, pullMarks, type PullMarksReason } from './pull-marks';
import type { StrokeEvents } from './stroke';

export type PeakDropReason = PullMarksReason | 'too-few-marks';

/**
 * Largest elbow drop (degrees, + dropped) over the marked frames from catch to exit. The value is the reading on its
 * frame; the largest of several readings is on average larger than the largest true one, so the interval sits lower.
 */
export function peakDrop(
  stroke: StrokeEvents,
  marks: readonly FrameMark[],
  times: FrameTimesUs,
  context: MarkingContext,
): Outcome<Measured, PeakDropReason> {
  const pull = pullMarks(stroke, marks, times, context);
  return pull.ok ? peakDropOf(pull.value) : pull;
}

/** The same of marks already sorted out. */
export function peakDropOf(pull: PullMarks): Outcome<Measured, PeakDropReason> {
  const read = pull.marks.map(({ mark, angles, uncertainty }) => ({
    frame: mark.frame,
    value: angles.elbowDropDeg,
    standard: uncertainty.elbowDropDeg,
    parts: uncertainty.parts.elbowDropDeg,
  }));
  const [first, ...others] = read;
  if (!first) return refused('too-few-marks');
  const peak = read.reduce((best, next) => (next.value > best.value ? next : best), first);
  return ok({
    value: peak.value,
    uncertainty: peak.standard,
    interval: largestInterval([first, ...others]),
    parts: peak.parts,
    frame: peak.frame,
    frames: read.map(({ frame }) => frame),
  });
}
