import type { Session } from '@stillstroke/contract/sessions';
import type { Db } from '@stillstroke/db/open';
import { squads, type athletes } from '@stillstroke/db/schema/club';
import type { sessions } from '@stillstroke/db/schema/film';
import { inArray } from 'drizzle-orm';
import { clipsOfSessions } from '../clips/clip-answer';
import { sessionSummaries } from '../measures/session-summary';

export interface SessionWithAthlete {
  readonly session: typeof sessions.$inferSelect;
  readonly athlete: typeof athletes.$inferSelect;
}

/** Sessions as the contract describes them, in the order given, in a fixed number of queries however many there are. */
export function sessionAnswers(db: Db, rows: readonly SessionWithAthlete[]): Session[] {
  if (rows.length === 0) return [];
  const ids = rows.map(({ session }) => session.id);
  const clipsBySession = clipsOfSessions(db, ids);
  const summaries = sessionSummaries(db, ids);
  const squadIds = [...new Set(rows.map(({ athlete }) => athlete.squadId))];
  const names = new Map(
    db
      .select({ id: squads.id, name: squads.name })
      .from(squads)
      .where(inArray(squads.id, squadIds))
      .all()
      .map(({ id, name }) => [id, name]),
  );
  return rows.map(({ session, athlete }) => ({
    id: session.id,
    athleteId: athlete.id,
    athleteName: athlete.name,
    squadId: athlete.squadId,
    squadName: names.get(athlete.squadId) ?? '',
    date: session.date,
    place: session.place,
    note: session.note,
    clips: clipsBySession.get(session.id) ?? [],
    summary: summaries.get(session.id) ?? {
      strokes: { left: 0, right: 0 },
      verticalAt: { left: null, right: null },
    },
    deletedAt: session.deletedAt,
  }));
}
