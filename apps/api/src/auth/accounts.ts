import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Db } from '@stillstroke/db/open';
import { preparedOnce } from '@stillstroke/db/prepared-once';
import { clubs, users } from '@stillstroke/db/schema/club';
import { signIns } from '@stillstroke/db/schema/sign-in';
import { and, eq, isNull, sql } from 'drizzle-orm';

const userColumns = {
  id: users.id,
  name: users.name,
  email: users.email,
  role: users.role,
  clubId: users.clubId,
  clubName: clubs.name,
  athleteId: users.athleteId,
};

/** The account as long as it may be used: deactivated ones are not found. */
export function activeUser(db: Db, id: string): SignedInUser | null {
  return activeById(db).get({ id }) ?? null;
}

const activeById = preparedOnce((db) =>
  db
    .select(userColumns)
    .from(users)
    .innerJoin(clubs, eq(clubs.id, users.clubId))
    .where(and(eq(users.id, sql.placeholder('id')), isNull(users.deactivatedAt)))
    .prepare(),
);

/** The active account behind an address (lower case) with its password hash. */
export function activeUserByEmail(
  db: Db,
  email: string,
): { user: SignedInUser; passwordHash: string | null } | null {
  const found = db
    .select({ user: userColumns, passwordHash: users.passwordHash })
    .from(users)
    .innerJoin(clubs, eq(clubs.id, users.clubId))
    .where(and(eq(users.email, email), isNull(users.deactivatedAt)))
    .get();
  if (!found) return null;
  return { user: found.user, passwordHash: found.passwordHash };
}

/** Signs an account out of every browser. */
export function endSignIns(db: Db, userId: string): void {
  db.delete(signIns).where(eq(signIns.userId, userId)).run();
}
