import type { Trend, TrendPoint } from '@stillstroke/contract/trend';
import type { ExplainedFrame, ExplainedInput, Explanation } from '../ui/explain/explanation';
import { sayAlone, sayParts } from '../ui/explain/part-words';
import {
  fixed,
  formatDifference,
  formatFigure,
  formatRange,
  formatUncertainty,
  onScreen,
  differenceSignOf,
} from '../ui/figure/format-figure';
import { nameOf } from '../ui/figure/measure-words';
import { sayDay } from './say-day';

type ArmTrend = Trend['arms'][number];
type Unit = Trend['unit'];

const armWords = { left: 'left arm', right: 'right arm', both: 'both arms' } as const;
export const changeWords = {
  changed: 'Changed',
  'not-more-than-marking': 'Not more than marking could produce',
  'not-more-than-strokes-vary': 'Not more than strokes of one session differ among themselves',
  'too-few': 'Too few strokes for a verdict',
} as const;

/** One point: a session's mean of one arm. */
export function explainPoint(trend: Trend, point: TrendPoint): Explanation {
  const { unit, measure } = trend;
  return {
    entry: 'sessionMean',
    of: `${nameOf(measure)}, ${armWords[point.arm]}, ${sayDay(point.date)}`,
    result: `${formatFigure(point.mean, unit, point.uncertainty)} ${formatUncertainty(point.uncertainty, unit)}`,
    interval: null,
    inputs: [
      { name: 'Strokes', value: String(point.count) },
      {
        name: 'Standard deviation between strokes',
        value: point.sd === null ? 'one stroke has none' : sayAlone(point.sd, unit).replace('± ', ''),
      },
      { name: 'Uncertainty of the mean from marking and set-up alone', value: sayAlone(point.marking, unit) },
      { name: 'Of it shared by all strokes of the session', value: sayAlone(point.setUp, unit) },
    ],
    frames: framesOf(point),
    parts: [],
    partsOf: 'its ±',
    also: [measure, 'uncertainty'],
  };
}

/** Last session against first of one arm. */
export function explainChange(trend: Trend, arm: ArmTrend): Explanation {
  const { unit, measure } = trend;
  const [first, last] = [arm.points[0], arm.points.at(-1)];
  return {
    entry: 'change',
    of: `${nameOf(measure)}, ${armWords[arm.arm]}: last session less first`,
    result: changeWords[arm.verdict],
    interval: arm.interval && formatRange(arm.interval, unit, 'difference'),
    inputs: [
      ...(first && last && first !== last
        ? [sayPoint('First session', first, unit), sayPoint('Last session', last, unit)]
        : []),
      ...(arm.change === null
        ? []
        : [
            {
              name: 'Change, last − first',
              value: `${arm.change < 0 ? '−' : ''}${formatDifference(arm.change, unit)}`,
            },
          ]),
      ...(arm.detectable === null
        ? []
        : [
            {
              name: 'Smallest change that marking could not produce',
              value: formatDifference(arm.detectable, unit),
            },
          ]),
      ...sayWelch(arm, unit),
    ],
    frames: first && last && first !== last ? [...framesOf(first), ...framesOf(last)] : [],
    parts: sayParts(arm.welch?.parts ?? [], unit, {
      'first-strokes': 'how strokes of the first session differ',
      'second-strokes': 'how strokes of the last session differ',
      shared: 'set-up: the camera’s lean in either session',
    }),
    partsOf: 'the strokes’ standard error',
    also: ['sessionMean', measure, 'uncertainty'],
  };
}

/** The line through the sessions of one arm. */
export function explainSlope(trend: Trend, arm: ArmTrend): Explanation | null {
  const { slope, points } = arm;
  if (!slope) return null;
  const { unit, measure } = trend;
  const per = (value: number) => `${fixed(onScreen(value, unit), 2)}${differenceSignOf[unit]} per 30 days`;
  return {
    entry: 'slope',
    of: `${nameOf(measure)}, ${armWords[arm.arm]}, over ${points.length} sessions`,
    result: per(slope.value),
    interval: `${fixed(onScreen(slope.low, unit), 2)} to ${fixed(onScreen(slope.high, unit), 2)}`,
    inputs: [
      { name: 'Robust slope', value: per(slope.robust) },
      { name: 'Standard error from the scatter about the line', value: sayAlone(slope.scatter, unit) },
      ...(slope.known === null
        ? []
        : [{ name: 'Standard uncertainty from the sessions’ own', value: sayAlone(slope.known, unit) }]),
      ...points.map((point) => sayPoint(sayDay(point.date), point, unit)),
    ],
    frames: points.flatMap((point) => framesOf(point).slice(0, 1)),
    parts: [],
    partsOf: 'the interval',
    also: ['robustSlope', 'sessionMean', measure],
  };
}

function sayWelch({ welch }: ArmTrend, unit: Unit): ExplainedInput[] {
  if (!welch) return [];
  return [
    { name: 'Standard error from the strokes’ spread', value: sayAlone(welch.standardError, unit) },
    { name: 'Degrees of freedom ν', value: fixed(welch.degreesOfFreedom, 1) },
    { name: 't for 95 %', value: fixed(welch.quantile, 3) },
  ];
}

function sayPoint(name: string, point: TrendPoint, unit: Unit): ExplainedInput {
  const figure = `${formatFigure(point.mean, unit, point.uncertainty)} ${formatUncertainty(point.uncertainty, unit)}`;
  return {
    name,
    value: `${figure}, ${point.count} ${countWords(point)}, of it marking ${sayAlone(point.marking, unit)}`,
  };
}

function countWords({ arm, count }: TrendPoint): string {
  const one = arm === 'both' ? 'passage' : 'stroke';
  return count === 1 ? one : `${one}s`;
}

function framesOf(point: TrendPoint): ExplainedFrame[] {
  return point.frames.map(({ clipId, frame }) => ({
    clipId,
    frame,
    arm: point.arm === 'both' ? null : point.arm,
    says: `${sayDay(point.date)}, frame ${frame}`,
  }));
}
