import { type Outcome, ok, refused } from '../outcome';
import { type Interval, normalInterval } from '../uncertainty/elbow-interval';
import type { UncertaintyPart } from '../uncertainty/parts';
import { propagate } from '../uncertainty/propagate';
import { worldSeconds } from '../units/microseconds';
import { eventTimeUncertaintyUs, type FrameTimesUs } from './frame-times';
import type { PhaseOptions } from './phases';
import { checkOrder, type OrderReason, type StrokeEvents } from './stroke';

/** Stroke cycles per minute of one arm; a cycle is two arm strokes. */
export interface StrokeRate {
  readonly cyclesPerMinute: number;
  readonly uncertainty: number;
  readonly interval: Interval;
  readonly parts: readonly UncertaintyPart[];
  readonly cycles: number;
  /** World seconds of all cycles together, and its standard uncertainty. */
  readonly durationS: number;
  readonly durationUncertaintyS: number;
  /** Entries and next entries used. */
  readonly frames: readonly number[];
}

export type StrokeRateReason = OrderReason | 'no-complete-cycle' | 'no-duration' | 'bad-capture-rate';

/**
 * 60·cycles / their duration, over the strokes of one arm that have a next entry. An entry that ends one cycle and
 * begins the next counts once, so that its error cancels.
 */
export function strokeRate(
  strokes: readonly StrokeEvents[],
  times: FrameTimesUs,
  options: PhaseOptions = {},
): Outcome<StrokeRate, StrokeRateReason> {
  const factor = options.captureRateFactor ?? 1;
  if (!(factor > 0 && Number.isFinite(factor))) return refused('bad-capture-rate');
  const cycles: [number, number][] = [];
  for (const stroke of strokes) {
    const order = checkOrder(stroke, times.length);
    if (!order.ok) return order;
    if (stroke.nextEntry !== null) cycles.push([stroke.entry, stroke.nextEntry]);
  }
  if (cycles.length === 0) return refused('no-complete-cycle');
  const frames = [...new Set(cycles.flat())].sort((a, b) => a - b);
  const places = cycles.map(([from, to]) => [frames.indexOf(from), frames.indexOf(to)] as const);
  const lengthUs = (at: readonly number[]): number =>
    places.reduce((sum, [from, to]) => sum + (at[to] ?? 0) - (at[from] ?? 0), 0);
  const inputs = frames.map((frame) => ({
    source: 'entry-frame' as const,
    value: times[frame] ?? 0,
    standard: eventTimeUncertaintyUs(times, frame, options.eventErrorFrames),
  }));
  const totalUs = lengthUs(inputs.map(({ value }) => value));
  if (!(totalUs > 0)) return refused('no-duration');
  const rateOf = (us: number): number => (60 * cycles.length) / worldSeconds(us, factor);
  const u = propagate(inputs, (at) => rateOf(lengthUs(at)));
  const cyclesPerMinute = rateOf(totalUs);
  return ok({
    cyclesPerMinute,
    uncertainty: u.standard,
    interval: normalInterval(cyclesPerMinute, u.standard),
    parts: u.parts,
    cycles: cycles.length,
    durationS: worldSeconds(totalUs, factor),
    durationUncertaintyS: worldSeconds(propagate(inputs, lengthUs).standard, factor),
    frames,
  });
}
