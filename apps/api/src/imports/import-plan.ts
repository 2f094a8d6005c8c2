import type { ExportClip, ExportMark, ExportStroke } from '@stillstroke/contract/export';
import type { ImportChoice, ImportCounts } from '@stillstroke/contract/import';
import { marks, strokes } from '@stillstroke/db/schema/film';
import type { KnownDistance } from '@stillstroke/geometry/events/known-distance';
import { asc, eq } from 'drizzle-orm';
import { fieldOfViewOf, plumbOf, type ClipRow } from '../clips/clip-answer';
import {
  frameMark,
  knownDistance,
  type MarkRow,
  type Reader,
  type StrokeRow,
} from '../measures/clip-reading';
import { strokeAnswer } from '../strokes/stroke-answer';

/** What is on a clip of ours now. */
export interface OnClip {
  readonly strokes: readonly StrokeRow[];
  readonly marks: readonly MarkRow[];
  readonly distance: KnownDistance | null;
}

export function onClip(db: Reader, clipId: string): OnClip {
  return {
    strokes: db
      .select()
      .from(strokes)
      .where(eq(strokes.clipId, clipId))
      .orderBy(asc(strokes.arm), asc(strokes.entryFrame))
      .all(),
    marks: db
      .select()
      .from(marks)
      .where(eq(marks.clipId, clipId))
      .orderBy(asc(marks.arm), asc(marks.frame))
      .all(),
    distance: knownDistance(db, clipId),
  };
}

/** A thing of the file beside those of ours in its place. */
interface Beside<F, O> {
  readonly file: F;
  readonly ours: readonly O[];
  readonly same: boolean;
}

export interface ClipPlan {
  readonly setUp: readonly string[];
  readonly strokes: readonly Beside<ExportStroke, StrokeRow>[];
  readonly marks: readonly Beside<ExportMark, MarkRow>[];
  readonly onlyHere: Pick<OnClip, 'strokes' | 'marks'>;
}

/** Sets what a file has for a clip beside what is there. */
export function planOf(from: ExportClip, to: ClipRow, there: OnClip): ClipPlan {
  const besideStrokes = from.strokes.map((file) => strokeBeside(file, there.strokes));
  const besideMarks = from.marks.map((file) => markBeside(file, there.marks));
  const takenStrokes = new Set(besideStrokes.flatMap(({ ours }) => ours));
  const takenMarks = new Set(besideMarks.flatMap(({ ours }) => ours));
  return {
    setUp: changedSetUp(from, to, there.distance),
    strokes: besideStrokes,
    marks: besideMarks,
    onlyHere: {
      strokes: there.strokes.filter((row) => !takenStrokes.has(row)),
      marks: there.marks.filter((row) => !takenMarks.has(row)),
    },
  };
}

/**
 * An arm does one stroke at a time: those of ours that overlap a stroke of the file are in its place, and so is the one
 * of its id, wherever it has been moved to.
 */
function strokeBeside(file: ExportStroke, there: readonly StrokeRow[]): Beside<ExportStroke, StrokeRow> {
  const end = file.nextEntry ?? file.exit;
  const ours = there.filter((row) => {
    if (row.id === file.id) return true;
    const rowEnd = row.nextEntryFrame ?? row.exitFrame;
    return row.arm === file.arm && file.entry < rowEnd && row.entryFrame < end;
  });
  const [only, ...more] = ours;
  return { file, ours, same: only !== undefined && more.length === 0 && isSameStroke(file, only) };
}

function isSameStroke(file: ExportStroke, row: StrokeRow): boolean {
  const { id: _id, clipId: _clip, version: _version, ...here } = strokeAnswer(row);
  return (Object.keys(here) as (keyof typeof here)[]).every((key) => isSame(here[key], file[key]));
}

function markBeside(file: ExportMark, there: readonly MarkRow[]): Beside<ExportMark, MarkRow> {
  const ours = there.filter((row) => row.arm === file.arm && row.frame === file.frame);
  const [here] = ours;
  if (!here) return { file, ours, same: false };
  const { shoulder, elbow, wrist } = frameMark(here);
  return { file, ours, same: isSame({ shoulder, elbow, wrist }, pick(file)) };
}

const pick = ({ shoulder, elbow, wrist }: ExportMark) => ({ shoulder, elbow, wrist });

/** By content; both come from schemas or rows with their keys in one order. */
function isSame(a: unknown, b: unknown): boolean {
  return JSON.stringify(a ?? null) === JSON.stringify(b ?? null);
}

/** What a person says about a clip and its picture, and what a file brings along of it. */
const setUpFields = ['view', 'travel', 'stroke', 'captureRateFactor', 'fieldOfView', 'plumb'] as const;

function changedSetUp(from: ExportClip, to: ClipRow, distance: KnownDistance | null): string[] {
  const here = { ...to, plumb: plumbOf(to), fieldOfView: fieldOfViewOf(to) };
  const changed: string[] = setUpFields.filter((field) => !isSame(points(here[field]), points(from[field])));
  return isSame(distanceParts(distance), distanceParts(from.distance)) ? changed : [...changed, 'distance'];
}

/** Plumbs and fields of view as lists, since objects from rows and from files may have their keys in another order. */
function points(
  value: string | number | ReturnType<typeof plumbOf> | ReturnType<typeof fieldOfViewOf>,
): unknown {
  if (value === null || typeof value !== 'object') return value;
  if ('deg' in value) return [value.deg, value.medium];
  return [value.top.x, value.top.y, value.bottom.x, value.bottom.y];
}

function distanceParts(distance: KnownDistance | null): unknown {
  return distance && [distance.metres, distance.uncertaintyM, distance.fromFrame, distance.toFrame];
}

export function countsOf(beside: readonly Beside<unknown, unknown>[], onlyHere: number): ImportCounts {
  return {
    new: beside.filter(({ ours }) => ours.length === 0).length,
    changed: beside.filter(({ ours, same }) => ours.length > 0 && !same).length,
    same: beside.filter(({ same }) => same).length,
    onlyHere,
  };
}

/** Those of the file that are written under a choice: what is new always, what differs unless only adding. */
export function written<B extends Beside<unknown, unknown>>(beside: readonly B[], choice: ImportChoice): B[] {
  return beside.filter(({ ours, same }) => !same && (ours.length === 0 || choice !== 'add'));
}
