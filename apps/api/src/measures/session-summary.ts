import type { Session } from '@stillstroke/contract/sessions';
import type { Db } from '@stillstroke/db/open';
import { inListed, preparedOnce } from '@stillstroke/db/prepared-once';
import { clips, strokeFigures, strokes } from '@stillstroke/db/schema/film';
import { and, avg, count, eq, inArray, isNull } from 'drizzle-orm';
import { grouped } from './grouped';
import { comparedView, sideViews } from './compared-view';

type Summary = Session['summary'];

/**
 * What was measured in some sessions, in short: strokes an arm, and the mean share of the pull at vertical of the same
 * clips that Compare takes in.
 */
export function sessionSummaries(db: Db, sessionIds: readonly string[]): Map<string, Summary> {
  const rows = summaryRows(db).all({ sessionIds: JSON.stringify(sessionIds) });
  const summaries = new Map<string, Summary>();
  for (const [sessionId, ofSession] of grouped(rows, (row) => row.sessionId)) {
    const view = comparedView(ofSession.map((row) => row.view));
    const taken = ofSession.filter((row) => row.view === view);
    const of = (arm: 'left' | 'right') => taken.find((row) => row.arm === arm);
    summaries.set(sessionId, {
      strokes: { left: of('left')?.strokes ?? 0, right: of('right')?.strokes ?? 0 },
      verticalAt: { left: of('left')?.verticalAt ?? null, right: of('right')?.verticalAt ?? null },
    });
  }
  return summaries;
}

const summaryRows = preparedOnce((db) =>
  db
    .select({
      sessionId: clips.sessionId,
      view: clips.view,
      arm: strokes.arm,
      strokes: count(),
      verticalAt: avg(strokeFigures.value).mapWith(Number),
    })
    .from(clips)
    .innerJoin(strokes, eq(strokes.clipId, clips.id))
    .leftJoin(
      strokeFigures,
      and(eq(strokeFigures.strokeId, strokes.id), eq(strokeFigures.measure, 'verticalAt')),
    )
    .where(
      and(
        inListed(clips.sessionId, 'sessionIds'),
        isNull(clips.deletedAt),
        eq(clips.stroke, 'full'),
        inArray(clips.view, [...sideViews]),
      ),
    )
    .groupBy(clips.sessionId, clips.view, strokes.arm)
    .prepare(),
);
