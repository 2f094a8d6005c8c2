import type { Person } from '@stillstroke/contract/people';
import { folded } from '@stillstroke/db/folded';
import type { Db } from '@stillstroke/db/open';
import { athletes, squadCoaches, users } from '@stillstroke/db/schema/club';
import { eq, inArray, sql, type SQL } from 'drizzle-orm';

/** Accounts with what the list shows and sorts by, as a subquery; `where` may speak of `users`. */
export function personRows(db: Db, where: SQL | undefined) {
  return db
    .select({
      id: users.id,
      name: users.name,
      foldedName: folded(users.name).as('folded_name'),
      email: users.email,
      role: users.role,
      athleteId: users.athleteId,
      createdAt: users.createdAt,
      status: sql<Person['status']>`case
        when ${users.deactivatedAt} is not null then 'deactivated'
        when ${users.passwordHash} is null then 'invited'
        else 'active' end`.as('status'),
    })
    .from(users)
    .where(where)
    .as('listed');
}

interface Row {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly role: Person['role'];
  readonly athleteId: string | null;
  readonly createdAt: string;
  readonly status: Person['status'];
}

/** People as the contract describes them, in the order given, in a fixed number of queries. */
export function personAnswers(db: Db, rows: readonly Row[]): Person[] {
  const coached = db
    .select()
    .from(squadCoaches)
    .where(
      inArray(
        squadCoaches.userId,
        rows.map((row) => row.id),
      ),
    )
    .all();
  const swum = db
    .select({ athleteId: athletes.id, squadId: athletes.squadId })
    .from(athletes)
    .where(
      inArray(
        athletes.id,
        rows.flatMap((row) => row.athleteId ?? []),
      ),
    )
    .all();
  return rows.map((row) => ({
    id: row.id,
    name: row.name,
    email: row.email,
    role: row.role,
    squadIds: [
      ...coached.filter((one) => one.userId === row.id).map((one) => one.squadId),
      ...swum.filter((one) => one.athleteId === row.athleteId).map((one) => one.squadId),
    ],
    athleteId: row.athleteId,
    status: row.status,
    createdAt: row.createdAt,
  }));
}

/** One person. @throws Error when there is none */
export function personAnswer(db: Db, userId: string): Person {
  const rows = db
    .select()
    .from(personRows(db, eq(users.id, userId)))
    .all();
  const [answer] = personAnswers(db, rows);
  if (!answer) throw new Error('a person who was just found is gone');
  return answer;
}
