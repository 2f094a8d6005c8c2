import type {
  BreathComparison,
  DifferenceTest,
  MeasureComparison,
  Sample,
} from '@stillstroke/contract/comparison';
import type { ExplainedFrame, ExplainedInput, Explanation } from '../ui/explain/explanation';
import { sayAlone, sayParts } from '../ui/explain/part-words';
import { fixed, formatDifference, formatFigure, formatRange, type Unit } from '../ui/figure/format-figure';
import { measureWords } from '../ui/figure/measure-words';
import { sayBreathVerdict } from './breath-words';
import { sayVerdict } from './comparison-sentence';

type Group = BreathComparison['breathing'];

/** Left against right of one measure, opened up. */
export function explainDifference(row: MeasureComparison): Explanation {
  const { unit, left, right } = row;
  return {
    entry: 'difference',
    of: `${measureWords[row.measure].name}: right arm less left arm`,
    result: sayVerdict(row).verdict,
    interval: row.interval && formatRange(row.interval, unit, 'difference'),
    inputs: [
      ...sayGroup('Left arm', left, unit),
      ...sayGroup('Right arm', right, unit),
      ...sayTest(row, 'right − left'),
    ],
    frames: [...framesOf(left.samples, 'left', unit), ...framesOf(right.samples, 'right', unit)],
    parts: sayParts(row.test?.welch?.parts ?? [], unit, {
      'first-strokes': 'how the left strokes differ among themselves',
      'second-strokes': 'how the right strokes differ among themselves',
      shared: 'what more strokes do not lessen: the clips’ own lean',
    }),
    partsOf: 'the standard error',
    also: [row.measure, 'armMean', 'holm', 'strokesToSettle'],
  };
}

/** Breathing strokes against the others of one measure, opened up. */
export function explainBreath(row: BreathComparison, whose: 'left' | 'right' | 'together'): Explanation {
  const { unit, breathing, others } = row;
  const arms = whose === 'together' ? 'both arms, each compared with itself' : `${whose} arm`;
  return {
    entry: 'breath',
    of: `${measureWords[row.measure].name}, ${arms}: breathing strokes less the others`,
    result: sayBreathVerdict(row).verdict,
    interval: row.interval && formatRange(row.interval, unit, 'difference'),
    inputs: [
      ...sayGroup('Breathing strokes', breathing, unit),
      ...sayGroup('Other strokes', others, unit),
      ...sayTest(row, 'breathing − others'),
    ],
    frames: [],
    parts: sayParts(row.test?.welch?.parts ?? [], unit, {
      'first-strokes': 'how the breathing strokes differ among themselves',
      'second-strokes': 'how the other strokes differ among themselves',
      shared: 'what more strokes do not lessen: the clips’ own lean',
    }),
    partsOf: 'the standard error',
    also: [row.measure, 'difference', 'holm', 'strokesToSettle'],
  };
}

function sayGroup(name: string, { count, mean, sd, interval }: Group, unit: Unit): ExplainedInput[] {
  const strokes = `${count} ${count === 1 ? 'stroke' : 'strokes'}`;
  if (mean === null) return [{ name, value: strokes }];
  const spread = sd === null ? '' : `, standard deviation ${sayAlone(sd, unit).replace('± ', '')}`;
  const range = interval ? ` (95 %: ${formatRange(interval, unit)})` : '';
  return [{ name, value: `mean ${formatFigure(mean, unit, 0)}${range}${spread}, ${strokes}` }];
}

function sayTest(
  {
    difference,
    unit,
    test,
    moreStrokes,
  }: Pick<MeasureComparison, 'difference' | 'unit' | 'test' | 'moreStrokes'>,
  name: string,
): ExplainedInput[] {
  const known: ExplainedInput[] =
    difference === null
      ? []
      : [
          {
            name: `Difference, ${name}`,
            value: `${difference < 0 ? '−' : ''}${formatDifference(difference, unit)}`,
          },
        ];
  if (!test) return [...known, { name: 'Verdict', value: 'none: three strokes a side are needed' }];
  return [
    ...known,
    ...sayWelch(test, unit),
    { name: 'Standard uncertainty from marking alone', value: sayAlone(test.marking, unit) },
    {
      name: `p of this measure; corrected for ${test.measuresTogether} measures (Holm)`,
      value: `${sayP(test.p)}; ${sayP(test.pTogether)}`,
    },
    ...(moreStrokes === null
      ? []
      : [{ name: 'More strokes a side that would settle it', value: `about ${moreStrokes}` }]),
  ];
}

function sayWelch({ welch }: DifferenceTest, unit: Unit): ExplainedInput[] {
  if (!welch) return [{ name: 'Strokes’ own spread', value: 'none: all strokes of a side read alike' }];
  return [
    { name: 'Standard error', value: sayAlone(welch.standardError, unit) },
    { name: 'Degrees of freedom ν', value: fixed(welch.degreesOfFreedom, 1) },
    { name: 't for 95 %', value: fixed(welch.quantile, 3) },
  ];
}

function sayP(p: number): string {
  return p < 0.001 ? 'under 0.001' : fixed(p, 3);
}

function framesOf(samples: readonly Sample[], arm: 'left' | 'right', unit: Unit): ExplainedFrame[] {
  return samples.map(({ clipId, frame, value, uncertainty }) => ({
    clipId,
    frame,
    arm,
    says: `${arm} ${formatFigure(value, unit, uncertainty)}, frame ${frame}`,
  }));
}
