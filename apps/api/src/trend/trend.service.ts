import type { SignedInUser } from '@stillstroke/contract/auth';
import type { StrokeKind } from '@stillstroke/contract/clip-facts';
import type { QueryOf } from '@stillstroke/contract/endpoint';
import type { getTrend as trendCall, Trend, TrendMeasure } from '@stillstroke/contract/trend';
import type { Db } from '@stillstroke/db/open';
import { clips, sessions, strokeFigures } from '@stillstroke/db/schema/film';
import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import { comparedView, sideViews } from '../measures/compared-view';
import { keptCautions } from '../measures/kept-cautions';
import { keptFigures } from '../measures/kept-figures';
import { unitOf } from '../measures/units';
import type { AppContext } from '../platform/context';
import { athleteInReach } from '../reach/reach';
import { armTrend, type TrendFigure } from './arm-trend';
import { coordinationOver, measuredOf } from './trend-figures';

/**
 * One measure over an athlete's sessions, each arm, of one view and one stroke kind: they are never mixed. What else there
 * is to choose from, and which sessions have no point here, is said.
 */
export function getTrend(
  { db }: Pick<AppContext, 'db'>,
  user: SignedInUser,
  athleteId: string,
  { measure, view: wished, stroke }: QueryOf<typeof trendCall>,
): Trend {
  const athlete = athleteInReach(db, user, athleteId);
  const figures = figuresOver(db, athlete.id, measure, stroke);
  const view = wished ?? comparedView(figures.map((figure) => figure.view)) ?? 'side-underwater';
  const taken = figures.filter((figure) => figure.view === view);
  return {
    athleteId: athlete.id,
    measure,
    unit: measure === 'coordination' ? 'share' : unitOf[measure],
    measured: measuredOf(db, athlete.id, stroke),
    view,
    stroke,
    series: seriesOf({
      [stroke]: figures,
      [otherKind(stroke)]: figuresOver(db, athlete.id, measure, otherKind(stroke)),
    }),
    arms: (measure === 'coordination' ? (['both'] as const) : (['left', 'right'] as const)).map((arm) =>
      armTrend(arm, taken),
    ),
    cautions: keptCautions(
      db,
      sql`${eq(sessions.athleteId, athlete.id)} and ${eq(clips.view, view)} and ${eq(clips.stroke, stroke)}`,
      measure,
    ),
    leftOut: leftOut(db, athlete.id, { view, stroke }, new Set(taken.map(({ sessionId }) => sessionId))),
  };
}

const otherKind = (kind: StrokeKind): StrokeKind => (kind === 'full' ? 'drill' : 'full');

/** Views and stroke kinds that have figures, with how many sessions each. */
function seriesOf(figures: Partial<Record<StrokeKind, readonly TrendFigure[]>>): Trend['series'] {
  return (['full', 'drill'] as const).flatMap((stroke) =>
    sideViews.flatMap((view) => {
      const own = (figures[stroke] ?? []).filter((figure) => figure.view === view);
      const count = new Set(own.map(({ sessionId }) => sessionId)).size;
      return count === 0 ? [] : [{ view, stroke, sessions: count }];
    }),
  );
}

function figuresOver(db: Db, athleteId: string, measure: TrendMeasure, kind: StrokeKind): TrendFigure[] {
  const own = eq(sessions.athleteId, athleteId);
  if (measure === 'coordination') return coordinationOver(db, own, kind);
  return keptFigures(db, sql`${own} and ${eq(strokeFigures.measure, measure)}`, kind);
}

/** Sessions without a point, and why. */
function leftOut(
  db: Db,
  athleteId: string,
  { view, stroke }: Pick<Trend, 'view' | 'stroke'>,
  taken: ReadonlySet<string>,
): Trend['leftOut'] {
  return db
    .select({
      sessionId: sessions.id,
      date: sessions.date,
      clips: sql<number>`count(${clips.id})`,
      ofSeries: sql<number>`total(${clips.view} = ${view} and ${clips.stroke} = ${stroke})`,
      ofKind: sql<number>`total(${clips.stroke} = ${stroke})`,
    })
    .from(sessions)
    .leftJoin(clips, and(eq(clips.sessionId, sessions.id), isNull(clips.deletedAt)))
    .where(and(eq(sessions.athleteId, athleteId), isNull(sessions.deletedAt)))
    .groupBy(sessions.id)
    .orderBy(asc(sessions.date), asc(sessions.createdAt))
    .all()
    .filter(({ sessionId }) => !taken.has(sessionId))
    .map(({ sessionId, date, clips: all, ofSeries, ofKind }) => ({
      sessionId,
      date,
      reason:
        all === 0 || ofSeries > 0
          ? 'not-measured'
          : ofKind > 0
            ? 'other-view'
            : stroke === 'full'
              ? 'drill'
              : 'full-stroke',
    }));
}
