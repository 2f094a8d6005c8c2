import type { Figure, StrokeMeasures } from '@stillstroke/contract/measures';
import type { FittedScale } from '@stillstroke/geometry/calibration/picture-scale';
import type { FrameMark } from '@stillstroke/geometry/arm';
import type { StrokeEvents } from '@stillstroke/geometry/events/stroke';
import { handPath, type HandReading } from '@stillstroke/geometry/measures/hand-path';
import type { Outcome } from '@stillstroke/geometry/outcome';
import type { MarkingContext } from '@stillstroke/geometry/uncertainty/arm-uncertainty';

/** What a scale adds to a stroke, metres. */
export function handFigures(
  scale: FittedScale,
  events: StrokeEvents,
  marks: readonly FrameMark[],
  context: MarkingContext,
): NonNullable<StrokeMeasures['inMetres']> {
  const { reachAtEntry, handDepth } = handPath(scale, events, marks, context);
  return { reachAtEntry: figureOf(reachAtEntry), handDepth: figureOf(handDepth) };
}

function figureOf(outcome: Outcome<HandReading>): Figure {
  if (!outcome.ok) {
    return { value: null, uncertainty: null, reason: outcome.reason, frame: null, frames: [] };
  }
  const { metres, uncertaintyM, frame, frames } = outcome.value;
  return { value: metres, uncertainty: uncertaintyM, reason: null, frame, frames: [...frames] };
}
