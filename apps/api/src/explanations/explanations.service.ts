import type { SignedInUser } from '@stillstroke/contract/auth';
import type { StrokeExplanation } from '@stillstroke/contract/explanation';
import type { Measure } from '@stillstroke/contract/measures';
import { strokes } from '@stillstroke/db/schema/film';
import type { FrameMark } from '@stillstroke/geometry/arm';
import { EVENT_ERROR_FRAMES } from '@stillstroke/geometry/events/frame-times';
import type { StrokeEvents } from '@stillstroke/geometry/events/stroke';
import { VERTICAL_TOLERANCE_DEG } from '@stillstroke/geometry/events/vertical-at';
import { measuredByName } from '@stillstroke/geometry/measures/measured-by-name';
import { strokeMeasures } from '@stillstroke/geometry/measures/stroke-measures';
import { eq } from 'drizzle-orm';
import { plumbOf } from '../clips/clip-answer';
import { readStrokes, strokeEvents } from '../measures/clip-reading';
import { measuredFigure } from '../measures/stroke-figures';
import { unitOf } from '../measures/units';
import type { AppContext } from '../platform/context';
import { notFound } from '../platform/problem';
import { liveClip } from '../sessions/live-film';

/** How one figure of a stroke came about, from the same functions that made the figure. */
export function explainStroke(
  { db }: Pick<AppContext, 'db'>,
  user: SignedInUser,
  strokeId: string,
  measure: Measure,
): StrokeExplanation {
  const stroke = db.select().from(strokes).where(eq(strokes.id, strokeId)).get();
  if (!stroke) throw notFound('stroke');
  const { clip } = liveClip(db, user, stroke.clipId);
  const { marks, times, context } = readStrokes(db, clip, ({ id }) => id === stroke.id);
  const events = strokeEvents(stroke);
  const measured = measuredByName(measure, strokeMeasures(events, marks[stroke.arm], times, context));
  const figure = measuredFigure(measured);
  return {
    strokeId: stroke.id,
    clipId: clip.id,
    arm: stroke.arm,
    breath: stroke.breath,
    measure,
    unit: unitOf[measure],
    figure,
    interval: measured.ok ? measured.value.interval : null,
    parts: measured.ok ? [...measured.value.parts] : [],
    events: eventsOf(events, times),
    marks: marks[stroke.arm].filter(({ frame }) => figure.frames.includes(frame)).map(placed),
    plumb: plumbOf(clip),
    travel: clip.travel,
    captureRateFactor: clip.captureRateFactor,
    verticalToleranceDeg: context.verticalToleranceDeg ?? VERTICAL_TOLERANCE_DEG,
    jointUncertaintyPx: context.jointUncertaintyPx,
    jointUncertaintyOwn: clip.jointShoulderPx !== null,
    eventErrorFrames: context.eventErrorFrames ?? EVENT_ERROR_FRAMES,
  };
}

function eventsOf(events: StrokeEvents, times: readonly number[]): StrokeExplanation['events'] {
  return (['entry', 'catch', 'exit', 'nextEntry'] as const).flatMap((event) => {
    const frame = events[event];
    return frame === null ? [] : [{ event, frame, timeUs: times[frame] ?? null }];
  });
}

function placed({ frame, shoulder, elbow, wrist }: FrameMark): StrokeExplanation['marks'][number] {
  return { frame, shoulder, elbow, wrist };
}
