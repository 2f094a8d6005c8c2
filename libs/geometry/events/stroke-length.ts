import type { Measured } from '../measures/measured';
import { type Outcome, ok, refused } from '../outcome';
import { normalInterval } from '../uncertainty/elbow-interval';
import { combine } from '../uncertainty/parts';
import type { SwimSpeed } from './known-distance';
import type { StrokeRate } from './stroke-rate';

/** What a known distance adds to the stroke rate. */
export interface StrokeLength {
  /** Metres per cycle: speed over rate. */
  readonly length: Measured;
  /** Stroke index, speed × length, m²/s (Costill et al. 1985): compare within one stroke kind only. */
  readonly index: Measured;
}

/**
 * Stroke length L = v/f and stroke index v·L = v²/f of speed v and cycles a second f. The speed is the clip's mean: that
 * of a single cycle is not known. Compute per cycle or clip and average afterwards: the product of means is not the mean
 * of products. (u(L)/L)² = r²(v) + r²(f); (u(I)/I)² = 4·r²(v) + r²(f), r relative (JCGM 100:2008, eq. (12)).
 */
export function strokeLength(
  speed: Pick<SwimSpeed, 'metresPerSecond' | 'parts' | 'frames'>,
  rate: Pick<StrokeRate, 'cyclesPerMinute' | 'parts' | 'frames'>,
): Outcome<StrokeLength, 'not-finite' | 'not-positive'> {
  const { metresPerSecond } = speed;
  const cyclesPerSecond = rate.cyclesPerMinute / 60;
  if (!Number.isFinite(metresPerSecond) || !Number.isFinite(cyclesPerSecond)) return refused('not-finite');
  if (metresPerSecond <= 0 || cyclesPerSecond <= 0) return refused('not-positive');
  const measured = (value: number, speedPower: number): Measured => {
    const u = combine([
      ...speed.parts.map(({ source, alone }) => ({
        source,
        alone: value * speedPower * (alone / metresPerSecond),
      })),
      ...rate.parts.map(({ source, alone }) => ({ source, alone: value * (alone / rate.cyclesPerMinute) })),
    ]);
    return {
      value,
      uncertainty: u.standard,
      interval: normalInterval(value, u.standard),
      parts: u.parts,
      frame: rate.frames[0] ?? speed.frames[0],
      frames: [...new Set([...rate.frames, ...speed.frames])].sort((a, b) => a - b),
    };
  };
  return ok({
    length: measured(metresPerSecond / cyclesPerSecond, 1),
    index: measured(metresPerSecond ** 2 / cyclesPerSecond, 2),
  });
}
