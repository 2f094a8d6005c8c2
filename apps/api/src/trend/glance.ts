import type { Athlete } from '@stillstroke/contract/athletes';
import type { Db } from '@stillstroke/db/open';
import { preparedOnce } from '@stillstroke/db/prepared-once';
import { clips, sessions, strokes } from '@stillstroke/db/schema/film';
import { and, desc, eq, exists, inArray, isNull, sql } from 'drizzle-orm';
import { sessionSummaries } from '../measures/session-summary';
import { sideViews } from '../measures/compared-view';

type Glance = Athlete['verticalAt'];

/**
 * Mean share of the pull at vertical of each athlete's newest session with strokes in it, for lists of athletes. Athletes
 * without such a session are not in the answer.
 */
export function verticalAtGlance(db: Db, athleteIds: readonly string[]): Map<string, Glance> {
  const newest = new Map<string, string>();
  const query = newestMeasured(db);
  for (const athleteId of athleteIds) {
    const sessionId = query.get({ athleteId })?.id;
    if (sessionId !== undefined) newest.set(athleteId, sessionId);
  }
  const summaries = sessionSummaries(db, [...newest.values()]);
  const glances = new Map<string, Glance>();
  for (const [athleteId, sessionId] of newest) {
    const summary = summaries.get(sessionId);
    if (summary) glances.set(athleteId, summary.verticalAt);
  }
  return glances;
}

/** Walks back from the newest session, so that it does not matter how many there are. */
const newestMeasured = preparedOnce((db) =>
  db
    .select({ id: sessions.id })
    .from(sessions)
    .where(
      and(
        eq(sessions.athleteId, sql.placeholder('athleteId')),
        isNull(sessions.deletedAt),
        exists(
          db
            .select({ one: sql`1` })
            .from(clips)
            .innerJoin(strokes, eq(strokes.clipId, clips.id))
            .where(
              and(
                eq(clips.sessionId, sessions.id),
                isNull(clips.deletedAt),
                eq(clips.stroke, 'full'),
                inArray(clips.view, [...sideViews]),
              ),
            ),
        ),
      ),
    )
    .orderBy(desc(sessions.date), desc(sessions.createdAt))
    .limit(1)
    .prepare(),
);
