import { type Outcome, ok, refused } from '../outcome';
import { frameIndex, type FrameIndex, type FrameReason } from '../units/frame-index';
import type { Microseconds } from '../units/microseconds';

/** Presentation times of a clip's frames in whole microseconds, in presentation order. */
export type FrameTimesUs = readonly number[];

/** The time of a frame. */
export function frameTimeUs(times: FrameTimesUs, frame: number): Outcome<Microseconds, FrameReason> {
  const index = frameIndex(frame, times.length);
  if (!index.ok) return index;
  const time = times[index.value];
  return time === undefined || !Number.isFinite(time)
    ? refused('frame-outside-clip')
    : ok(time as Microseconds);
}

/**
 * The frame between two frames (both included) whose time is nearest to a time; the earlier one when two are as near.
 * By time, not by index: frames of a variable-rate clip are not evenly spaced. Times rise along the clip.
 */
export function nearestFrame(times: FrameTimesUs, timeUs: number, first: number, last: number): FrameIndex {
  let low = first;
  let high = last;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((times[middle] ?? Infinity) <= timeUs) low = middle;
    else high = middle;
  }
  const toLow = Math.abs((times[low] ?? Infinity) - timeUs);
  const toHigh = Math.abs((times[high] ?? Infinity) - timeUs);
  return (toHigh < toLow ? high : low) as FrameIndex;
}

/** Mean distance in time from a frame to its neighbours, microseconds; from its one neighbour at either end; 0 for a single frame. */
export function frameIntervalUs(times: FrameTimesUs, frame: number): number {
  const before = Math.max(0, frame - 1);
  const after = Math.min(times.length - 1, frame + 1);
  if (after <= before) return 0;
  return ((times[after] ?? 0) - (times[before] ?? 0)) / (after - before);
}

/**
 * Half-width, in frames, within which a chosen event frame is taken to lie evenly around the true moment. One frame:
 * events are chosen by eye. Half a frame would be rounding alone. Our own assumption, no published source.
 */
export const EVENT_ERROR_FRAMES = 1;

/**
 * Standard uncertainty of an event's time, microseconds: rectangular, half-width h frames, h·Δ/√3. With h = ½ this is
 * the rounding to a frame, Δ/√12.
 */
export function eventTimeUncertaintyUs(
  times: FrameTimesUs,
  frame: number,
  errorFrames = EVENT_ERROR_FRAMES,
): number {
  return (errorFrames * frameIntervalUs(times, frame)) / Math.sqrt(3);
}
