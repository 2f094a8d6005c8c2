import type { Figure, Measure, StrokeMeasures as StrokeAnswer } from '@stillstroke/contract/measures';
import { eventTimeUncertaintyUs, type FrameTimesUs } from '@stillstroke/geometry/events/frame-times';
import type { StrokeEvents } from '@stillstroke/geometry/events/stroke';
import type { Measured } from '@stillstroke/geometry/measures/measured';
import { measuredByName, type StrokeMeasureName } from '@stillstroke/geometry/measures/measured-by-name';
import type { StrokeMeasures } from '@stillstroke/geometry/measures/stroke-measures';
import type { Outcome } from '@stillstroke/geometry/outcome';

/** The figures of a stroke as the contract names them, from what the geometry library measured. */
export function figuresOf(
  events: StrokeEvents,
  measures: StrokeMeasures,
  times: FrameTimesUs,
): Pick<
  StrokeAnswer,
  'phases' | 'verticalAtShare' | 'peakElbowDrop' | 'elbowAtMidPull' | 'midPull' | 'strokeRate'
> {
  const named = (name: StrokeMeasureName) => measuredFigure(measuredByName(name, events, measures, times));
  return {
    phases: {
      entryAndCatch: named('entryAndCatch'),
      pull: named('pull'),
      push: named('push'),
      recovery: named('recovery'),
    },
    verticalAtShare: named('verticalAt'),
    peakElbowDrop: named('peakDrop'),
    elbowAtMidPull: named('elbowAtMidPull'),
    midPull: midPullFigure(events, measures, times),
    strokeRate: named('strokeRate'),
  };
}

/** The same by the names under which Compare and Trend know them. */
export function figuresByMeasure(
  events: StrokeEvents,
  measures: StrokeMeasures,
  times: FrameTimesUs,
): Readonly<Record<Measure, Figure>> {
  const { phases, verticalAtShare, peakElbowDrop, elbowAtMidPull, strokeRate } = figuresOf(
    events,
    measures,
    times,
  );
  return { ...phases, verticalAt: verticalAtShare, peakDrop: peakElbowDrop, elbowAtMidPull, strokeRate };
}

/**
 * The part of a measure's standard uncertainty that every stroke of the clip shares: the camera's roll. Zero where it
 * cancels, as in angles between two segments, and in shares of time.
 */
export function setUpPart(measures: StrokeMeasures, measure: Measure): number {
  const outcome = sharing(measures, measure);
  if (!outcome?.ok) return 0;
  return outcome.value.parts.find(({ source }) => source === 'roll')?.alone ?? 0;
}

function sharing(measures: StrokeMeasures, measure: Measure): Outcome<Measured> | null {
  switch (measure) {
    case 'verticalAt':
    case 'peakDrop':
    case 'elbowAtMidPull':
      return measures[measure];
    default:
      return null;
  }
}

const none = (reason: string): Figure => ({
  value: null,
  uncertainty: null,
  reason,
  frame: null,
  frames: [],
});

export function measuredFigure(outcome: Outcome<Measured>): Figure {
  if (!outcome.ok) return none(outcome.reason);
  const { value, uncertainty, frame, frames } = outcome.value;
  return { value, uncertainty, reason: null, frame, frames: [...frames] };
}

/**
 * Share of the pull at which the hand passes under the shoulder: s = (m − c)/(e − c) of mid-pull, catch and exit. With
 * L = e − c, u(s)² = (u_m² + (1 − s)²·u_c² + s²·u_e²)/L² (JCGM 100:2008, eq. (10)).
 */
function midPullFigure(events: StrokeEvents, { midPull }: StrokeMeasures, times: FrameTimesUs): Figure {
  if (!midPull.ok) return none(midPull.reason);
  const { share, frame, frames, uncertaintyUs } = midPull.value;
  const lengthUs = (times[events.exit] ?? 0) - (times[events.catch] ?? 0);
  const uncertainty =
    Math.hypot(
      uncertaintyUs,
      (1 - share) * eventTimeUncertaintyUs(times, events.catch),
      share * eventTimeUncertaintyUs(times, events.exit),
    ) / lengthUs;
  return { value: share, uncertainty, reason: null, frame, frames: [events.catch, ...frames, events.exit] };
}
