import { type Outcome, ok, refused } from '../outcome';
import type { Interval } from '../uncertainty/elbow-interval';
import { normalBelow, Z95 } from './normal';
import { meanOf, type SampleReason, type SampleSummary, summarise } from './sample';
import { strokesToSettle } from './strokes-to-settle';
import { type MeanDifference, welchOf } from './welch';

export type ArmVerdict = 'left-larger' | 'right-larger' | 'not-distinguishable' | 'too-few';

/** Left against right on one measure; the strokes are the sample. */
export interface ArmComparison {
  readonly left: SampleSummary | null;
  readonly right: SampleSummary | null;
  /** Left mean minus right mean in the measure's unit (degrees for angles: never a percentage). Null without both sides. */
  readonly difference: number | null;
  /** 95 % interval of the difference; null with too few strokes. */
  readonly interval: Interval | null;
  /** Two-sided; null with too few strokes. Feed to Holm's correction when several measures are looked at. */
  readonly p: number | null;
  readonly verdict: ArmVerdict;
  /**
   * Further strokes a side that would settle a true difference of this size four times in five; 0 once settled, null
   * when unknown or when no reasonable number would do.
   */
  readonly moreStrokes: number | null;
  /** The strokes' own test behind the interval; null with too few strokes, or when no stroke differs from another. */
  readonly welch: MeanDifference | null;
  /** Standard uncertainty of the difference from marking (and what all strokes share) alone; null with too few strokes. */
  readonly marking: number | null;
}

export interface ComparisonOptions {
  /** Standard uncertainty of each stroke's value from marking alone, in the order of the values, or one for all. */
  readonly leftMarking?: number | readonly number[];
  readonly rightMarking?: number | readonly number[];
  /** Standard uncertainty of the difference that more strokes do not lessen (different clips' roll, for one). */
  readonly common?: number;
}

/** Fewer strokes a side than this give no verdict. */
export const FEWEST_STROKES = 3;

/**
 * Welch's interval of the difference, never narrower than marking alone would make it: the spread of the strokes holds
 * the random marking error already, but a few strokes may agree by chance better than anybody can mark.
 */
export function compareArms(
  leftValues: readonly number[],
  rightValues: readonly number[],
  options: ComparisonOptions = {},
): Outcome<ArmComparison, Exclude<SampleReason, 'empty'> | 'bad-uncertainty'> {
  const left = summarise(leftValues);
  const right = summarise(rightValues);
  if ((!left.ok && left.reason === 'not-finite') || (!right.ok && right.reason === 'not-finite')) {
    return refused('not-finite');
  }
  const marking = Math.hypot(
    markingOfMean(options.leftMarking, leftValues.length),
    markingOfMean(options.rightMarking, rightValues.length),
    options.common ?? 0,
  );
  if (!Number.isFinite(marking)) return refused('bad-uncertainty');
  const sides = { left: left.ok ? left.value : null, right: right.ok ? right.value : null };
  if (!sides.left || !sides.right) return ok({ ...sides, ...tooFew(null) });
  if (Math.min(sides.left.count, sides.right.count) < FEWEST_STROKES) {
    return ok({ ...sides, ...tooFew(sides.left.mean - sides.right.mean) });
  }
  return ok({ ...sides, ...compared(sides.left, sides.right, marking, options.common ?? 0) });
}

type Judged = Omit<ArmComparison, 'left' | 'right'>;

function tooFew(difference: number | null): Judged {
  return {
    difference,
    interval: null,
    p: null,
    verdict: 'too-few',
    moreStrokes: null,
    welch: null,
    marking: null,
  };
}

function compared(left: SampleSummary, right: SampleSummary, marking: number, common: number): Judged {
  const difference = left.mean - right.mean;
  const strokes = welchOf(left, right, common);
  const half = Math.max(strokes.ok ? halfWidth(strokes.value) : 0, Z95 * marking);
  const p = Math.max(
    strokes.ok ? strokes.value.p : 0,
    marking > 0 ? twoSided(difference / marking) : Number(difference === 0),
  );
  const verdict = verdictOf(difference, p);
  const settled = verdict !== 'not-distinguishable';
  return {
    difference,
    interval: { low: difference - half, high: difference + half },
    p,
    verdict,
    moreStrokes: settled ? 0 : strokesToSettle({ difference, left, right, marking, common }),
    welch: strokes.ok ? strokes.value : null,
    marking,
  };
}

/** The verdict of a difference whose p value (corrected or not) is known. */
export function verdictOf(difference: number, p: number): Exclude<ArmVerdict, 'too-few'> {
  if (p >= 0.05) return 'not-distinguishable';
  return difference > 0 ? 'left-larger' : 'right-larger';
}

function halfWidth({ interval }: MeanDifference): number {
  return (interval.high - interval.low) / 2;
}

export function twoSided(z: number): number {
  return 2 * normalBelow(-Math.abs(z));
}

/** Standard uncertainty of a mean from marking alone. */
export function markingOfMean(marking: number | readonly number[] | undefined, count: number): number {
  if (marking === undefined || count === 0) return 0;
  const each = typeof marking === 'number' ? [marking] : marking;
  if (each.length === 0) return 0;
  return each.some((u) => !(u >= 0)) ? NaN : Math.sqrt(meanOf(each.map((u) => u * u)) / count);
}
