import { randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf } from '@stillstroke/contract/endpoint';
import type {
  Squad,
  createSquad as createCall,
  updateSquad as updateCall,
} from '@stillstroke/contract/squads';
import { isUniqueViolation } from '@stillstroke/db/constraint';
import { folded } from '@stillstroke/db/folded';
import type { Db } from '@stillstroke/db/open';
import { athletes, squadCoaches, squads, users } from '@stillstroke/db/schema/club';
import { and, asc, count, eq, inArray, isNull, type SQL } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { badField, HttpProblem, notFound } from '../platform/problem';
import { squadsInReach } from '../reach/reach';

type Context = Pick<AppContext, 'db' | 'now'>;

/** Squads by name: an admin's all, a coach's own. */
export function listSquads({ db }: Context, user: SignedInUser): Squad[] {
  return answers(db, squadsInReach(db, user));
}

export function createSquad(
  context: Context,
  user: SignedInUser,
  { name, coachIds }: BodyOf<typeof createCall>,
): Squad {
  const { db } = context;
  const id = randomUUID();
  checkCoaches(db, user, coachIds);
  refusingTakenName(name, () =>
    db.transaction((tx) => {
      tx.insert(squads)
        .values({ id, clubId: user.clubId, name, createdAt: context.now().toISOString() })
        .run();
      setCoaches(tx, id, coachIds);
    }),
  );
  return answerOf(db, id);
}

/** Changes a squad of the admin's club. One that athletes still swim in cannot be deactivated. */
export function updateSquad(
  context: Context,
  user: SignedInUser,
  squadId: string,
  { name, coachIds, deactivated }: BodyOf<typeof updateCall>,
): Squad {
  const { db } = context;
  const squad = db
    .select()
    .from(squads)
    .where(and(eq(squads.id, squadId), squadsInReach(db, user)))
    .get();
  if (!squad) throw notFound('squad');
  if (coachIds) checkCoaches(db, user, coachIds);
  if (deactivated && squad.deactivatedAt === null) refuseWithAthletes(db, squad);
  const deactivatedAt = deactivated ? (squad.deactivatedAt ?? context.now().toISOString()) : null;
  refusingTakenName(name ?? squad.name, () =>
    db.transaction((tx) => {
      tx.update(squads)
        .set({ name: name ?? squad.name, ...(deactivated !== undefined && { deactivatedAt }) })
        .where(eq(squads.id, squad.id))
        .run();
      if (coachIds) setCoaches(tx, squad.id, coachIds);
    }),
  );
  return answerOf(db, squad.id);
}

type Transaction = Parameters<Parameters<Db['transaction']>[0]>[0];

function setCoaches(tx: Transaction, squadId: string, coachIds: readonly string[]): void {
  tx.delete(squadCoaches).where(eq(squadCoaches.squadId, squadId)).run();
  const rows = [...new Set(coachIds)].map((userId) => ({ squadId, userId }));
  if (rows.length > 0) tx.insert(squadCoaches).values(rows).run();
}

function checkCoaches(db: Db, user: SignedInUser, coachIds: readonly string[]): void {
  const known = new Set(
    db
      .select({ id: users.id })
      .from(users)
      .where(
        and(
          inArray(users.id, [...coachIds]),
          eq(users.clubId, user.clubId),
          eq(users.role, 'coach'),
          isNull(users.deactivatedAt),
        ),
      )
      .all()
      .map((row) => row.id),
  );
  const unknown = coachIds.findIndex((id) => !known.has(id));
  if (unknown >= 0) throw badField(`coachIds.${unknown}`, 'There is no such active coach in your club.');
}

function refuseWithAthletes(db: Db, squad: { id: string; name: string }): void {
  const swimming = db
    .select({ n: count() })
    .from(athletes)
    .where(and(eq(athletes.squadId, squad.id), isNull(athletes.deactivatedAt)))
    .get();
  const n = swimming?.n ?? 0;
  if (n > 0) {
    const who = n === 1 ? 'One athlete swims' : `${n} athletes swim`;
    throw new HttpProblem(
      409,
      'conflict',
      `${who} in ${squad.name}: move or deactivate them first, then deactivate the squad.`,
    );
  }
}

function refusingTakenName(name: string, work: () => void): void {
  try {
    work();
  } catch (error) {
    // The index on club and name decides, so that two admins at once cannot make the same squad.
    if (!isUniqueViolation(error)) throw error;
    throw new HttpProblem(409, 'name-taken', `There already is a squad called ${name}. Choose another name.`);
  }
}

function answerOf(db: Db, squadId: string): Squad {
  const [answer] = answers(db, eq(squads.id, squadId));
  if (!answer) throw new Error('a squad that was just found is gone');
  return answer;
}

function answers(db: Db, where: SQL): Squad[] {
  const rows = db
    .select()
    .from(squads)
    .where(where)
    .orderBy(asc(folded(squads.name)), asc(squads.id))
    .all();
  const ids = rows.map((row) => row.id);
  const coaches = db
    .select({ squadId: squadCoaches.squadId, id: users.id, name: users.name })
    .from(squadCoaches)
    .innerJoin(users, eq(users.id, squadCoaches.userId))
    .where(and(inArray(squadCoaches.squadId, ids), isNull(users.deactivatedAt)))
    .orderBy(asc(folded(users.name)), asc(users.id))
    .all();
  const counts = db
    .select({ squadId: athletes.squadId, n: count() })
    .from(athletes)
    .where(and(inArray(athletes.squadId, ids), isNull(athletes.deactivatedAt)))
    .groupBy(athletes.squadId)
    .all();
  return rows.map((row) => ({
    id: row.id,
    name: row.name,
    coaches: coaches.filter((coach) => coach.squadId === row.id).map(({ id, name }) => ({ id, name })),
    athleteCount: counts.find((one) => one.squadId === row.id)?.n ?? 0,
    deactivated: row.deactivatedAt !== null,
  }));
}
