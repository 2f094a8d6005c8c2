import { type Outcome, ok, refused } from '../outcome';

/** A sample's size, mean and spread. */
export interface SampleSummary {
  readonly count: number;
  readonly mean: number;
  /** Standard deviation with divisor n − 1; null for a single value. */
  readonly sd: number | null;
}

export type SampleReason = 'empty' | 'not-finite';

export function summarise(values: readonly number[]): Outcome<SampleSummary, SampleReason> {
  if (values.length === 0) return refused('empty');
  if (!values.every(Number.isFinite)) return refused('not-finite');
  const count = values.length;
  const average = meanOf(values);
  return ok({
    count,
    mean: average,
    sd: count > 1 ? Math.sqrt(sumOfSquares(values, average) / (count - 1)) : null,
  });
}

/** Sum; 0 for nothing. */
export function total(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0);
}

/** Mean of at least one value. */
export function meanOf(values: readonly number[]): number {
  return total(values) / values.length;
}

/** Sum of squared distances from a centre. */
export function sumOfSquares(values: readonly number[], centre: number): number {
  return values.reduce((sum, value) => sum + (value - centre) ** 2, 0);
}

/** Middle value, or the mean of the two middle ones, of at least one value. */
export function medianOf(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length / 2;
  return ((sorted[Math.ceil(middle) - 1] ?? NaN) + (sorted[Math.floor(middle)] ?? NaN)) / 2;
}
