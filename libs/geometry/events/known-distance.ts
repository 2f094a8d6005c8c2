import { type Outcome, ok, refused } from '../outcome';
import { combine, type CombinedUncertainty } from '../uncertainty/parts';
import { worldSeconds } from '../units/microseconds';
import type { EventOptions } from './event-moment';
import { eventTimeUncertaintyUs, type FrameTimesUs } from './frame-times';

/** How far the swimmer travelled between two frames of a clip, e.g. from one marking of the lane to another. */
export interface KnownDistance {
  readonly metres: number;
  /** Standard uncertainty of the metres. */
  readonly uncertaintyM: number;
  /** 0-based; the first before the second. */
  readonly fromFrame: number;
  readonly toFrame: number;
}

/** The mean speed of the swimmer over a known distance. */
export interface SwimSpeed extends CombinedUncertainty {
  /** Metres per second of the world; `standard` and `parts` in the same unit. */
  readonly metresPerSecond: number;
  readonly durationS: number;
  readonly frames: readonly [number, number];
}

export type DistanceReason =
  | 'not-finite'
  | 'not-positive'
  | 'distance-not-told'
  | 'frame-not-whole'
  | 'frame-outside-clip'
  | 'distance-frames-out-of-order';
export type SpeedReason = DistanceReason | 'no-distance' | 'no-duration' | 'bad-capture-rate';

/** Metres above 0 and larger than their uncertainty, over two frames of the clip in order. */
export function checkKnownDistance(
  { metres, uncertaintyM, fromFrame, toFrame }: KnownDistance,
  frameCount = Infinity,
): Outcome<KnownDistance, DistanceReason> {
  if (!Number.isFinite(metres) || !Number.isFinite(uncertaintyM)) return refused('not-finite');
  if (metres <= 0 || uncertaintyM < 0) return refused('not-positive');
  if (uncertaintyM >= metres) return refused('distance-not-told');
  const frames = [fromFrame, toFrame];
  if (!frames.every(Number.isInteger)) return refused('frame-not-whole');
  if (frames.some((frame) => frame < 0 || frame >= frameCount)) return refused('frame-outside-clip');
  if (fromFrame >= toFrame) return refused('distance-frames-out-of-order');
  return ok({ metres, uncertaintyM, fromFrame, toFrame });
}

/**
 * v = d/t with t in world seconds; (u(v)/v)² = (u(d)/d)² + (u(t)/t)², both frames chosen by eye like events
 * (JCGM 100:2008, eq. (10)).
 */
export function swimSpeed(
  distance: KnownDistance | null,
  times: FrameTimesUs,
  options: EventOptions = {},
): Outcome<SwimSpeed, SpeedReason> {
  const factor = options.captureRateFactor ?? 1;
  if (!(factor > 0 && Number.isFinite(factor))) return refused('bad-capture-rate');
  if (distance === null) return refused('no-distance');
  const checked = checkKnownDistance(distance, times.length);
  if (!checked.ok) return checked;
  const { metres, uncertaintyM, fromFrame, toFrame } = distance;
  const durationUs = (times[toFrame] ?? NaN) - (times[fromFrame] ?? NaN);
  if (!(durationUs > 0)) return refused('no-duration');
  const durationS = worldSeconds(durationUs, factor);
  const metresPerSecond = metres / durationS;
  const frameUs = [fromFrame, toFrame].map((frame) =>
    eventTimeUncertaintyUs(times, frame, options.eventErrorFrames),
  );
  const u = combine([
    { source: 'distance', alone: metresPerSecond * (uncertaintyM / metres) },
    ...frameUs.map((us) => ({ source: 'time' as const, alone: metresPerSecond * (us / durationUs) })),
  ]);
  // Times beside the two frames go into the choice of them.
  if (!Number.isFinite(u.standard) || !Number.isFinite(metresPerSecond)) return refused('not-finite');
  return ok({ ...u, metresPerSecond, durationS, frames: [fromFrame, toFrame] });
}
