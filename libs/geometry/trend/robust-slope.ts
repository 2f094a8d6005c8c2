import { type Outcome, ok, refused } from '../outcome';
import { Z95 } from '../statistics/normal';
import { medianOf } from '../statistics/sample';
import type { Interval } from '../uncertainty/elbow-interval';
import { FEWEST_SESSIONS, type SlopeReason, type TrendPoint } from './slope';

/** Median of the slopes of all pairs of sessions (Theil and Sen): one session gone wrong hardly moves it. */
export interface RobustSlope {
  readonly slope: number;
  /** 95 % interval after Sen (1968), from the normal approximation of Kendall's S. */
  readonly interval: Interval;
  /** Kendall's S: rising pairs minus falling ones. */
  readonly kendallS: number;
}

export function robustSlope(points: readonly TrendPoint[]): Outcome<RobustSlope, SlopeReason> {
  if (points.length < FEWEST_SESSIONS) return refused('too-few-sessions');
  if (!points.every(({ x, y }) => Number.isFinite(x) && Number.isFinite(y))) return refused('not-finite');
  const slopes = pairSlopes(points);
  if (slopes.length === 0) return refused('one-moment');
  const kendallS = slopes.reduce((sum, slope) => sum + Math.sign(slope), 0);
  // The k-th smallest slopes on either side, k from the standard deviation of S (ties of x and y allowed for).
  const reach = Z95 * Math.sqrt(varianceOfS(points));
  const last = slopes.length - 1;
  const upper = Math.min(last, Math.round((slopes.length + reach) / 2));
  const lower = Math.max(0, Math.round((slopes.length - reach) / 2) - 1);
  const interval = { low: slopes[lower] ?? NaN, high: slopes[upper] ?? NaN };
  return ok({ slope: medianOf(slopes), interval, kendallS });
}

function pairSlopes(points: readonly TrendPoint[]): number[] {
  const slopes: number[] = [];
  for (const [i, a] of points.entries()) {
    for (const b of points.slice(i + 1)) {
      if (a.x !== b.x) slopes.push((b.y - a.y) / (b.x - a.x));
    }
  }
  return slopes.sort((a, b) => a - b);
}

/** Variance of Kendall's S under no trend, less what ties take away. */
function varianceOfS(points: readonly TrendPoint[]): number {
  const term = (n: number): number => n * (n - 1) * (2 * n + 5);
  const tied = (values: readonly number[]): number => {
    const counts = new Map<number, number>();
    for (const value of values) counts.set(value, (counts.get(value) ?? 0) + 1);
    return [...counts.values()].reduce((sum, n) => sum + term(n), 0);
  };
  const all = term(points.length) - tied(points.map(({ x }) => x)) - tied(points.map(({ y }) => y));
  return Math.max(0, all) / 18;
}
