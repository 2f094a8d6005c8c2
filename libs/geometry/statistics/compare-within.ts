import { type Outcome, ok, refused } from '../outcome';
import type { Interval } from '../uncertainty/elbow-interval';
import { FEWEST_STROKES, markingOfMean, twoSided } from './compare-arms';
import { studentBelow, t95 } from './distributions';
import { Z95 } from './normal';
import { meanOf, type SampleReason, type SampleSummary, summarise } from './sample';
import { addedUp, type MeanDifference } from './welch';

/** Two kinds of stroke of one arm: their values and, in the same order, each value's standard uncertainty from marking. */
export interface Stratum {
  readonly one: readonly number[];
  readonly other: readonly number[];
  readonly oneMarking?: readonly number[];
  readonly otherMarking?: readonly number[];
  /** Standard uncertainty of this arm's difference that more strokes do not lessen (different clips' roll, for one). */
  readonly common?: number;
}

export type KindVerdict = 'one-larger' | 'other-larger' | 'not-distinguishable' | 'too-few';

/** One kind of stroke against another, each arm against itself, the arms' differences averaged. */
export interface KindComparison {
  /** How many arms have three strokes of either kind; the others are left aside. */
  readonly arms: number;
  /** Strokes of either kind in those arms. */
  readonly oneCount: number;
  readonly otherCount: number;
  /** Mean over those arms of (mean of one kind − mean of the other), in the measure's unit; null without such an arm. */
  readonly difference: number | null;
  readonly interval: Interval | null;
  readonly p: number | null;
  readonly verdict: KindVerdict;
  readonly welch: MeanDifference | null;
  /** Standard uncertainty of the difference from marking alone. */
  readonly marking: number | null;
}

const NOTHING: KindComparison = {
  arms: 0,
  oneCount: 0,
  otherCount: 0,
  difference: null,
  interval: null,
  p: null,
  verdict: 'too-few',
  welch: null,
  marking: null,
};

/**
 * Breathing strokes against the others over both arms. Pooling the arms would let a difference between the arms pass for
 * one between the kinds, whenever one arm breathes more often; so each arm is compared with itself first. The variance of
 * the mean of K differences is Σ s²/n over all means, over K²; degrees of freedom after Welch and Satterthwaite. Never
 * narrower than marking alone would make it, as in `compareArms`.
 */
export function compareWithin(
  strata: readonly Stratum[],
): Outcome<KindComparison, Exclude<SampleReason, 'empty'> | 'bad-uncertainty'> {
  if (!strata.every(({ one, other }) => [...one, ...other].every(Number.isFinite)))
    return refused('not-finite');
  const used = strata.flatMap((stratum) => {
    const [one, other] = [summarise(stratum.one), summarise(stratum.other)];
    if (!one.ok || !other.ok || Math.min(one.value.count, other.value.count) < FEWEST_STROKES) return [];
    return [{ stratum, one: one.value, other: other.value, common: stratum.common ?? 0 }];
  });
  if (used.length === 0) return ok(NOTHING);
  const marking =
    Math.hypot(
      ...used.flatMap(({ stratum }) => [
        markingOfMean(stratum.oneMarking, stratum.one.length),
        markingOfMean(stratum.otherMarking, stratum.other.length),
        stratum.common ?? 0,
      ]),
    ) / used.length;
  if (!Number.isFinite(marking)) return refused('bad-uncertainty');
  return ok(compared(used, marking));
}

interface Used {
  readonly one: SampleSummary;
  readonly other: SampleSummary;
  readonly common: number;
}

function compared(used: readonly Used[], marking: number): KindComparison {
  const difference = meanOf(used.map(({ one, other }) => one.mean - other.mean));
  const welch = meanDifference(used, difference);
  const half = Math.max(welch ? welch.quantile * welch.standard : 0, Z95 * marking);
  const p = Math.max(welch?.p ?? 0, marking > 0 ? twoSided(difference / marking) : Number(difference === 0));
  return {
    arms: used.length,
    oneCount: used.reduce((sum, { one }) => sum + one.count, 0),
    otherCount: used.reduce((sum, { other }) => sum + other.count, 0),
    difference,
    interval: { low: difference - half, high: difference + half },
    p,
    verdict: kindVerdict(difference, p),
    welch,
    marking,
  };
}

/** The verdict of a difference whose p value (corrected or not) is known. */
export function kindVerdict(difference: number, p: number): Exclude<KindVerdict, 'too-few'> {
  if (p >= 0.05) return 'not-distinguishable';
  return difference > 0 ? 'one-larger' : 'other-larger';
}

function meanDifference(used: readonly Used[], difference: number): MeanDifference | null {
  const spreads = used.flatMap(({ one, other }) =>
    (
      [
        ['first-strokes', one],
        ['second-strokes', other],
      ] as const
    ).map(([source, { sd, count }]) => ({
      source,
      alone: (sd ?? 0) / Math.sqrt(count) / used.length,
      degreesOfFreedom: count - 1,
    })),
  );
  if (spreads.every(({ alone }) => alone === 0)) return null;
  const shared = used.map(({ common }) => ({
    source: 'shared' as const,
    alone: common / used.length,
    degreesOfFreedom: Infinity,
  }));
  const { standard, degreesOfFreedom, parts } = addedUp([...spreads, ...shared]);
  const quantile = t95(degreesOfFreedom);
  const t = difference / standard;
  const half = quantile * standard;
  return {
    difference,
    standard,
    t,
    degreesOfFreedom,
    quantile,
    p: 2 * studentBelow(-Math.abs(t), degreesOfFreedom),
    interval: { low: difference - half, high: difference + half },
    parts,
  };
}
