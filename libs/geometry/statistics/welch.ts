import { type Outcome, ok, refused } from '../outcome';
import type { Interval } from '../uncertainty/elbow-interval';
import { combine, type UncertaintyPart, type UncertaintySource } from '../uncertainty/parts';
import { studentBelow, t95 } from './distributions';
import { effectiveFreedom } from './effective-freedom';
import { type SampleReason, type SampleSummary, summarise } from './sample';

/** Difference of two independent means, unequal variances allowed. */
export interface MeanDifference {
  /** Mean of the first minus mean of the second. */
  readonly difference: number;
  /** Standard error of the difference. */
  readonly standard: number;
  readonly t: number;
  /** Welch–Satterthwaite. */
  readonly degreesOfFreedom: number;
  /** 97.5 % point of Student's t with these degrees of freedom: the interval is the difference ± this × standard. */
  readonly quantile: number;
  /** Two-sided. */
  readonly p: number;
  /** 95 % interval. */
  readonly interval: Interval;
  /** What the standard error is made of, largest first. */
  readonly parts: readonly UncertaintyPart[];
}

export type WelchReason = SampleReason | 'too-few-values' | 'no-spread';

/**
 * Welch's t test. `common` is a standard uncertainty of the difference that does not shrink with more values; it joins
 * the standard error with infinite degrees of freedom (JCGM 100:2008, G.4.1).
 */
export function welch(
  first: readonly number[],
  second: readonly number[],
  common = 0,
): Outcome<MeanDifference, WelchReason> {
  const one = summarise(first);
  if (!one.ok) return one;
  const two = summarise(second);
  if (!two.ok) return two;
  return welchOf(one.value, two.value, common);
}

/** The same of two samples already summarised. */
export function welchOf(
  one: SampleSummary,
  two: SampleSummary,
  common = 0,
): Outcome<MeanDifference, 'too-few-values' | 'no-spread'> {
  if (one.sd === null || two.sd === null) return refused('too-few-values');
  const inputs = [
    { source: 'first-strokes', alone: one.sd / Math.sqrt(one.count), degreesOfFreedom: one.count - 1 },
    { source: 'second-strokes', alone: two.sd / Math.sqrt(two.count), degreesOfFreedom: two.count - 1 },
    { source: 'shared', alone: common, degreesOfFreedom: Infinity },
  ] as const;
  if (one.sd === 0 && two.sd === 0) return refused('no-spread');
  const { degreesOfFreedom, standard, parts } = addedUp(inputs);
  const difference = one.mean - two.mean;
  const t = difference / standard;
  const quantile = t95(degreesOfFreedom);
  const half = quantile * standard;
  return ok({
    difference,
    standard,
    t,
    degreesOfFreedom,
    quantile,
    p: 2 * studentBelow(-Math.abs(t), degreesOfFreedom),
    interval: { low: difference - half, high: difference + half },
    parts,
  });
}

/** Independent parts of a standard error: their sum, its degrees of freedom, and what each adds, largest first. */
export function addedUp(
  inputs: readonly {
    readonly source: UncertaintySource;
    readonly alone: number;
    readonly degreesOfFreedom: number;
  }[],
): Pick<MeanDifference, 'standard' | 'degreesOfFreedom' | 'parts'> {
  const { standard, parts } = combine(inputs);
  const degreesOfFreedom = effectiveFreedom(
    inputs.map(({ alone, degreesOfFreedom }) => ({ standard: alone, degreesOfFreedom })),
  );
  return { standard, degreesOfFreedom, parts: parts.filter(({ alone }) => alone > 0) };
}
