import { measureSchema } from '@stillstroke/contract/measures';
import type { Db } from '@stillstroke/db/open';
import { clips, strokeFigures } from '@stillstroke/db/schema/film';
import { eq, inArray, ne } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { refreshCoordination } from './coordination-figures';
import { clipRow, measureStrokes, strokeEvents, type StrokeRow } from './clip-reading';
import { keepCautions } from './kept-cautions';
import { figuresByMeasure, setUpPart } from './stroke-figures';

/** Count this up when a formula behind a figure changes: figures kept from before are then computed again at start. */
export const FORMULAS = 2;

type Writer = Pick<Db, 'select' | 'insert' | 'delete' | 'update'>;

/** Computes the kept figures of a clip's strokes again; call it in the transaction that changed what they depend on. */
export function refreshClipFigures(tx: Writer, clipId: string): void {
  refresh(tx, clipId, () => true);
  refreshCoordination(tx, clipId);
  tx.update(clips).set({ figuresFormulas: FORMULAS }).where(eq(clips.id, clipId)).run();
}

/** The same of one stroke, and what both arms do together, in which it may have a part. */
export function refreshStrokeFigures(tx: Writer, clipId: string, strokeId: string): void {
  refresh(tx, clipId, ({ id }) => id === strokeId);
  refreshCoordination(tx, clipId);
}

/** The same of those strokes of an arm that a mark on a frame has a part in. */
export function refreshFiguresAt(tx: Writer, clipId: string, arm: StrokeRow['arm'], frame: number): void {
  refresh(
    tx,
    clipId,
    (stroke) => stroke.arm === arm && stroke.catchFrame <= frame && frame <= stroke.exitFrame,
  );
}

function refresh(tx: Writer, clipId: string, wanted: (stroke: StrokeRow) => boolean): void {
  const clip = clipRow(tx, clipId);
  if (!clip) return;
  const measured = measureStrokes(tx, clip, wanted);
  if (measured.length === 0) return;
  const strokeIds = measured.map(({ stroke }) => stroke.id);
  keepCautions(tx, clip, measured);
  tx.delete(strokeFigures).where(inArray(strokeFigures.strokeId, strokeIds)).run();
  const rows = measured.flatMap(({ stroke, measures }) => {
    const figures = figuresByMeasure(strokeEvents(stroke), measures);
    return measureSchema.options.flatMap((measure) => {
      const { value, uncertainty, frame } = figures[measure];
      if (value === null || uncertainty === null || frame === null) return [];
      const setUp = Math.min(uncertainty, setUpPart(measures, measure));
      return [{ strokeId: stroke.id, measure, value, uncertainty, setUp, frame }];
    });
  });
  // A clip can have thousands of strokes, a statement only so many parameters.
  for (let from = 0; from < rows.length; from += 500) {
    tx.insert(strokeFigures)
      .values(rows.slice(from, from + 500))
      .run();
  }
}

/** Computes figures again that were kept by other formulas than today's; call it at start. Returns how many clips. */
export function refreshOutdatedFigures({ db }: Pick<AppContext, 'db'>): number {
  const outdated = db.select({ id: clips.id }).from(clips).where(ne(clips.figuresFormulas, FORMULAS)).all();
  for (const { id } of outdated) db.transaction((tx) => refreshClipFigures(tx, id));
  return outdated.length;
}
