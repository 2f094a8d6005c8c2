import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Comparison } from '@stillstroke/contract/comparison';
import type { Db } from '@stillstroke/db/open';
import { clips, sessions, strokes } from '@stillstroke/db/schema/film';
import { VERTICAL_TOLERANCE_DEG } from '@stillstroke/geometry/events/vertical-at';
import { and, asc, eq, inArray, isNull } from 'drizzle-orm';
import type { ClipRow } from '../clips/clip-answer';
import { comparedView } from '../measures/compared-view';
import { coordinationOf, keptPassages } from '../measures/coordination-figures';
import { forearmCurves } from '../measures/forearm-curves';
import { keptCautions } from '../measures/kept-cautions';
import { keptFigures } from '../measures/kept-figures';
import type { AppContext } from '../platform/context';
import { liveSession } from '../sessions/live-film';
import { compareBreath } from './compare-breath';
import { compareFigures } from './compare-figures';

/** Left against right in a session, over all strokes and apart by breath. Only full strokes of one side view go in. */
export function getComparison(
  { db }: Pick<AppContext, 'db'>,
  user: SignedInUser,
  sessionId: string,
): Comparison {
  const { session } = liveSession(db, user, sessionId);
  const { taken, leftOut } = sortOut(db, session.id);
  const takenIds = new Set(taken.map(({ id }) => id));
  const figures = keptFigures(db, eq(sessions.id, session.id)).filter(({ clipId }) => takenIds.has(clipId));
  const passages = keptPassages(db, eq(sessions.id, session.id)).filter(({ clipId }) => takenIds.has(clipId));
  return {
    sessionId: session.id,
    splits: {
      all: compareFigures(figures),
      breathing: compareFigures(figures.filter(({ breath }) => breath)),
      notBreathing: compareFigures(figures.filter(({ breath }) => !breath)),
    },
    breath: compareBreath(figures),
    view: taken[0]?.view ?? null,
    coordination: {
      all: coordinationOf(passages),
      breathing: coordinationOf(passages.filter(({ breath }) => breath)),
      notBreathing: coordinationOf(passages.filter(({ breath }) => !breath)),
    },
    strokes: taken.flatMap((clip) => comparedStrokes(db, clip)),
    cautions: keptCautions(db, inArray(clips.id, [...takenIds])),
    plumbAssumed: taken.some((clip) => clip.plumbTopX === null),
    verticalToleranceDeg: VERTICAL_TOLERANCE_DEG,
    leftOut,
  };
}

/** Which clips of a session are compared, and why the others are not. */
function sortOut(db: Db, sessionId: string): { taken: ClipRow[]; leftOut: Comparison['leftOut'] } {
  const all = db
    .select()
    .from(clips)
    .where(and(eq(clips.sessionId, sessionId), isNull(clips.deletedAt)))
    .orderBy(asc(clips.createdAt), asc(clips.id))
    .all();
  const withStrokes = new Set(
    db
      .selectDistinct({ clipId: strokes.clipId })
      .from(strokes)
      .where(
        inArray(
          strokes.clipId,
          all.map(({ id }) => id),
        ),
      )
      .all()
      .map(({ clipId }) => clipId),
  );
  const measured = all.filter(({ id, stroke }) => stroke === 'full' && withStrokes.has(id));
  const view = comparedView(measured.map((clip) => clip.view));
  const taken = measured.filter((clip) => clip.view === view);
  const leftOut = all
    .filter((clip) => !taken.includes(clip))
    .map((clip) => ({ clipId: clip.id, reason: reasonOf(clip, withStrokes.has(clip.id)) }));
  return { taken, leftOut };
}

function reasonOf({ stroke }: ClipRow, hasStrokes: boolean): Comparison['leftOut'][number]['reason'] {
  if (stroke === 'drill') return 'drill';
  return hasStrokes ? 'other-view' : 'no-strokes';
}

function comparedStrokes(db: Db, clip: ClipRow): Comparison['strokes'] {
  return forearmCurves(db, clip).map(({ stroke, forearmCurve, dropCurve }) => ({
    clipId: clip.id,
    strokeId: stroke.id,
    arm: stroke.arm,
    breath: stroke.breath,
    catch: stroke.catchFrame,
    exit: stroke.exitFrame,
    forearmCurve,
    dropCurve,
  }));
}
