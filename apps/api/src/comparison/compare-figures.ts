import type { DifferenceTest, MeasureComparison, Sample } from '@stillstroke/contract/comparison';
import { measureSchema, type Measure } from '@stillstroke/contract/measures';
import { compareArms, type ArmComparison } from '@stillstroke/geometry/statistics/compare-arms';
import type { ComparedTogether } from '@stillstroke/geometry/statistics/compare-measures';
import { t95, Z95 } from '@stillstroke/geometry/statistics/distributions';
import { sessionMean } from '@stillstroke/geometry/trend/session-mean';
import { markingPart, sharedPart, type KeptFigure } from '../measures/kept-figures';
import { unitOf } from '../measures/units';
import { judgedTogether } from './judged-together';

type Summary = MeasureComparison['left'];

interface Sides {
  readonly left: readonly KeptFigure[];
  readonly right: readonly KeptFigure[];
}

/**
 * Left against right for every measure, each stroke one value of the sample. The verdicts of all measures are judged
 * together, since somebody who looks at eight finds a difference in one of them by chance.
 */
export function compareFigures(figures: readonly KeptFigure[]): MeasureComparison[] {
  const sides = Object.fromEntries(
    measureSchema.options.map((measure) => [measure, sidesOf(figures, measure)]),
  ) as Record<Measure, Sides>;
  const alone = Object.fromEntries(
    measureSchema.options.map((measure) => [measure, compareSides(sides[measure])]),
  ) as Record<Measure, ArmComparison>;
  const judged = judgedTogether(alone);
  return measureSchema.options.map((measure) => {
    const { compared, measuresTogether } = judged[measure];
    const { difference, interval, verdict, moreStrokes } = compared;
    const test = testOf(compared, measuresTogether);
    return {
      measure,
      unit: unitOf[measure],
      left: summaryOf(sides[measure].left),
      right: summaryOf(sides[measure].right),
      // The library counts left − right.
      difference: difference === null ? null : 0 - difference,
      interval: interval === null ? null : { low: 0 - interval.high, high: 0 - interval.low },
      verdict,
      moreStrokes: moreStrokes === 0 ? null : moreStrokes,
      // t has the sign of the difference.
      test: test && { ...test, welch: test.welch && { ...test.welch, t: 0 - test.welch.t } },
    };
  });
}

function sidesOf(figures: readonly KeptFigure[], measure: Measure): Sides {
  const of = (arm: 'left' | 'right') =>
    figures.filter((figure) => figure.measure === measure && figure.arm === arm);
  return { left: of('left'), right: of('right') };
}

export function compareSides({ left, right }: Sides): ArmComparison {
  const compared = compareArms(
    left.map(({ value }) => value),
    right.map(({ value }) => value),
    {
      leftMarking: left.map(markingPart),
      rightMarking: right.map(markingPart),
      common: commonPart({ left, right }),
    },
  );
  if (!compared.ok) throw new Error(`kept figures cannot be compared: ${compared.reason}`);
  return compared.value;
}

/** A camera's roll shifts all strokes of a clip alike and drops out of their difference; of different clips it stays. */
export function commonPart({ left, right }: Sides): number {
  const clipsOf = (side: readonly KeptFigure[]) =>
    [...new Set(side.map(({ clipId }) => clipId))].sort().join();
  return clipsOf(left) === clipsOf(right) ? 0 : Math.hypot(sharedPart(left), sharedPart(right));
}

function summaryOf(side: readonly KeptFigure[]): Summary {
  return { ...groupOf(side), samples: side.map(sampleOf) };
}

/** Count, mean, spread and interval of some strokes' figures of one measure. */
export function groupOf(figures: readonly KeptFigure[]): Omit<Summary, 'samples'> {
  const found = sessionMean(
    figures.map(({ value }) => value),
    { marking: figures.map(markingPart), setUp: sharedPart(figures) },
  );
  if (!found.ok) return { count: figures.length, mean: null, interval: null, sd: null, marking: null };
  const { count, mean, sd, marking } = found.value;
  const half = sd === null ? null : Math.max((t95(count - 1) * sd) / Math.sqrt(count), Z95 * marking);
  const interval = half === null ? null : { low: mean - half, high: mean + half };
  return { count, mean, interval, sd, marking };
}

type Tested = Pick<ComparedTogether, 'welch' | 'marking' | 'p' | 'pTogether'>;

/** What stands behind a verdict; null below three strokes a side. */
export function testOf(
  { welch, marking, p, pTogether }: Tested,
  measuresTogether: number,
): DifferenceTest | null {
  if (marking === null || p === null || pTogether === null) return null;
  return {
    welch: welch && {
      standardError: welch.standard,
      t: welch.t,
      degreesOfFreedom: welch.degreesOfFreedom,
      quantile: welch.quantile,
      parts: [...welch.parts],
    },
    marking,
    p,
    pTogether,
    measuresTogether,
  };
}

function sampleOf({ clipId, strokeId, breath, value, uncertainty, frame }: KeptFigure): Sample {
  return { clipId, strokeId, breath, value, uncertainty, frame };
}
