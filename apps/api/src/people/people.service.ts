import { randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf, QueryOf } from '@stillstroke/contract/endpoint';
import type {
  Person,
  invitePerson as inviteCall,
  listPeople as listCall,
  updatePerson as updateCall,
} from '@stillstroke/contract/people';
import { isUniqueViolation } from '@stillstroke/db/constraint';
import { foldedContains } from '@stillstroke/db/folded';
import type { Db } from '@stillstroke/db/open';
import { athletes, squadCoaches, squads, users } from '@stillstroke/db/schema/club';
import { and, asc, count, desc, eq, inArray, isNotNull, isNull, ne, or } from 'drizzle-orm';
import { endSignIns } from '../auth/accounts';
import { issueInvitation, revokeInvitations, type IssuedInvitation } from '../invitations/issue';
import { linkKey } from '../mail/link-token';
import { queueMail } from '../mail/queue-mail';
import type { AppContext } from '../platform/context';
import { behind, readCursor, writeCursor } from '../platform/cursor';
import { badField, HttpProblem, notFound } from '../platform/problem';
import { spendResets } from '../password-reset/spend-resets';
import { personAnswer, personAnswers, personRows } from './person-rows';

type Context = Pick<AppContext, 'db' | 'now' | 'settings'>;

export interface Invited {
  readonly person: Person;
  readonly invitation: IssuedInvitation;
}

/** Accounts of the caller's club, filtered, sorted and paged by the database. */
export function listPeople({ db }: Context, user: SignedInUser, query: QueryOf<typeof listCall>) {
  const { search, role, sort, direction, cursor, limit } = query;
  const filter = and(
    eq(users.clubId, user.clubId),
    role === undefined ? undefined : eq(users.role, role),
    search ? or(foldedContains(users.name, search), foldedContains(users.email, search)) : undefined,
  );
  const rows = personRows(db, filter);
  const order = `${sort} ${direction}`;
  const value = { name: rows.foldedName, role: rows.role, status: rows.status }[sort];
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
  return {
    items: personAnswers(db, page),
    nextCursor: last
      ? writeCursor({
          order,
          value: sort === 'name' ? last.foldedName : last[sort],
          name: last.foldedName,
          id: last.id,
        })
      : null,
    total: db.select({ n: count() }).from(users).where(filter).get()?.n ?? 0,
  };
}

/** Creates an account without a password and the invitation that lets its person set one. */
export function invitePerson(
  context: Context,
  user: SignedInUser,
  { name, email, role, squadIds, athleteId }: BodyOf<typeof inviteCall>,
): Invited {
  const { db } = context;
  if (role !== 'coach' && squadIds.length > 0) throw badField('squadIds', 'Only a coach coaches squads.');
  checkSquads(db, user, squadIds);
  checkAthlete(db, user, role, athleteId);
  const id = randomUUID();
  const createdAt = context.now().toISOString();
  try {
    return db.transaction((tx) => {
      tx.insert(users)
        .values({ id, clubId: user.clubId, name, email, role, athleteId: athleteId ?? null, createdAt })
        .run();
      setSquads(tx, id, squadIds);
      return { invitation: invite(context, tx, id), person: personAnswer(tx, id) };
    });
  } catch (error) {
    if (!isUniqueViolation(error)) throw error;
    throw new HttpProblem(
      409,
      'email-taken',
      'This e-mail address already has an account. Use another address, or invite the person it belongs to again.',
    );
  }
}

/** A fresh invitation; links given out earlier stop working. A password set before works until the new one is set. */
export function reinvitePerson(context: Context, user: SignedInUser, personId: string): Invited {
  const { db } = context;
  const person = personOfClub(db, user, personId);
  if (person.deactivatedAt !== null) {
    throw new HttpProblem(409, 'conflict', `${person.name} is deactivated; take them back in first.`);
  }
  return db.transaction((tx) => ({
    invitation: invite(context, tx, person.id),
    person: personAnswer(tx, person.id),
  }));
}

/** Makes the link and the mail with it. */
function invite({ now, settings }: Context, tx: Db, personId: string): IssuedInvitation {
  const invitation = issueInvitation(tx, now(), personId, linkKey(settings));
  queueMail(tx, { kind: 'invitation', to: personId, data: { invitationId: invitation.id }, now: now() });
  return invitation;
}

/** Changes an account of the club. Deactivating signs it out everywhere and spends its invitations. */
export function updatePerson(
  context: Context,
  user: SignedInUser,
  personId: string,
  { name, squadIds, deactivated }: BodyOf<typeof updateCall>,
): Person {
  const { db } = context;
  const person = personOfClub(db, user, personId);
  if (squadIds !== undefined) {
    if (person.role !== 'coach') throw badField('squadIds', 'Only a coach coaches squads.');
    checkSquads(db, user, squadIds);
  }
  const now = context.now().toISOString();
  const deactivatedAt = deactivated ? (person.deactivatedAt ?? now) : null;
  return db.transaction((tx) => {
    if (deactivated) {
      refuseLastAdmin(tx, person);
      endSignIns(tx, person.id);
      revokeInvitations(tx, person.id, context.now());
      spendResets(tx, person.id, context.now());
    }
    tx.update(users)
      .set({ name: name ?? person.name, ...(deactivated !== undefined && { deactivatedAt }) })
      .where(eq(users.id, person.id))
      .run();
    if (squadIds !== undefined) setSquads(tx, person.id, squadIds);
    return personAnswer(tx, person.id);
  });
}

function personOfClub(db: Db, user: SignedInUser, personId: string) {
  const person = db
    .select()
    .from(users)
    .where(and(eq(users.id, personId), eq(users.clubId, user.clubId)))
    .get();
  if (!person) throw notFound('person');
  return person;
}

/** Somebody must be left who can sign in and run the club. */
function refuseLastAdmin(db: Db, person: typeof users.$inferSelect): void {
  if (person.role !== 'admin' || person.deactivatedAt !== null) return;
  const others = db
    .select({ n: count() })
    .from(users)
    .where(
      and(
        eq(users.clubId, person.clubId),
        eq(users.role, 'admin'),
        ne(users.id, person.id),
        isNull(users.deactivatedAt),
        isNotNull(users.passwordHash),
      ),
    )
    .get();
  if ((others?.n ?? 0) === 0) {
    throw new HttpProblem(
      409,
      'conflict',
      `${person.name} is the club's last active admin. Invite another admin first, and have them set a password.`,
    );
  }
}

function checkSquads(db: Db, user: SignedInUser, squadIds: readonly string[]): void {
  const known = new Set(
    db
      .select({ id: squads.id })
      .from(squads)
      .where(and(inArray(squads.id, [...squadIds]), eq(squads.clubId, user.clubId)))
      .all()
      .map((row) => row.id),
  );
  const unknown = squadIds.findIndex((id) => !known.has(id));
  if (unknown >= 0) throw badField(`squadIds.${unknown}`, 'There is no such squad in your club.');
}

function checkAthlete(db: Db, user: SignedInUser, role: Person['role'], athleteId: string | undefined): void {
  if (role !== 'athlete') {
    if (athleteId !== undefined) throw badField('athleteId', 'Only the role athlete is an athlete.');
    return;
  }
  if (athleteId === undefined) throw badField('athleteId', 'Say which athlete of the club this account is.');
  const athlete = db
    .select({ name: athletes.name, userId: users.id })
    .from(athletes)
    .leftJoin(users, eq(users.athleteId, athletes.id))
    .where(and(eq(athletes.id, athleteId), eq(athletes.clubId, user.clubId)))
    .get();
  if (!athlete) throw badField('athleteId', 'There is no such athlete in your club.');
  if (athlete.userId !== null) {
    throw new HttpProblem(409, 'conflict', `${athlete.name} already has an account; invite that one again.`);
  }
}

function setSquads(db: Db, userId: string, squadIds: readonly string[]): void {
  db.delete(squadCoaches).where(eq(squadCoaches.userId, userId)).run();
  const rows = [...new Set(squadIds)].map((squadId) => ({ squadId, userId }));
  if (rows.length > 0) db.insert(squadCoaches).values(rows).run();
}
