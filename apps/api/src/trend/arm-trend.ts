import type { Trend, TrendPoint } from '@stillstroke/contract/trend';
import { sessionChange, type ChangeVerdict as SessionVerdict } from '@stillstroke/geometry/trend/change';
import { robustSlope } from '@stillstroke/geometry/trend/robust-slope';
import { sessionMean, type SessionMean } from '@stillstroke/geometry/trend/session-mean';
import { slopeOf, type TrendPoint as SlopePoint } from '@stillstroke/geometry/trend/slope';
import { grouped } from '../measures/grouped';
import { markingPart, sharedPart, type KeptFigure } from '../measures/kept-figures';

type ArmTrend = Trend['arms'][number];
type Arm = ArmTrend['arm'];

const DAY_MS = 86_400_000;
/** Slopes are told per this many days. */
const SLOPE_DAYS = 30;

/** One value of the sample: a stroke of an arm, or a passage of both. */
export interface TrendFigure extends Pick<
  KeptFigure,
  'sessionId' | 'date' | 'view' | 'clipId' | 'value' | 'uncertainty' | 'setUp' | 'frame'
> {
  readonly arm: Arm;
}

interface MeasuredSession {
  readonly point: TrendPoint;
  readonly mean: SessionMean;
}

/** One arm over the sessions: figures of one measure and one view, by date. */
export function armTrend(arm: Arm, figures: readonly TrendFigure[]): ArmTrend {
  const ofArm = figures.filter((figure) => figure.arm === arm);
  const sessions = [...grouped(ofArm, ({ sessionId }) => sessionId).values()].flatMap((of) =>
    measuredSession(arm, of),
  );
  return {
    arm,
    points: sessions.map(({ point }) => point),
    ...changeOf(sessions),
    slope: slopeThrough(sessions),
  };
}

function measuredSession(arm: Arm, figures: readonly TrendFigure[]): MeasuredSession[] {
  const [first] = figures;
  const mean = sessionMean(
    figures.map(({ value }) => value),
    { marking: figures.map(markingPart), setUp: sharedPart(figures) },
  );
  if (!first || !mean.ok) return [];
  const point = {
    sessionId: first.sessionId,
    date: first.date,
    arm,
    mean: mean.value.mean,
    uncertainty: mean.value.uncertainty,
    count: mean.value.count,
    sd: mean.value.sd,
    marking: mean.value.marking,
    setUp: mean.value.setUp,
    frames: figures.map(({ clipId, frame }) => ({ clipId, frame })),
  };
  return [{ point, mean: mean.value }];
}

const verdicts: Readonly<Record<SessionVerdict, ArmTrend['verdict']>> = {
  changed: 'changed',
  'not-more-than-marking-could-produce': 'not-more-than-marking',
  'not-more-than-strokes-vary': 'not-more-than-strokes-vary',
  'too-few': 'too-few',
};

type ChangeFields = Pick<ArmTrend, 'change' | 'interval' | 'welch' | 'detectable' | 'verdict'>;

/** Last against first session. */
function changeOf(sessions: readonly MeasuredSession[]): ChangeFields {
  const first = sessions[0];
  const last = sessions.at(-1);
  const none = { change: null, interval: null, welch: null, detectable: null, verdict: 'too-few' } as const;
  if (!first || !last || first === last) return none;
  const change = sessionChange(first.mean, last.mean);
  if (!change.ok) return none;
  const { welch, interval } = change.value;
  return {
    change: change.value.change,
    interval,
    welch: welch && {
      standardError: welch.standard,
      degreesOfFreedom: welch.degreesOfFreedom,
      quantile: welch.quantile,
      parts: [...welch.parts],
    },
    detectable: change.value.minimalChange,
    verdict: verdicts[change.value.verdict],
  };
}

function slopeThrough(sessions: readonly MeasuredSession[]): ArmTrend['slope'] {
  const points = sessions.map(({ point }): SlopePoint => {
    const x = Date.parse(point.date) / DAY_MS / SLOPE_DAYS;
    return { x, y: point.mean };
  });
  const weighted = sessions.every(({ point }) => point.uncertainty > 0)
    ? points.map((point, at) => ({ ...point, uncertainty: sessions[at]?.point.uncertainty ?? 0 }))
    : points;
  const line = slopeOf(weighted);
  const robust = robustSlope(points);
  if (!line.ok || !robust.ok) return null;
  const { low, high } = line.value.interval;
  const { slope: value, scatter, known } = line.value;
  return { value, low, high, robust: robust.value.slope, scatter, known };
}
