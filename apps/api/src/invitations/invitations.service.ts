import type { SignedInUser } from '@stillstroke/contract/auth';
import { clubs, users } from '@stillstroke/db/schema/club';
import { invitations } from '@stillstroke/db/schema/sign-in';
import { and, eq, gt, isNull } from 'drizzle-orm';
import { activeUser, endSignIns } from '../auth/accounts';
import { hashPassword } from '../auth/passwords';
import { spendResets } from '../password-reset/spend-resets';
import type { AppContext } from '../platform/context';
import { HttpProblem } from '../platform/problem';
import { tokenHash } from './issue';
import { refuseWeakPassword } from './password-strength';

type Context = Pick<AppContext, 'db' | 'now'>;

/** Never given out, spent, revoked and expired look the same. */
const spent = () =>
  new HttpProblem(
    404,
    'invitation-spent',
    'This invitation has been used or has expired. Ask the admin of your club for a new one.',
  );

/** Whom an open invitation is for. */
export function invitationFor(context: Context, token: string) {
  const { name, email, role, clubName } = openInvitation(context, token);
  return { name, email, role, clubName };
}

/** Sets the person's own password and spends the invitation; whoever was signed in to the account is signed out. */
export async function acceptInvitation(
  context: Context,
  token: string,
  password: string,
): Promise<SignedInUser> {
  const { db, now } = context;
  const invited = openInvitation(context, token);
  await refuseWeakPassword(password, [invited.name, invited.email, invited.clubName, 'stillstroke']);
  const passwordHash = await hashPassword(password);
  db.transaction((tx) => {
    // Hashing took a while: of two who accept at once, one is too late.
    const used = tx
      .update(invitations)
      .set({ usedAt: now().toISOString() })
      .where(and(eq(invitations.tokenHash, tokenHash(token)), isNull(invitations.usedAt)))
      .run();
    if (used.changes !== 1) throw spent();
    tx.update(users).set({ passwordHash }).where(eq(users.id, invited.userId)).run();
    spendResets(tx, invited.userId, now());
    endSignIns(tx, invited.userId);
  });
  const user = activeUser(db, invited.userId);
  if (!user) throw spent();
  return user;
}

function openInvitation({ db, now }: Context, token: string) {
  const found = db
    .select({
      userId: users.id,
      name: users.name,
      email: users.email,
      role: users.role,
      clubName: clubs.name,
    })
    .from(invitations)
    .innerJoin(users, eq(users.id, invitations.userId))
    .innerJoin(clubs, eq(clubs.id, users.clubId))
    .where(
      and(
        eq(invitations.tokenHash, tokenHash(token)),
        isNull(invitations.usedAt),
        gt(invitations.expiresAt, now().toISOString()),
        isNull(users.deactivatedAt),
      ),
    )
    .get();
  if (!found) throw spent();
  return found;
}
