import { type Outcome, ok, refused } from '../outcome';
import type { Interval } from '../uncertainty/elbow-interval';
import { Z95 } from './normal';
import { t95 } from './distributions';
import { summarise } from './sample';

/** Agreement of two ways (or two coaches) of reading the same things: Bland and Altman (1986). */
export interface Agreement {
  readonly count: number;
  /** Mean of first − second. */
  readonly bias: number;
  readonly biasInterval: Interval;
  /** SD of the differences (n − 1). */
  readonly sd: number;
  /** bias ± 1.96 SD: where 95 % of single differences are expected. */
  readonly limits: Interval;
  /** 95 % intervals of the two limits, with SE = √(3·SD²/n). */
  readonly lowerLimitInterval: Interval;
  readonly upperLimitInterval: Interval;
}

export type AgreementReason = 'unequal-length' | 'not-finite' | 'too-few-pairs';

/** `widen` is 1.96; the 1986 paper's own figures use 2. */
export function agreement(
  first: readonly number[],
  second: readonly number[],
  widen = Z95,
): Outcome<Agreement, AgreementReason> {
  if (first.length !== second.length) return refused('unequal-length');
  const summary = summarise(first.map((value, i) => value - (second[i] ?? NaN)));
  if (!summary.ok) return refused(summary.reason === 'empty' ? 'too-few-pairs' : summary.reason);
  const { count, mean: bias, sd } = summary.value;
  if (sd === null || count < 3) return refused('too-few-pairs');
  const t = t95(count - 1);
  const about = (centre: number, half: number): Interval => ({ low: centre - half, high: centre + half });
  const limits = about(bias, widen * sd);
  const limitHalf = t * Math.sqrt((3 * sd * sd) / count);
  return ok({
    count,
    bias,
    biasInterval: about(bias, (t * sd) / Math.sqrt(count)),
    sd,
    limits,
    lowerLimitInterval: about(limits.low, limitHalf),
    upperLimitInterval: about(limits.high, limitHalf),
  });
}
