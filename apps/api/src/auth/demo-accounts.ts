import type { AnswerOf } from '@stillstroke/contract/endpoint';
import type { getSignInPage } from '@stillstroke/contract/auth';
import type { Db } from '@stillstroke/db/open';
import { clubs, users } from '@stillstroke/db/schema/club';
import { and, eq, inArray, isNull, isNotNull } from 'drizzle-orm';
import { DEMO_PASSWORD } from '../demo/season';

/** The demo's accounts that the sign-in page offers, in the order it shows them. */
export const demoEmails = [
  'coach@tarnvalley.example',
  'athlete@tarnvalley.example',
  'admin@tarnvalley.example',
  'guardian@tarnvalley.example',
  'coach@northmere.example',
] as const;

/** Those of the demo's accounts that are in the database and active; null when there is none. */
export function demoAccounts(db: Db): AnswerOf<typeof getSignInPage>['demo'] {
  const found = db
    .select({ email: users.email, name: users.name, role: users.role, clubName: clubs.name })
    .from(users)
    .innerJoin(clubs, eq(clubs.id, users.clubId))
    .where(
      and(inArray(users.email, [...demoEmails]), isNull(users.deactivatedAt), isNotNull(users.passwordHash)),
    )
    .all();
  if (found.length === 0) return null;
  const order: readonly string[] = demoEmails;
  found.sort((a, b) => order.indexOf(a.email) - order.indexOf(b.email));
  return { password: DEMO_PASSWORD, accounts: found };
}
