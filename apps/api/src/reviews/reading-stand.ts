import type { ReadingSource, ReadingStand } from '@stillstroke/contract/review-readings';
import { angleNames, measureNames } from '@stillstroke/contract/measure-names';
import { clips, marks, sessions, strokes } from '@stillstroke/db/schema/film';
import { sessionMean } from '@stillstroke/geometry/trend/session-mean';
import { and, eq, isNull } from 'drizzle-orm';
import { markAnswer } from '../marks/mark-answer';
import { measureStrokes, strokeEvents } from '../measures/clip-reading';
import { comparedView } from '../measures/compared-view';
import { keptFigures, markingPart, sharedPart, type KeptFigure } from '../measures/kept-figures';
import { figuresByMeasure, setUpPart } from '../measures/stroke-figures';
import { unitOf } from '../measures/units';
import type { Reader } from './review-reach';

/** What a reading says, before it is set against an earlier review. */
export type Standing = Omit<ReadingStand, 'earlier'>;
type SourceOf<K extends ReadingSource['kind']> = Extract<ReadingSource, { kind: K }>;

/** What a reading says now; `gone` as its reason when what it was read from is not there, or is another athlete's. */
export function standNow(db: Reader, athleteId: string, source: ReadingSource): Standing {
  switch (source.kind) {
    case 'session':
      return sessionStand(db, athleteId, source);
    case 'stroke':
      return strokeStand(db, athleteId, source);
    case 'frame':
      return frameStand(db, athleteId, source);
  }
}

function sessionStand(db: Reader, athleteId: string, source: SourceOf<'session'>): Standing {
  const { sessionId, arm, measure, split } = source;
  const mine = and(eq(sessions.id, sessionId), eq(sessions.athleteId, athleteId));
  const session = db
    .select({ date: sessions.date })
    .from(sessions)
    .where(and(mine, isNull(sessions.deletedAt)))
    .get();
  const base = { ...nothing, unit: unitOf[measure], arm, measure, split, date: session?.date ?? null };
  const named = (strokesWords: string) => `${measureNames[measure]}, ${arm} arm, ${strokesWords}`;
  if (!session) return { ...base, words: named('mean of a session'), reason: 'gone' };
  const view = viewOf(db, sessionId);
  const figures = keptFigures(db, and(mine, eq(strokes.arm, arm)) ?? eq(sessions.id, sessionId)).filter(
    (figure) => figure.measure === measure && figure.view === view && isInSplit(figure, split),
  );
  const mean = sessionMean(
    figures.map(({ value }) => value),
    { marking: figures.map(markingPart), setUp: sharedPart(figures) },
  );
  const [first] = figures;
  if (!mean.ok || !first)
    return { ...base, view, words: named(ofStrokes(0, split)), reason: 'too-few-marks' };
  const { count, sd, marking, setUp, uncertainty } = mean.value;
  return {
    ...base,
    words: named(ofStrokes(count, split)),
    value: mean.value.mean,
    uncertainty,
    view,
    clipId: first.clipId,
    frame: first.frame,
    spread: { count, sd, marking, setUp },
  };
}

/** The view whose full strokes stand for the session, as in its comparison. */
function viewOf(db: Reader, sessionId: string) {
  const there = db
    .selectDistinct({ view: clips.view })
    .from(clips)
    .innerJoin(strokes, eq(strokes.clipId, clips.id))
    .where(and(eq(clips.sessionId, sessionId), isNull(clips.deletedAt), eq(clips.stroke, 'full')))
    .all();
  return comparedView(there.map(({ view }) => view));
}

function isInSplit({ breath }: KeptFigure, split: SourceOf<'session'>['split']): boolean {
  return split === 'all' || breath === (split === 'breathing');
}

function ofStrokes(count: number, split: SourceOf<'session'>['split']): string {
  const kind = { all: '', breathing: ' with a breath', 'not-breathing': ' without a breath' }[split];
  if (count === 1) return `one stroke${kind}`;
  return count === 0 ? `mean of strokes${kind}` : `mean of ${count} strokes${kind}`;
}

function strokeStand(db: Reader, athleteId: string, source: SourceOf<'stroke'>): Standing {
  const { clipId, strokeId, measure } = source;
  const base = { ...nothing, unit: unitOf[measure], measure };
  const found = clipOf(db, athleteId, clipId);
  const [measured] = found ? measureStrokes(db, found.clip, ({ id }) => id === strokeId) : [];
  if (!found || !measured)
    return { ...base, words: `${measureNames[measure]} of one stroke`, reason: 'gone' };
  const { stroke, measures } = measured;
  const { value, uncertainty, reason, frame } = figuresByMeasure(strokeEvents(stroke), measures)[measure];
  return {
    ...base,
    words: `${measureNames[measure]}, ${stroke.arm} arm, stroke from frame ${stroke.entryFrame}${stroke.breath ? ', with a breath' : ''}`,
    arm: stroke.arm,
    value,
    uncertainty,
    reason,
    clipId,
    frame: frame ?? stroke.catchFrame,
    date: found.date,
    view: found.clip.view,
    spread:
      uncertainty === null
        ? null
        : { count: 1, sd: null, marking: uncertainty, setUp: setUpPart(measures, measure) },
  };
}

function frameStand(db: Reader, athleteId: string, source: SourceOf<'frame'>): Standing {
  const { clipId, arm, frame, angle } = source;
  const base = {
    ...nothing,
    words: `${angleNames[angle]}, ${arm} arm, frame ${frame}`,
    unit: 'deg' as const,
    arm,
    angle,
  };
  const found = clipOf(db, athleteId, clipId);
  if (!found) return { ...base, reason: 'gone' };
  const here = { ...base, clipId, frame, date: found.date, view: found.clip.view };
  const row = db
    .select()
    .from(marks)
    .where(and(eq(marks.clipId, clipId), eq(marks.arm, arm), eq(marks.frame, frame)))
    .get();
  if (!row) return { ...here, reason: 'not-marked' };
  const mark = markAnswer(row, found.clip);
  const uncertainty = mark.uncertaintyDeg[angle];
  return {
    ...here,
    value: mark.angles[angle],
    uncertainty,
    spread: { count: 1, sd: null, marking: uncertainty, setUp: 0 },
  };
}

/** A clip of this athlete that is not deleted, with the date of its session. */
export function clipOf(db: Reader, athleteId: string, clipId: string) {
  return db
    .select({ clip: clips, date: sessions.date })
    .from(clips)
    .innerJoin(sessions, eq(sessions.id, clips.sessionId))
    .where(
      and(
        eq(clips.id, clipId),
        eq(sessions.athleteId, athleteId),
        isNull(clips.deletedAt),
        isNull(sessions.deletedAt),
      ),
    )
    .get();
}

const nothing = {
  value: null,
  uncertainty: null,
  reason: null,
  arm: null,
  measure: null,
  angle: null,
  split: null,
  target: null,
  clipId: null,
  frame: null,
  date: null,
  view: null,
  spread: null,
};
