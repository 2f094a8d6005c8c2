import type { Athlete } from '@stillstroke/contract/athletes';
import type { Db } from '@stillstroke/db/open';
import { clips, sessions, strokeFigures, strokes } from '@stillstroke/db/schema/film';
import { and, eq, inArray, isNull, max, sql } from 'drizzle-orm';
import { sideViews } from '../measures/compared-view';
import { sessionSummaries } from '../measures/session-summary';

/** Vertical at, left and right, of each athlete's newest session in which it was measured. */
export function verticalAtGlances(db: Db, athleteIds: readonly string[]): Map<string, Athlete['verticalAt']> {
  if (athleteIds.length === 0) return new Map();
  // With max() SQLite takes the other columns from the row that has the maximum.
  const newest = db
    .select({
      athleteId: sessions.athleteId,
      sessionId: sessions.id,
      newest: max(sql`${sessions.date} || ${sessions.createdAt}`),
    })
    .from(sessions)
    .innerJoin(clips, and(eq(clips.sessionId, sessions.id), isNull(clips.deletedAt)))
    .innerJoin(strokes, eq(strokes.clipId, clips.id))
    .innerJoin(
      strokeFigures,
      and(eq(strokeFigures.strokeId, strokes.id), eq(strokeFigures.measure, 'verticalAt')),
    )
    .where(
      and(
        inArray(sessions.athleteId, [...athleteIds]),
        isNull(sessions.deletedAt),
        eq(clips.stroke, 'full'),
        inArray(clips.view, [...sideViews]),
      ),
    )
    .groupBy(sessions.athleteId)
    .all();
  const summaries = sessionSummaries(
    db,
    newest.map((row) => row.sessionId),
  );
  return new Map(
    newest.map((row) => [
      row.athleteId,
      summaries.get(row.sessionId)?.verticalAt ?? { left: null, right: null },
    ]),
  );
}
