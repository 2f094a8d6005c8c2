import { type Outcome, ok, refused } from '../outcome';
import { Z95 } from '../statistics/normal';
import { t95 } from '../statistics/distributions';
import { total } from '../statistics/sample';
import type { Interval } from '../uncertainty/elbow-interval';

/** A session on a trend. */
export interface TrendPoint {
  /** Place in time, in any unit (days, say); the slope is per that unit. */
  readonly x: number;
  readonly y: number;
  /** Standard uncertainty of y; all points or none have one. */
  readonly uncertainty?: number;
}

/** A straight line through sessions. */
export interface Slope {
  /** Change of y per unit of x. */
  readonly slope: number;
  readonly intercept: number;
  /** Standard error of the slope from the scatter about the line. */
  readonly scatter: number;
  /** Standard uncertainty of the slope from the points' own uncertainties; null without them. */
  readonly known: number | null;
  /** 95 % interval of the slope: the wider of scatter (t, n − 2) and the points' own uncertainties (z). */
  readonly interval: Interval;
  /** Share of the (weighted) variance the line explains, 0 to 1; null when all y are equal. */
  readonly explained: number | null;
}

export type SlopeReason = 'too-few-sessions' | 'not-finite' | 'bad-uncertainty' | 'one-moment';

/** No line is drawn through fewer sessions than this. */
export const FEWEST_SESSIONS = 4;

/** Least squares, weighted by 1/u² when the points carry uncertainties. */
export function slopeOf(points: readonly TrendPoint[]): Outcome<Slope, SlopeReason> {
  if (points.length < FEWEST_SESSIONS) return refused('too-few-sessions');
  if (!points.every(({ x, y }) => Number.isFinite(x) && Number.isFinite(y))) return refused('not-finite');
  const given = points.flatMap(({ uncertainty }) => (uncertainty === undefined ? [] : [uncertainty]));
  if (given.some((u) => !(u > 0 && Number.isFinite(u)))) return refused('bad-uncertainty');
  if (given.length > 0 && given.length < points.length) return refused('bad-uncertainty');
  const weights = points.map(({ uncertainty }) => (uncertainty === undefined ? 1 : 1 / uncertainty ** 2));
  const sum = (of: (point: TrendPoint) => number): number =>
    total(points.map((point, i) => (weights[i] ?? 0) * of(point)));
  const weight = total(weights);
  const meanX = sum(({ x }) => x) / weight;
  const meanY = sum(({ y }) => y) / weight;
  const spreadX = sum(({ x }) => (x - meanX) ** 2);
  if (spreadX === 0) return refused('one-moment');
  const slope = sum(({ x, y }) => (x - meanX) * (y - meanY)) / spreadX;
  const intercept = meanY - slope * meanX;
  const left = sum(({ x, y }) => (y - intercept - slope * x) ** 2);
  const spreadY = sum(({ y }) => (y - meanY) ** 2);
  const freedom = points.length - 2;
  const scatter = Math.sqrt(left / freedom / spreadX);
  const known = given.length > 0 ? 1 / Math.sqrt(spreadX) : null;
  const half = Math.max(t95(freedom) * scatter, Z95 * (known ?? 0));
  return ok({
    slope,
    intercept,
    scatter,
    known,
    interval: { low: slope - half, high: slope + half },
    explained: spreadY > 0 ? 1 - left / spreadY : null,
  });
}
