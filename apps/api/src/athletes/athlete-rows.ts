import type { Db } from '@stillstroke/db/open';
import { athletes, squads } from '@stillstroke/db/schema/club';
import { clips, marks, sessions } from '@stillstroke/db/schema/film';
import { folded } from '@stillstroke/db/folded';
import { and, count, eq, isNull, max, notExists, sql, type SQL } from 'drizzle-orm';

/** Athletes with what the list shows and sorts by, as a subquery; `where` may speak of `athletes` and `squads`. */
export function athleteRows(db: Db, where: SQL | undefined) {
  const liveSessions = and(eq(sessions.athleteId, athletes.id), isNull(sessions.deletedAt));
  const lastSession = db
    .select({ last: max(sessions.date) })
    .from(sessions)
    .where(liveSessions);
  const sessionCount = db.select({ n: count() }).from(sessions).where(liveSessions);
  const clipsToMark = db
    .select({ n: count() })
    .from(clips)
    .innerJoin(sessions, eq(sessions.id, clips.sessionId))
    .where(
      and(
        liveSessions,
        isNull(clips.deletedAt),
        eq(clips.status, 'ready'),
        notExists(
          db
            .select({ one: sql`1` })
            .from(marks)
            .where(eq(marks.clipId, clips.id)),
        ),
      ),
    );
  return db
    .select({
      id: athletes.id,
      name: sql<string>`${athletes.name}`.as('name'),
      foldedName: folded(athletes.name).as('folded_name'),
      squadId: athletes.squadId,
      squadName: sql<string>`${squads.name}`.as('squad_name'),
      // Nobody's date: sorts before every date.
      lastSession: sql<string>`coalesce((${lastSession}), '')`.as('last_session'),
      sessionCount: sql<number>`(${sessionCount})`.as('session_count'),
      clipsToMark: sql<number>`(${clipsToMark})`.as('clips_to_mark'),
      deactivatedAt: athletes.deactivatedAt,
    })
    .from(athletes)
    .innerJoin(squads, eq(squads.id, athletes.squadId))
    .where(where)
    .as('listed');
}
