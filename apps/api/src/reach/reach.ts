import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Db } from '@stillstroke/db/open';
import { preparedOnce } from '@stillstroke/db/prepared-once';
import { athletes, squadCoaches, squads } from '@stillstroke/db/schema/club';
import { clips, sessions } from '@stillstroke/db/schema/film';
import { and, eq, exists, type Placeholder, sql, type SQL } from 'drizzle-orm';
import { notFound } from '../platform/problem';

type Role = SignedInUser['role'];

/** Who asks: somebody signed in, or the places of their values in a query that is compiled beforehand. */
interface Caller {
  readonly role: Role;
  readonly id: string | Placeholder;
  readonly clubId: string | Placeholder;
  readonly athleteId: string | Placeholder | null;
}

/**
 * Who may see what, in one place: an admin the club, a coach the squads they coach, an athlete only themselves, nobody
 * another club. A condition on the `athletes` table to put into any query that joins it.
 */
export function athletesInReach(db: Db, user: Caller): SQL {
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

/** What a query in reach is asked with, for each role: values go in by name, so that it is compiled once. */
const byName = {
  id: sql.placeholder('id'),
  clubId: sql.placeholder('clubId'),
  athleteId: sql.placeholder('athleteId'),
};
const idInReach = sql.placeholder('wanted');

/** The same query for each role, since reach differs by role. */
function forRole<Query>(prepare: (db: Db, inReach: SQL) => Query): (db: Db, role: Role) => Query {
  const perRole = new Map<Role, (db: Db) => Query>();
  return (db, role) => {
    const there = perRole.get(role);
    if (there) return there(db);
    const made = preparedOnce((root) => prepare(root, athletesInReach(root, { ...byName, role })));
    perRole.set(role, made);
    return made(db);
  };
}

const valuesOf = ({ id, clubId, athleteId }: SignedInUser, wanted: string) => ({
  id,
  clubId,
  athleteId,
  wanted,
});

const athleteQuery = forRole((db, inReach) =>
  db
    .select()
    .from(athletes)
    .where(and(eq(athletes.id, idInReach), inReach))
    .prepare(),
);

const sessionQuery = forRole((db, inReach) =>
  db
    .select({ session: sessions, athlete: athletes })
    .from(sessions)
    .innerJoin(athletes, eq(athletes.id, sessions.athleteId))
    .where(and(eq(sessions.id, idInReach), inReach))
    .prepare(),
);

const clipQuery = forRole((db, inReach) =>
  db
    .select({ clip: clips, session: sessions, athlete: athletes })
    .from(clips)
    .innerJoin(sessions, eq(sessions.id, clips.sessionId))
    .innerJoin(athletes, eq(athletes.id, sessions.athleteId))
    .where(and(eq(clips.id, idInReach), inReach))
    .prepare(),
);

/** The athlete, or 404 where the caller may not know of them. */
export function athleteInReach(db: Db, user: SignedInUser, athleteId: string) {
  const found = athleteQuery(db, user.role).get(valuesOf(user, athleteId));
  if (!found) throw notFound('athlete');
  return found;
}

/** The session with its athlete, deleted ones included (callers decide), or 404. */
export function sessionInReach(db: Db, user: SignedInUser, sessionId: string) {
  const found = sessionQuery(db, user.role).get(valuesOf(user, sessionId));
  if (!found) throw notFound('session');
  return found;
}

/** The clip with its session and athlete, deleted ones included (callers decide), or 404. */
export function clipInReach(db: Db, user: SignedInUser, clipId: string) {
  const found = clipQuery(db, user.role).get(valuesOf(user, clipId));
  if (!found) throw notFound('clip');
  return found;
}
