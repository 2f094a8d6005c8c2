import { type Outcome, ok, refused } from '../outcome';
import { summarise } from './sample';
import type { WelchReason } from './welch';

/** Hedges' g of first minus second: difference over the pooled SD, with the small-sample factor 1 − 3/(4ν − 1). */
export function hedgesG(first: readonly number[], second: readonly number[]): Outcome<number, WelchReason> {
  const one = summarise(first);
  if (!one.ok) return one;
  const two = summarise(second);
  if (!two.ok) return two;
  if (one.value.sd === null || two.value.sd === null) return refused('too-few-values');
  const freedom = one.value.count + two.value.count - 2;
  const pooled = Math.sqrt(
    (one.value.sd ** 2 * (one.value.count - 1) + two.value.sd ** 2 * (two.value.count - 1)) / freedom,
  );
  if (pooled === 0) return refused('no-spread');
  return ok(((one.value.mean - two.value.mean) / pooled) * (1 - 3 / (4 * freedom - 1)));
}
