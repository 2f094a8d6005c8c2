import type { StrokeKind } from '@stillstroke/contract/clip-facts';
import type { Measure } from '@stillstroke/contract/measures';
import type { Db } from '@stillstroke/db/open';
import { clips, sessions, strokeFigures, strokes } from '@stillstroke/db/schema/film';
import { and, asc, eq, inArray, isNull, type SQL } from 'drizzle-orm';
import { sideViews, type SideView } from './compared-view';

/** One kept figure of one stroke of a clip from the side, with all that is needed to find it again. */
export interface KeptFigure {
  readonly sessionId: string;
  readonly date: string;
  readonly clipId: string;
  readonly view: SideView;
  readonly strokeId: string;
  readonly arm: 'left' | 'right';
  readonly breath: boolean;
  readonly measure: Measure;
  readonly value: number;
  readonly uncertainty: number;
  readonly setUp: number;
  readonly frame: number;
}

/** Kept figures of one stroke kind by session date, clip and stroke. What is deleted, and views not from the side, are left out. */
export function keptFigures(db: Pick<Db, 'select'>, of: SQL, kind: StrokeKind = 'full'): KeptFigure[] {
  return db
    .select({
      sessionId: sessions.id,
      date: sessions.date,
      clipId: clips.id,
      view: clips.view,
      strokeId: strokes.id,
      arm: strokes.arm,
      breath: strokes.breath,
      measure: strokeFigures.measure,
      value: strokeFigures.value,
      uncertainty: strokeFigures.uncertainty,
      setUp: strokeFigures.setUp,
      frame: strokeFigures.frame,
    })
    .from(sessions)
    .innerJoin(clips, eq(clips.sessionId, sessions.id))
    .innerJoin(strokes, eq(strokes.clipId, clips.id))
    .innerJoin(strokeFigures, eq(strokeFigures.strokeId, strokes.id))
    .where(
      and(
        of,
        isNull(sessions.deletedAt),
        isNull(clips.deletedAt),
        eq(clips.stroke, kind),
        inArray(clips.view, [...sideViews]),
      ),
    )
    .orderBy(asc(sessions.date), asc(sessions.createdAt), asc(clips.createdAt), asc(strokes.entryFrame))
    .all() as KeptFigure[];
}

/** Standard uncertainty of one stroke's figure from marking and events alone, the shared part taken out. */
export function markingPart({ uncertainty, setUp }: Pick<KeptFigure, 'uncertainty' | 'setUp'>): number {
  return Math.sqrt(Math.max(0, uncertainty ** 2 - setUp ** 2));
}

/** Root mean square of the shared parts; 0 for none. */
export function sharedPart(figures: readonly Pick<KeptFigure, 'setUp'>[]): number {
  if (figures.length === 0) return 0;
  return Math.sqrt(figures.reduce((sum, { setUp }) => sum + setUp ** 2, 0) / figures.length);
}
