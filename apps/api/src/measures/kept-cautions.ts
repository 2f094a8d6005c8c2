import type { TrendMeasure } from '@stillstroke/contract/trend';
import type { CautionSummary } from '@stillstroke/contract/view-cautions';
import type { Db } from '@stillstroke/db/open';
import { clips, sessions, strokes } from '@stillstroke/db/schema/film';
import { strokeCautions as kept } from '@stillstroke/db/schema/view';
import { strokeReadingNames, type CautionCode } from '@stillstroke/geometry/view/caution';
import { cameraTilt } from '@stillstroke/geometry/view/camera-tilt';
import { sizeFor, strokeCautions } from '@stillstroke/geometry/view/view-cautions';
import { and, count, eq, inArray, isNull, max, min, type SQL } from 'drizzle-orm';
import type { ClipRow } from '../clips/clip-answer';
import { strokeEvents, viewContext, type MeasuredStroke } from './clip-reading';

type Writer = Pick<Db, 'insert' | 'delete'>;
type KeptCode = (typeof kept.$inferSelect)['code'];

const keptCodes: readonly CautionCode[] = ['foreshortened', 'far-arm', 'flat-port'] satisfies KeptCode[];
const isKept = (code: CautionCode): code is KeptCode => keptCodes.includes(code);

/** Writes what of the view each measure of these strokes has to be read with, in place of what was there. */
export function keepCautions(tx: Writer, clip: ClipRow, measured: readonly MeasuredStroke[]): void {
  const view = viewContext(clip);
  const strokeIds = measured.map(({ stroke }) => stroke.id);
  tx.delete(kept).where(inArray(kept.strokeId, strokeIds)).run();
  const rows = measured.flatMap(({ stroke, marks, measures }) =>
    strokeCautions(view, { arm: stroke.arm, ...strokeEvents(stroke) }, marks, measures).flatMap((caution) => {
      const { code, assumed } = caution;
      if (!isKept(code)) return [];
      return strokeReadingNames.flatMap((measure) => {
        const sizeDeg = sizeFor(caution, measure);
        return sizeDeg === null ? [] : [{ strokeId: stroke.id, code, measure, sizeDeg, assumed }];
      });
    }),
  );
  for (let from = 0; from < rows.length; from += 500) {
    tx.insert(kept)
      .values(rows.slice(from, from + 500))
      .run();
  }
}

/** The same over many strokes, in short: for each code, measure and arm the largest size. What is deleted is left out. */
export function keptCautions(db: Pick<Db, 'select'>, of: SQL, measure?: TrendMeasure): CautionSummary[] {
  const asked = strokeReadingNames.filter((name) => measure === undefined || name === measure);
  if (asked.length === 0) return [];
  const rows = db
    .select({
      code: kept.code,
      measure: kept.measure,
      arm: strokes.arm,
      sizeDeg: max(kept.sizeDeg),
      assumed: min(kept.assumed),
      strokes: count(),
    })
    .from(kept)
    .innerJoin(strokes, eq(strokes.id, kept.strokeId))
    .innerJoin(clips, eq(clips.id, strokes.clipId))
    .innerJoin(sessions, eq(sessions.id, clips.sessionId))
    .where(and(of, inArray(kept.measure, asked), isNull(clips.deletedAt), isNull(sessions.deletedAt)))
    .groupBy(kept.code, kept.measure, strokes.arm)
    .orderBy(kept.code, kept.measure, strokes.arm)
    .all();
  const ofStrokes = rows.map((row) => ({
    ...row,
    sizeDeg: row.sizeDeg ?? 0,
    assumed: Boolean(row.assumed),
  }));
  return [...ofStrokes, ...(asked.includes('verticalAt') ? tilts(db, of) : [])];
}

/** What the clips' verticals do to the one measure that stands against them. */
function tilts(db: Pick<Db, 'select'>, of: SQL): CautionSummary[] {
  const found = db
    .select({ clip: clips, strokes: count(strokes.id) })
    .from(clips)
    .innerJoin(sessions, eq(sessions.id, clips.sessionId))
    .innerJoin(strokes, eq(strokes.clipId, clips.id))
    .where(and(of, isNull(clips.deletedAt), isNull(sessions.deletedAt)))
    .groupBy(clips.id)
    .all();
  const byCode = new Map<CautionCode, CautionSummary>();
  for (const { clip, strokes: strokeCount } of found) {
    const tilt = cameraTilt(viewContext(clip));
    if (!tilt) continue;
    const before = byCode.get(tilt.code);
    byCode.set(tilt.code, {
      code: tilt.code,
      measure: 'verticalAt',
      arm: null,
      sizeDeg: Math.max(tilt.sizeDeg, before?.sizeDeg ?? 0),
      assumed: tilt.assumed,
      strokes: strokeCount + (before?.strokes ?? 0),
    });
  }
  return [...byCode.values()];
}
