import type { SignedInUser } from '@stillstroke/contract/auth';
import type { AnswerOf } from '@stillstroke/contract/endpoint';
import type { ViewCaution as CautionAnswer } from '@stillstroke/contract/view-cautions';
import type { getMeasures as measuresCall, StrokeMeasures } from '@stillstroke/contract/measures';
import { clips } from '@stillstroke/db/schema/film';
import { VERTICAL_TOLERANCE_DEG } from '@stillstroke/geometry/events/vertical-at';
import { eq } from 'drizzle-orm';
import { fitScale, type FittedScale } from '@stillstroke/geometry/calibration/picture-scale';
import type { ViewCaution } from '@stillstroke/geometry/view/caution';
import { clipCautions, strokeCautions } from '@stillstroke/geometry/view/view-cautions';
import type { ViewContext } from '@stillstroke/geometry/view/view-context';
import type { AppContext } from '../platform/context';
import { liveClip } from '../sessions/live-film';
import { scaleRow } from '../scales/scale-row';
import { measureStrokes, strokeEvents, viewContext, type MeasuredStroke } from './clip-reading';
import { handFigures } from './hand-figures';
import { coordinationOf, keptPassages } from './coordination-figures';
import { figuresOf } from './stroke-figures';

/** Everything measured on a clip, per stroke, by arm and entry, with what of the view it has to be read with. */
export function getMeasures(
  { db }: Pick<AppContext, 'db'>,
  user: SignedInUser,
  clipId: string,
): AnswerOf<typeof measuresCall> {
  const { clip } = liveClip(db, user, clipId);
  const view = viewContext(clip);
  const scale = scaleRow(db, clip.id)?.scale ?? null;
  const fitted = scale && fitScale(scale, view.jointUncertaintyPx.elbow);
  const usable = fitted?.ok ? fitted.value : null;
  return {
    items: measureStrokes(db, clip).map((measured) => answerOf(measured, view, usable)),
    nextCursor: null,
    coordination: coordinationOf(keptPassages(db, eq(clips.id, clip.id))),
    plumbAssumed: clip.plumbTopX === null,
    cautions: clipCautions(view).map(cautionAnswer),
    scalePlane: scale?.plane ?? null,
    verticalToleranceDeg: VERTICAL_TOLERANCE_DEG,
  };
}

function answerOf(measured: MeasuredStroke, view: ViewContext, scale: FittedScale | null): StrokeMeasures {
  const { stroke, measures, marks } = measured;
  const events = strokeEvents(stroke);
  return {
    strokeId: stroke.id,
    arm: stroke.arm,
    breath: stroke.breath,
    ...figuresOf(events, measures),
    forearmCurve: [...measures.forearmCurve],
    dropCurve: [...measures.dropCurve],
    cautions: strokeCautions(view, { arm: stroke.arm, ...events }, marks, measures).map(cautionAnswer),
    inMetres: scale && handFigures(scale, events, marks, view),
  };
}

function cautionAnswer({ frames, affects, ...caution }: ViewCaution): CautionAnswer {
  return { ...caution, frames: [...frames], affects: affects.map((affected) => ({ ...affected })) };
}
