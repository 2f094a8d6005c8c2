import type { ExportClip, ExportFigure, ExportMark, ExportStroke } from '@stillstroke/contract/export';
import { measureSchema, type Figure } from '@stillstroke/contract/measures';
import type { Db } from '@stillstroke/db/open';
import { marks } from '@stillstroke/db/schema/film';
import { asc, eq } from 'drizzle-orm';
import { clipAnswer, type ClipRow } from '../clips/clip-answer';
import { markAnswer } from '../marks/mark-answer';
import {
  clipTimes,
  measureStrokes,
  readingContext,
  strokeEvents,
  type MeasuredStroke,
} from '../measures/clip-reading';
import { figuresByMeasure } from '../measures/stroke-figures';
import { strokeAnswer } from '../strokes/stroke-answer';

/** A clip as it leaves the product: facts, set-up, strokes by arm and entry, marks by arm and frame, and all figures. */
export function exportedClip(db: Db, row: ClipRow): ExportClip {
  const {
    sessionId: _session,
    athleteId: _athlete,
    status: _status,
    hasPoster: _poster,
    markedFrames: _marked,
    strokeCount: _strokes,
    deletedAt: _deleted,
    ...facts
  } = clipAnswer(db, row.id);
  return {
    ...facts,
    jointUncertaintyPx: readingContext(row).jointUncertaintyPx,
    timesUs: clipTimes(db, row.id),
    strokes: measureStrokes(db, row).map(exportedStroke),
    marks: exportedMarks(db, row),
  };
}

function exportedStroke({ stroke, measures }: MeasuredStroke): ExportStroke {
  const { clipId: _clip, version: _version, ...events } = strokeAnswer(stroke);
  const figures = figuresByMeasure(strokeEvents(stroke), measures);
  return {
    ...events,
    figures: Object.fromEntries(measureSchema.options.map((name) => [name, exportedFigure(figures[name])])),
  };
}

function exportedFigure({ value, uncertainty, frame, reason }: Figure): ExportFigure {
  return { value, uncertainty, frame, reason };
}

function exportedMarks(db: Db, row: ClipRow): ExportMark[] {
  return db
    .select()
    .from(marks)
    .where(eq(marks.clipId, row.id))
    .orderBy(asc(marks.arm), asc(marks.frame))
    .all()
    .map((mark) => {
      const { version: _version, updatedAt: _updated, ...rest } = markAnswer(mark, row);
      return rest;
    });
}
