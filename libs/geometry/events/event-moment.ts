import type { UncertaintySource } from '../uncertainty/parts';
import type { UncertainInput } from '../uncertainty/propagate';
import { eventTimeUncertaintyUs, type FrameTimesUs } from './frame-times';
import type { EventName, EventSource, EventSources, StrokeEvents } from './stroke';

/**
 * Half-width, in world seconds, within which an event chosen by the wrist is taken to lie evenly around that of the hand,
 * beside the choice of the frame: a hand's length at the speed of a hand that enters or leaves. Our own assumption, no
 * published source.
 */
export const WRIST_PROXY_ERROR_S = 0.05;

export interface EventOptions {
  /** World seconds per file second, above 0; 1 when left out. */
  readonly captureRateFactor?: number;
  /** See `EVENT_ERROR_FRAMES`. */
  readonly eventErrorFrames?: number;
}

const sourceKeys = {
  entry: 'entrySource',
  catch: 'catchSource',
  exit: 'exitSource',
  nextEntry: 'nextEntrySource',
} as const satisfies Record<EventName, keyof EventSources>;

const parts: Readonly<Record<EventName, UncertaintySource>> = {
  entry: 'entry-frame',
  catch: 'catch-frame',
  exit: 'exit-frame',
  nextEntry: 'next-entry-frame',
};

export function sourceOf(stroke: EventSources, event: EventName): EventSource {
  return stroke[sourceKeys[event]] ?? 'hand-seen';
}

/**
 * Standard uncertainty of an event's time, microseconds of file time: the choice of the frame (`eventTimeUncertaintyUs`,
 * from the times of the frames around it) and, where the wrist stands in, h/√3 of `WRIST_PROXY_ERROR_S` in quadrature.
 */
export function eventUncertaintyUs(
  stroke: StrokeEvents,
  event: EventName,
  times: FrameTimesUs,
  options: EventOptions = {},
): number {
  const frame = stroke[event];
  if (frame === null) return 0;
  const chosen = eventTimeUncertaintyUs(times, frame, options.eventErrorFrames);
  if (sourceOf(stroke, event) === 'hand-seen') return chosen;
  const proxyUs = (1e6 * WRIST_PROXY_ERROR_S) / (options.captureRateFactor ?? 1);
  return Math.hypot(chosen, proxyUs / Math.sqrt(3));
}

/** An event as an input of a computation: file time in microseconds, NaN where the event or its frame is not there. */
export function eventInput(
  stroke: StrokeEvents,
  event: EventName,
  times: FrameTimesUs,
  options: EventOptions = {},
): UncertainInput {
  const frame = stroke[event];
  return {
    source: parts[event],
    value: frame === null ? NaN : (times[frame] ?? NaN),
    standard: eventUncertaintyUs(stroke, event, times, options),
  };
}
