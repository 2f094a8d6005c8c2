import type { MeasureComparison, Sample } from '@stillstroke/contract/comparison';
import { measureSchema, type Measure } from '@stillstroke/contract/measures';
import { compareArms, type ArmComparison } from '@stillstroke/geometry/statistics/compare-arms';
import { compareTogether } from '@stillstroke/geometry/statistics/compare-measures';
import { t95, Z95 } from '@stillstroke/geometry/statistics/distributions';
import { sessionMean } from '@stillstroke/geometry/trend/session-mean';
import { markingPart, sharedPart, type KeptFigure } from '../measures/kept-figures';
import { unitOf } from '../measures/units';

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
  const compared = compareTogether(
    Object.fromEntries(
      measureSchema.options.map((measure) => [measure, compareSides(sides[measure])]),
    ) as Record<Measure, ArmComparison>,
  );
  return measureSchema.options.map((measure) => {
    const { difference, interval, verdict, moreStrokes } = compared[measure];
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
    };
  });
}

function sidesOf(figures: readonly KeptFigure[], measure: Measure): Sides {
  const of = (arm: 'left' | 'right') =>
    figures.filter((figure) => figure.measure === measure && figure.arm === arm);
  return { left: of('left'), right: of('right') };
}

function compareSides({ left, right }: Sides): ArmComparison {
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

/** A camera's roll shifts both arms of a clip alike and drops out of their difference; of different clips it stays. */
function commonPart({ left, right }: Sides): number {
  const clipsOf = (side: readonly KeptFigure[]) =>
    [...new Set(side.map(({ clipId }) => clipId))].sort().join();
  return clipsOf(left) === clipsOf(right) ? 0 : Math.hypot(sharedPart(left), sharedPart(right));
}

function summaryOf(side: readonly KeptFigure[]): Summary {
  const samples = side.map(sampleOf);
  const mean = sessionMean(
    side.map(({ value }) => value),
    { marking: side.map(markingPart), setUp: sharedPart(side) },
  );
  if (!mean.ok) return { count: samples.length, mean: null, interval: null, samples };
  const { count, sd, marking } = mean.value;
  const half = sd === null ? null : Math.max((t95(count - 1) * sd) / Math.sqrt(count), Z95 * marking);
  return {
    count,
    mean: mean.value.mean,
    interval: half === null ? null : { low: mean.value.mean - half, high: mean.value.mean + half },
    samples,
  };
}

function sampleOf({ clipId, strokeId, breath, value, uncertainty, frame }: KeptFigure): Sample {
  return { clipId, strokeId, breath, value, uncertainty, frame };
}
