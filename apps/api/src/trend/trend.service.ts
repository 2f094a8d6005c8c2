import type { SignedInUser } from '@stillstroke/contract/auth';
import type { QueryOf } from '@stillstroke/contract/endpoint';
import type { getTrend as trendCall, Trend } from '@stillstroke/contract/trend';
import type { Db } from '@stillstroke/db/open';
import { clips, sessions, strokeFigures } from '@stillstroke/db/schema/film';
import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import { comparedView, type SideView } from '../measures/compared-view';
import { keptFigures } from '../measures/kept-figures';
import { unitOf } from '../measures/units';
import type { AppContext } from '../platform/context';
import { athleteInReach } from '../reach/reach';
import { armTrend } from './arm-trend';

/** One measure over an athlete's sessions, each arm. Sessions filmed in another view, and drills, are not mixed in. */
export function getTrend(
  { db }: Pick<AppContext, 'db'>,
  user: SignedInUser,
  athleteId: string,
  { measure }: QueryOf<typeof trendCall>,
): Trend {
  const athlete = athleteInReach(db, user, athleteId);
  const figures = keptFigures(
    db,
    sql`${eq(sessions.athleteId, athlete.id)} and ${eq(strokeFigures.measure, measure)}`,
  );
  const view = comparedView(figures.map((figure) => figure.view));
  const taken = figures.filter((figure) => figure.view === view);
  return {
    athleteId: athlete.id,
    measure,
    unit: unitOf[measure],
    view: view ?? 'side-underwater',
    arms: [armTrend('left', taken), armTrend('right', taken)],
    leftOut: leftOut(db, athlete.id, view, new Set(taken.map(({ sessionId }) => sessionId))),
  };
}

/** Sessions without a point, and why. */
function leftOut(
  db: Db,
  athleteId: string,
  view: SideView | null,
  taken: ReadonlySet<string>,
): Trend['leftOut'] {
  const shown = view ?? 'side-underwater';
  return db
    .select({
      sessionId: sessions.id,
      date: sessions.date,
      clips: sql<number>`count(${clips.id})`,
      ofView: sql<number>`total(${clips.view} = ${shown} and ${clips.stroke} = 'full')`,
      full: sql<number>`total(${clips.stroke} = 'full')`,
    })
    .from(sessions)
    .leftJoin(clips, and(eq(clips.sessionId, sessions.id), isNull(clips.deletedAt)))
    .where(and(eq(sessions.athleteId, athleteId), isNull(sessions.deletedAt)))
    .groupBy(sessions.id)
    .orderBy(asc(sessions.date), asc(sessions.createdAt))
    .all()
    .filter(({ sessionId }) => !taken.has(sessionId))
    .map(({ sessionId, date, clips: all, ofView, full }) => ({
      sessionId,
      date,
      reason: all === 0 || ofView > 0 ? 'not-measured' : full > 0 ? 'other-view' : 'drill',
    }));
}
