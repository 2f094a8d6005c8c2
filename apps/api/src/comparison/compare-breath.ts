import type { BreathComparison, Comparison } from '@stillstroke/contract/comparison';
import { measureSchema, type Measure } from '@stillstroke/contract/measures';
import type { ArmComparison } from '@stillstroke/geometry/statistics/compare-arms';
import { compareWithin, type Stratum } from '@stillstroke/geometry/statistics/compare-within';
import { markingPart, type KeptFigure } from '../measures/kept-figures';
import { unitOf } from '../measures/units';
import { commonPart, compareSides, groupOf, testOf } from './compare-figures';
import { judgedTogether, type Judged } from './judged-together';

type Group = BreathComparison['breathing'];
type Arm = 'left' | 'right';

/**
 * Breathing strokes against the others: of each arm, and of both with each arm compared with itself. The same interval,
 * verdict and correction as left against right.
 */
export function compareBreath(figures: readonly KeptFigure[]): Comparison['breath'] {
  return {
    left: judged(figures, ['left']),
    right: judged(figures, ['right']),
    together: judged(figures, ['left', 'right']),
  };
}

interface Kinds {
  readonly breathing: readonly KeptFigure[];
  readonly others: readonly KeptFigure[];
}

function judged(figures: readonly KeptFigure[], arms: readonly Arm[]): BreathComparison[] {
  const kinds = Object.fromEntries(
    measureSchema.options.map((measure) => [measure, arms.map((arm) => kindsOf(figures, measure, arm))]),
  ) as Record<Measure, Kinds[]>;
  const compared = judgedTogether(
    Object.fromEntries(
      measureSchema.options.map((measure) => [measure, compareKinds(kinds[measure])]),
    ) as Record<Measure, ArmComparison>,
  );
  return measureSchema.options.map((measure) => ({
    measure,
    unit: unitOf[measure],
    ...groupsOf(kinds[measure]),
    ...answerOf(compared[measure]),
  }));
}

function kindsOf(figures: readonly KeptFigure[], measure: Measure, arm: Arm): Kinds {
  const own = figures.filter((figure) => figure.measure === measure && figure.arm === arm);
  return {
    breathing: own.filter(({ breath }) => breath),
    others: own.filter(({ breath }) => !breath),
  };
}

const valuesOf = (figures: readonly KeptFigure[]) => figures.map(({ value }) => value);

/** As a comparison of two sides, so that both kinds of comparison are judged by the same correction. */
function compareKinds(kinds: readonly Kinds[]): ArmComparison {
  const [one] = kinds;
  if (one && kinds.length === 1) return compareSides({ left: one.breathing, right: one.others });
  const within = compareWithin(kinds.map(stratumOf));
  if (!within.ok) throw new Error(`kept figures cannot be compared: ${within.reason}`);
  const { difference, interval, p, welch, marking, verdict } = within.value;
  const sided = { 'one-larger': 'left-larger', 'other-larger': 'right-larger' } as const;
  const asSide = verdict === 'one-larger' || verdict === 'other-larger' ? sided[verdict] : verdict;
  return {
    left: null,
    right: null,
    difference,
    interval,
    p,
    welch,
    marking,
    verdict: asSide,
    moreStrokes: null,
  };
}

function stratumOf({ breathing, others }: Kinds): Stratum {
  return {
    one: valuesOf(breathing),
    other: valuesOf(others),
    oneMarking: breathing.map(markingPart),
    otherMarking: others.map(markingPart),
    common: commonPart({ left: breathing, right: others }),
  };
}

/** Of one arm its strokes; of both the counts, since a mean over both arms would mix how the arms differ into it. */
function groupsOf(kinds: readonly Kinds[]): { breathing: Group; others: Group } {
  const of = (which: keyof Kinds): Group => {
    const [one] = kinds;
    if (one && kinds.length === 1) return groupOf(one[which]);
    const count = kinds.reduce((sum, kind) => sum + kind[which].length, 0);
    return { count, mean: null, interval: null, sd: null, marking: null };
  };
  return { breathing: of('breathing'), others: of('others') };
}

const verdicts = {
  'left-larger': 'breathing-larger',
  'right-larger': 'others-larger',
  'not-distinguishable': 'not-distinguishable',
  'too-few': 'too-few',
} as const;

function answerOf({ compared, measuresTogether }: Judged) {
  const { difference, interval, verdict, moreStrokes } = compared;
  return {
    difference,
    interval,
    verdict: verdicts[verdict],
    moreStrokes: moreStrokes === 0 ? null : moreStrokes,
    test: testOf(compared, measuresTogether),
  };
}
