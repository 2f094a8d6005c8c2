import type { SignedInUser } from '@stillstroke/contract/auth';
import type { AnswerOf } from '@stillstroke/contract/endpoint';
import type { getMeasures as measuresCall, StrokeMeasures } from '@stillstroke/contract/measures';
import { VERTICAL_TOLERANCE_DEG } from '@stillstroke/geometry/events/vertical-at';
import type { AppContext } from '../platform/context';
import { liveClip } from '../sessions/live-film';
import { measureStrokes, strokeEvents, type MeasuredStroke } from './clip-reading';
import { figuresOf } from './stroke-figures';

/** Everything measured on a clip, per stroke, by arm and entry. */
export function getMeasures(
  { db }: Pick<AppContext, 'db'>,
  user: SignedInUser,
  clipId: string,
): AnswerOf<typeof measuresCall> {
  const { clip } = liveClip(db, user, clipId);
  return {
    items: measureStrokes(db, clip).map(answerOf),
    nextCursor: null,
    plumbAssumed: clip.plumbTopX === null,
    verticalToleranceDeg: VERTICAL_TOLERANCE_DEG,
  };
}

function answerOf({ stroke, measures, times }: MeasuredStroke): StrokeMeasures {
  return {
    strokeId: stroke.id,
    arm: stroke.arm,
    breath: stroke.breath,
    ...figuresOf(strokeEvents(stroke), measures, times),
    forearmCurve: [...measures.forearmCurve],
    dropCurve: [...measures.dropCurve],
  };
}
