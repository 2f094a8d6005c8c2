import { type Outcome, ok, refused } from '../outcome';
import { type Interval, normalInterval } from '../uncertainty/elbow-interval';
import type { UncertaintyPart } from '../uncertainty/parts';
import { propagate, type UncertainInput } from '../uncertainty/propagate';
import { worldSeconds } from '../units/microseconds';
import { eventInput } from './event-moment';
import type { FrameTimesUs } from './frame-times';
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

export type StrokeRateReason =
  OrderReason | 'no-next-entry' | 'no-complete-cycle' | 'no-duration' | 'bad-capture-rate';

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
  const moments = new Map<number, UncertainInput>();
  for (const stroke of strokes) {
    const order = checkOrder(stroke, times.length);
    if (!order.ok) return order;
    if (stroke.nextEntry === null) continue;
    cycles.push([stroke.entry, stroke.nextEntry]);
    for (const event of ['entry', 'nextEntry'] as const) {
      const input = eventInput(stroke, event, times, options);
      const frame = stroke[event] ?? stroke.entry;
      const known = moments.get(frame);
      if (!known || known.standard < input.standard) moments.set(frame, input);
    }
  }
  if (cycles.length === 0) return refused(strokes.length === 1 ? 'no-next-entry' : 'no-complete-cycle');
  const frames = [...moments.keys()].sort((a, b) => a - b);
  const places = cycles.map(([from, to]) => [frames.indexOf(from), frames.indexOf(to)] as const);
  const lengthUs = (at: readonly number[]): number =>
    places.reduce((sum, [from, to]) => sum + (at[to] ?? 0) - (at[from] ?? 0), 0);
  const inputs = frames.flatMap((frame) => moments.get(frame) ?? []);
  const totalUs = lengthUs(inputs.map(({ value }) => value));
  if (!(totalUs > 0)) return refused('no-duration');
  const cyclesPerMinute = (60 * cycles.length) / worldSeconds(totalUs, factor);
  // f = 60·n/T: u(f)/f = u(T)/T, and so for each part.
  const duration = propagate(inputs, lengthUs);
  const perUs = cyclesPerMinute / totalUs;
  const uncertainty = duration.standard * perUs;
  return ok({
    cyclesPerMinute,
    uncertainty,
    interval: normalInterval(cyclesPerMinute, uncertainty),
    parts: duration.parts.map((part) => ({ ...part, alone: part.alone * perUs })),
    cycles: cycles.length,
    durationS: worldSeconds(totalUs, factor),
    durationUncertaintyS: worldSeconds(duration.standard, factor),
    frames,
  });
}
