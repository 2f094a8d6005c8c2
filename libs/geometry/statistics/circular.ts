import { type Outcome, ok, refused } from '../outcome';

/** Mean and spread of directions or of places in a cycle. */
export interface CircularSummary {
  readonly count: number;
  /** 0 to the period. */
  readonly mean: number;
  /** Length of the mean vector, 0 (no direction) to 1 (all the same). */
  readonly concentration: number;
  /** Circular SD, √(−2 ln R̄) in the unit of the values (Mardia). Tends to the SD with divisor n. */
  readonly sd: number;
  /** Angular deviation, √(2(1 − R̄)) in the unit of the values (Batschelet). */
  readonly deviation: number;
}

export type CircularReason = 'empty' | 'not-finite' | 'bad-period' | 'no-direction';

/** Below this the mean vector has no direction. */
const NO_DIRECTION = 1e-12;

/**
 * Circular mean of values with a period (360 for degrees, 1 for shares of a cycle), each counted `weights[i]` times.
 * Only for directions and cycle shares: an elbow angle is an ordinary number. Values that cancel are refused.
 */
export function circularSummary(
  values: readonly number[],
  period = 360,
  weights: readonly number[] = values.map(() => 1),
): Outcome<CircularSummary, CircularReason> {
  if (!(period > 0 && Number.isFinite(period))) return refused('bad-period');
  const count = weights.reduce((sum, weight) => sum + weight, 0);
  if (values.length === 0 || count === 0) return refused('empty');
  if (![...values, count].every(Number.isFinite)) return refused('not-finite');
  const turn = (2 * Math.PI) / period;
  const part = (of: (x: number) => number): number =>
    values.reduce((sum, value, i) => sum + (weights[i] ?? 0) * of(value * turn), 0) / count;
  const c = part(Math.cos);
  const s = part(Math.sin);
  const concentration = Math.min(1, Math.hypot(c, s));
  if (concentration < NO_DIRECTION) return refused('no-direction');
  return ok({
    count,
    mean: (Math.atan2(s, c) / turn + period) % period,
    concentration,
    sd: Math.sqrt(-2 * Math.log(concentration)) / turn,
    deviation: Math.sqrt(2 * (1 - concentration)) / turn,
  });
}
