import type { StrokeKind } from '@stillstroke/contract/clip-facts';
import { measureSchema } from '@stillstroke/contract/measures';
import type { TrendMeasure } from '@stillstroke/contract/trend';
import type { Db } from '@stillstroke/db/open';
import { preparedOnce } from '@stillstroke/db/prepared-once';
import { clips, sessions, strokeFigures, strokes } from '@stillstroke/db/schema/film';
import { coordinationFigures } from '@stillstroke/db/schema/timing';
import { and, eq, isNull, sql, type SQL } from 'drizzle-orm';
import { sideViews, type SideView } from '../measures/compared-view';
import { keptPassages } from '../measures/coordination-figures';
import type { TrendFigure } from './arm-trend';

/** The passages of clips of one stroke kind from the side as figures of both arms. */
export function coordinationOver(db: Db, of: SQL, kind: StrokeKind): TrendFigure[] {
  return keptPassages(db, of).flatMap(({ view, stroke, ...figure }) => {
    const side = sideViews.find((known): known is SideView => known === view);
    return side !== undefined && stroke === kind
      ? [{ ...figure, view: side, arm: 'both' as const, setUp: 0 }]
      : [];
  });
}

/** Measures of which an athlete has figures of one stroke kind at all: the others need not be offered. */
export function measuredOf(db: Db, athleteId: string, kind: StrokeKind): TrendMeasure[] {
  const query = measuredQuery(db);
  const found: TrendMeasure[] = measureSchema.options.filter((measure) =>
    query.get({ athleteId, kind, measure }),
  );
  return coordinatedQuery(db).get({ athleteId, kind }) ? [...found, 'coordination'] : found;
}

const ownLive = and(
  eq(sessions.athleteId, sql.placeholder('athleteId')),
  isNull(sessions.deletedAt),
  isNull(clips.deletedAt),
  eq(clips.stroke, sql.placeholder('kind')),
);

const measuredQuery = preparedOnce((db) =>
  db
    .select({ one: sql`1` })
    .from(sessions)
    .innerJoin(clips, eq(clips.sessionId, sessions.id))
    .innerJoin(strokes, eq(strokes.clipId, clips.id))
    .innerJoin(strokeFigures, eq(strokeFigures.strokeId, strokes.id))
    .where(and(ownLive, eq(strokeFigures.measure, sql.placeholder('measure'))))
    .limit(1)
    .prepare(),
);

const coordinatedQuery = preparedOnce((db) =>
  db
    .select({ one: sql`1` })
    .from(sessions)
    .innerJoin(clips, eq(clips.sessionId, sessions.id))
    .innerJoin(coordinationFigures, eq(coordinationFigures.clipId, clips.id))
    .where(ownLive)
    .limit(1)
    .prepare(),
);
