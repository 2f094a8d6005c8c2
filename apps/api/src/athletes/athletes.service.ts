import { randomUUID } from 'node:crypto';
import type {
  Athlete,
  createAthlete as createCall,
  listAthletes as listCall,
  updateAthlete as updateCall,
} from '@stillstroke/contract/athletes';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf, QueryOf } from '@stillstroke/contract/endpoint';
import { foldedContains } from '@stillstroke/db/folded';
import type { Db } from '@stillstroke/db/open';
import { athletes, squads } from '@stillstroke/db/schema/club';
import { and, asc, count, desc, eq, isNull } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { behind, readCursor, writeCursor } from '../platform/cursor';
import { badField } from '../platform/problem';
import { athleteInReach, athletesInReach, squadsInReach } from '../reach/reach';
import { verticalAtGlance } from '../trend/glance';
import { athleteRows } from './athlete-rows';

type Context = Pick<AppContext, 'db' | 'now'>;

/** Athletes in the caller's reach, filtered, sorted and paged by the database. */
export function listAthletes({ db }: Context, user: SignedInUser, query: QueryOf<typeof listCall>) {
  const { squadId, search, sort, direction, cursor, limit } = query;
  const filter = and(
    athletesInReach(db, user),
    squadId === undefined ? undefined : eq(athletes.squadId, squadId),
    search ? foldedContains(athletes.name, search) : undefined,
    query.includeDeactivated === 'true' ? undefined : isNull(athletes.deactivatedAt),
  );
  const rows = athleteRows(db, filter);
  const order = `${sort} ${direction}`;
  const value = { name: rows.foldedName, lastSession: rows.lastSession, clipsToMark: rows.clipsToMark }[sort];
  const place = cursor === undefined ? undefined : readCursor(cursor, order);
  const found = db
    .select()
    .from(rows)
    .where(place && behind(place, direction, { value, name: rows.foldedName, id: rows.id }))
    .orderBy(direction === 'asc' ? asc(value) : desc(value), asc(rows.foldedName), asc(rows.id))
    .limit(limit + 1)
    .all();
  const page = found.slice(0, limit);
  const last = found.length > limit ? page.at(-1) : undefined;
  const lastValue = last && {
    name: last.foldedName,
    lastSession: last.lastSession,
    clipsToMark: last.clipsToMark,
  };
  const total = db.select({ n: count() }).from(athletes).where(filter).get()?.n ?? 0;
  return {
    items: answers(db, page),
    nextCursor:
      last && lastValue
        ? writeCursor({ order, value: lastValue[sort], name: last.foldedName, id: last.id })
        : null,
    total,
  };
}

export function getAthlete({ db }: Context, user: SignedInUser, athleteId: string): Athlete {
  return answerOf(db, athleteInReach(db, user, athleteId).id);
}

/** Adds an athlete to a squad of the admin's club or one that the coach coaches. */
export function createAthlete(
  context: Context,
  user: SignedInUser,
  { name, squadId }: BodyOf<typeof createCall>,
): Athlete {
  const { db } = context;
  checkSquad(db, user, squadId);
  const id = randomUUID();
  db.insert(athletes)
    .values({ id, clubId: user.clubId, squadId, name, createdAt: context.now().toISOString() })
    .run();
  return answerOf(db, id);
}

/** Changes an athlete in reach; a coach can move them only to another squad of their own. */
export function updateAthlete(
  context: Context,
  user: SignedInUser,
  athleteId: string,
  { name, squadId, deactivated }: BodyOf<typeof updateCall>,
): Athlete {
  const { db } = context;
  const athlete = athleteInReach(db, user, athleteId);
  if (squadId !== undefined && squadId !== athlete.squadId) checkSquad(db, user, squadId);
  const deactivatedAt = deactivated ? (athlete.deactivatedAt ?? context.now().toISOString()) : null;
  db.update(athletes)
    .set({
      ...(name !== undefined && { name }),
      ...(squadId !== undefined && { squadId }),
      ...(deactivated !== undefined && { deactivatedAt }),
    })
    .where(eq(athletes.id, athlete.id))
    .run();
  return answerOf(db, athlete.id);
}

/** A squad that is not there and one that is not the caller's are refused in the same words. */
function checkSquad(db: Db, user: SignedInUser, squadId: string): void {
  const squad = db
    .select()
    .from(squads)
    .where(and(eq(squads.id, squadId), squadsInReach(db, user)))
    .get();
  if (!squad) throw badField('squadId', 'There is no such squad, or it is not yours to fill.');
  if (squad.deactivatedAt !== null) {
    throw badField('squadId', `${squad.name} is deactivated; take it back in first or choose another squad.`);
  }
}

interface Row {
  readonly id: string;
  readonly name: string;
  readonly squadId: string;
  readonly squadName: string;
  readonly lastSession: string;
  readonly sessionCount: number;
  readonly clipsToMark: number;
  readonly deactivatedAt: string | null;
}

function answers(db: Db, rows: readonly Row[]): Athlete[] {
  const glances = verticalAtGlance(
    db,
    rows.map((row) => row.id),
  );
  return rows.map((row) => ({
    id: row.id,
    name: row.name,
    squadId: row.squadId,
    squadName: row.squadName,
    lastSession: row.lastSession || null,
    sessionCount: row.sessionCount,
    clipsToMark: row.clipsToMark,
    verticalAt: glances.get(row.id) ?? { left: null, right: null },
    deactivated: row.deactivatedAt !== null,
  }));
}

function answerOf(db: Db, athleteId: string): Athlete {
  const rows = db
    .select()
    .from(athleteRows(db, eq(athletes.id, athleteId)))
    .all();
  const [answer] = answers(db, rows);
  if (!answer) throw new Error('an athlete who was just found is gone');
  return answer;
}
