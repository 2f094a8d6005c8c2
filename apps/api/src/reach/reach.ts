import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Db } from '@stillstroke/db/open';
import { athletes, clubs, squadCoaches, squads } from '@stillstroke/db/schema/club';
import { clips, sessions } from '@stillstroke/db/schema/film';
import { and, eq, exists, sql, type SQL } from 'drizzle-orm';
import { notFound } from '../platform/problem';

/**
 * Who may see what, in one place: an admin the club, a coach the squads they coach, an athlete only themselves, nobody
 * another club. A condition on the `athletes` table to put into any query that joins it.
 */
export function athletesInReach(db: Db, user: SignedInUser): SQL {
  const ownClub = eq(athletes.clubId, user.clubId);
  switch (user.role) {
    case 'admin':
      return ownClub;
    case 'coach':
      return all(
        ownClub,
        exists(
          db
            .select({ one: sql`1` })
            .from(squadCoaches)
            .where(and(eq(squadCoaches.squadId, athletes.squadId), eq(squadCoaches.userId, user.id))),
        ),
      );
    case 'athlete':
      return user.athleteId === null ? sql`0` : all(ownClub, eq(athletes.id, user.athleteId));
    case 'guardian':
      return sql`0`;
  }
}

/** Squads whose athletes the caller may add to or change: an admin's club, a coach's own. A condition on `squads`. */
export function squadsInReach(db: Db, user: SignedInUser): SQL {
  const ownClub = eq(squads.clubId, user.clubId);
  if (user.role === 'admin') return ownClub;
  if (user.role !== 'coach') return sql`0`;
  return all(
    ownClub,
    exists(
      db
        .select({ one: sql`1` })
        .from(squadCoaches)
        .where(and(eq(squadCoaches.squadId, squads.id), eq(squadCoaches.userId, user.id))),
    ),
  );
}

function all(...conditions: SQL[]): SQL {
  return and(...conditions) ?? sql`0`;
}

/** The athlete, or 404 where the caller may not know of them. */
export function athleteInReach(db: Db, user: SignedInUser, athleteId: string) {
  const found = db
    .select({ athlete: athletes, clubName: clubs.name })
    .from(athletes)
    .innerJoin(clubs, eq(clubs.id, athletes.clubId))
    .where(and(eq(athletes.id, athleteId), athletesInReach(db, user)))
    .get();
  if (!found) throw notFound('athlete');
  return found.athlete;
}

/** The session with its athlete, deleted ones included (callers decide), or 404. */
export function sessionInReach(db: Db, user: SignedInUser, sessionId: string) {
  const found = db
    .select({ session: sessions, athlete: athletes })
    .from(sessions)
    .innerJoin(athletes, eq(athletes.id, sessions.athleteId))
    .where(and(eq(sessions.id, sessionId), athletesInReach(db, user)))
    .get();
  if (!found) throw notFound('session');
  return found;
}

/** The clip with its session and athlete, deleted ones included (callers decide), or 404. */
export function clipInReach(db: Db, user: SignedInUser, clipId: string) {
  const found = db
    .select({ clip: clips, session: sessions, athlete: athletes })
    .from(clips)
    .innerJoin(sessions, eq(sessions.id, clips.sessionId))
    .innerJoin(athletes, eq(athletes.id, sessions.athleteId))
    .where(and(eq(clips.id, clipId), athletesInReach(db, user)))
    .get();
  if (!found) throw notFound('clip');
  return found;
}
