import type { Figure, Measure, StrokeMeasures as StrokeAnswer } from '@stillstroke/contract/measures';
import type { StrokeEvents } from '@stillstroke/geometry/events/stroke';
import type { Measured } from '@stillstroke/geometry/measures/measured';
import { measuredByName, type StrokeMeasureName } from '@stillstroke/geometry/measures/measured-by-name';
import type { StrokeMeasures } from '@stillstroke/geometry/measures/stroke-measures';
import type { Outcome } from '@stillstroke/geometry/outcome';
import type { UncertaintySource } from '@stillstroke/geometry/uncertainty/parts';

/** The figures of a stroke as the contract names them, from what the geometry library measured. */
export function figuresOf(
  events: StrokeEvents,
  measures: StrokeMeasures,
): Pick<
  StrokeAnswer,
  | 'phases'
  | 'verticalAtShare'
  | 'peakElbowDrop'
  | 'elbowAtMidPull'
  | 'midPull'
  | 'strokeRate'
  | 'strokeLength'
  | 'strokeIndex'
> {
  const named = (name: StrokeMeasureName) => measuredFigure(measuredByName(name, measures));
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
    midPull: midPullFigure(events, measures),
    strokeRate: named('strokeRate'),
    strokeLength: named('strokeLength'),
    strokeIndex: named('strokeIndex'),
  };
}

/** The same by the names under which Compare and Trend know them. */
export function figuresByMeasure(
  events: StrokeEvents,
  measures: StrokeMeasures,
): Readonly<Record<Measure, Figure>> {
  const { phases, verticalAtShare, peakElbowDrop, midPull: _, ...named } = figuresOf(events, measures);
  return { ...phases, ...named, verticalAt: verticalAtShare, peakDrop: peakElbowDrop };
}

/**
 * The part of a measure's standard uncertainty that every stroke of the clip shares: the camera's roll, and the clip's
 * speed over its known distance. Zero where it cancels, as in angles between two segments, and in shares of time.
 */
export function setUpPart(measures: StrokeMeasures, measure: Measure): number {
  const outcome = sharing(measures, measure);
  if (!outcome?.ok) return 0;
  const shared = outcome.value.parts.filter(({ source }) => sharedSources.has(source));
  return Math.hypot(...shared.map(({ alone }) => alone));
}

const sharedSources: ReadonlySet<UncertaintySource> = new Set(['roll', 'distance', 'time'] as const);

function sharing(measures: StrokeMeasures, measure: Measure): Outcome<Measured> | null {
  switch (measure) {
    case 'verticalAt':
    case 'peakDrop':
    case 'elbowAtMidPull':
    case 'strokeLength':
    case 'strokeIndex':
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

/** Share of the pull at which the hand passes under the shoulder. */
function midPullFigure(events: StrokeEvents, { midPull }: StrokeMeasures): Figure {
  if (!midPull.ok) return none(midPull.reason);
  const { share, shareUncertainty, frame, frames } = midPull.value;
  return {
    value: share,
    uncertainty: shareUncertainty,
    reason: null,
    frame,
    frames: [events.catch, ...frames, events.exit],
  };
}
