import { preparedOnce } from '@stillstroke/db/prepared-once';
import { clipFrames, clips, marks, strokes } from '@stillstroke/db/schema/film';
import { clipDistances } from '@stillstroke/db/schema/timing';
import type { Db } from '@stillstroke/db/open';
import type { FrameMark } from '@stillstroke/geometry/arm';
import type { KnownDistance } from '@stillstroke/geometry/events/known-distance';
import type { StrokeEvents } from '@stillstroke/geometry/events/stroke';
import type { ReadingContext } from '@stillstroke/geometry/measures/reading-context';
import { strokeMeasures, type StrokeMeasures } from '@stillstroke/geometry/measures/stroke-measures';
import { and, asc, eq, sql } from 'drizzle-orm';
import type { ViewContext } from '@stillstroke/geometry/view/view-context';
import { fieldOfViewOf, jointUncertaintyOf, plumbOf, type ClipRow } from '../clips/clip-answer';
import { frameTimes } from '../media/frame-blobs';

export type StrokeRow = typeof strokes.$inferSelect;
export type MarkRow = typeof marks.$inferSelect;
type Arm = StrokeRow['arm'];

/** A database or a transaction in it. */
export type Reader = Pick<Db, 'select'>;

const clipId = sql.placeholder('clipId');
const clipQuery = preparedOnce((db) => db.select().from(clips).where(eq(clips.id, clipId)).prepare());
const strokesQuery = preparedOnce((db) =>
  db
    .select()
    .from(strokes)
    .where(eq(strokes.clipId, clipId))
    .orderBy(asc(strokes.arm), asc(strokes.entryFrame))
    .prepare(),
);
const armMarkQuery = preparedOnce((db) =>
  db
    .select()
    .from(marks)
    .where(and(eq(marks.clipId, clipId), eq(marks.arm, sql.placeholder('arm'))))
    .orderBy(asc(marks.frame))
    .prepare(),
);
const timesQuery = preparedOnce((db) =>
  db
    .select({ times: clipFrames.timestampsUs })
    .from(clipFrames)
    .where(eq(clipFrames.clipId, clipId))
    .prepare(),
);

/** Strokes of a clip, by arm and entry. */
export function strokeRows(db: Reader, ofClip: string): StrokeRow[] {
  return strokesQuery(db).all({ clipId: ofClip });
}

/** What the readings of a clip depend on beside marks, events and frame times. */
export function readingContext(clip: ClipRow): ReadingContext {
  return {
    plumb: plumbOf(clip),
    travel: clip.travel,
    jointUncertaintyPx: jointUncertaintyOf(clip),
    captureRateFactor: clip.captureRateFactor,
  };
}

/** What the view checks of a clip depend on beside its marks. */
export function viewContext(clip: ClipRow): ViewContext {
  const { view, width, height } = clip;
  return {
    ...readingContext(clip),
    view,
    picture: { width, height },
    fieldOfView: fieldOfViewOf(clip),
  };
}

export function strokeEvents(row: StrokeRow): StrokeEvents {
  return {
    entry: row.entryFrame,
    catch: row.catchFrame,
    exit: row.exitFrame,
    nextEntry: row.nextEntryFrame,
    entrySource: row.entrySource,
    catchSource: row.catchSource,
    exitSource: row.exitSource,
    nextEntrySource: row.nextEntrySource,
  };
}

export function frameMark(row: MarkRow): FrameMark {
  return {
    frame: row.frame,
    shoulder: { x: row.shoulderX, y: row.shoulderY },
    elbow: { x: row.elbowX, y: row.elbowY },
    wrist: { x: row.wristX, y: row.wristY },
  };
}

/** How far the swimmer travelled over two frames of the clip; null where nobody said. */
export function knownDistance(db: Reader, clipId: string): KnownDistance | null {
  return distanceQuery(db).get({ clipId }) ?? null;
}

const distanceQuery = preparedOnce((db) => {
  const { metres, uncertaintyM, fromFrame, toFrame } = clipDistances;
  return db
    .select({ metres, uncertaintyM, fromFrame, toFrame })
    .from(clipDistances)
    .where(eq(clipDistances.clipId, sql.placeholder('clipId')))
    .prepare();
});

/** Frame times of a clip in whole microseconds. */
export function clipTimes(db: Reader, clipId: string): number[] {
  const blob = timesQuery(db).get({ clipId });
  return blob ? Array.from(frameTimes(blob.times)) : [];
}

export interface MeasuredStroke {
  readonly stroke: StrokeRow;
  readonly measures: StrokeMeasures;
  /** Of the stroke's arm, all along the clip. */
  readonly marks: readonly FrameMark[];
  /** Of the clip's frames, whole microseconds. */
  readonly times: readonly number[];
}

/** Strokes of a clip, by arm and entry, with the marks, times and context to read them. */
export function readStrokes(db: Reader, clip: ClipRow, wanted: (stroke: StrokeRow) => boolean = () => true) {
  const found = strokeRows(db, clip.id).filter(wanted);
  const marksOf = (arm: Arm) => (found.length === 0 ? [] : armMarks(db, clip.id, arm));
  return {
    strokes: found,
    marks: { left: marksOf('left'), right: marksOf('right') },
    times: found.length === 0 ? [] : clipTimes(db, clip.id),
    context: { ...readingContext(clip), distance: knownDistance(db, clip.id) },
  };
}

/** Measures the strokes of a clip, by arm and entry. `wanted` leaves strokes out before anything is computed. */
export function measureStrokes(
  db: Reader,
  clip: ClipRow,
  wanted?: (stroke: StrokeRow) => boolean,
): MeasuredStroke[] {
  const { strokes: found, marks: ofArm, times, context } = readStrokes(db, clip, wanted);
  return found.map((stroke) => ({
    stroke,
    times,
    marks: ofArm[stroke.arm],
    measures: strokeMeasures(strokeEvents(stroke), ofArm[stroke.arm], times, context),
  }));
}

function armMarks(db: Reader, clipId: string, arm: Arm): FrameMark[] {
  return armMarkQuery(db).all({ clipId, arm }).map(frameMark);
}

export function clipRow(db: Reader, clipId: string): ClipRow | undefined {
  return clipQuery(db).get({ clipId });
}
