import { type Outcome, ok, refused } from '../outcome';
import { studentBelow, t95 } from './distributions';
import { summarise } from './sample';
import type { MeanDifference, WelchReason } from './welch';

/** Paired t test: first minus second, value by value. For values that belong together, one to one. */
export function pairedDifference(
  first: readonly number[],
  second: readonly number[],
): Outcome<MeanDifference, WelchReason | 'unequal-length'> {
  if (first.length !== second.length) return refused('unequal-length');
  const summary = summarise(first.map((value, i) => value - (second[i] ?? NaN)));
  if (!summary.ok) return summary;
  const { mean: difference, sd, count } = summary.value;
  if (sd === null) return refused('too-few-values');
  if (sd === 0) return refused('no-spread');
  const standard = sd / Math.sqrt(count);
  const degreesOfFreedom = count - 1;
  const t = difference / standard;
  const quantile = t95(degreesOfFreedom);
  const half = quantile * standard;
  const p = 2 * studentBelow(-Math.abs(t), degreesOfFreedom);
  const interval = { low: difference - half, high: difference + half };
  const parts = [{ source: 'first-strokes', alone: standard, share: 1 }] as const;
  return ok({ difference, standard, t, degreesOfFreedom, quantile, p, interval, parts });
}
