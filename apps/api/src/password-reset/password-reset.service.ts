import { randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import { clubs, users } from '@stillstroke/db/schema/club';
import { passwordResets, passwordWishes } from '@stillstroke/db/schema/mail';
import { and, asc, eq, gt, isNull } from 'drizzle-orm';
import type { Db } from '@stillstroke/db/open';
import { activeUser, activeUserByEmail, endSignIns } from '../auth/accounts';
import { hashPassword } from '../auth/passwords';
import { revokeInvitations, tokenHash } from '../invitations/issue';
import { refuseWeakPassword } from '../invitations/password-strength';
import { linkKey, linkToken } from '../mail/link-token';
import { queueMail } from '../mail/queue-mail';
import type { AppContext } from '../platform/context';
import { HttpProblem } from '../platform/problem';
import { spendResets } from './spend-resets';

type Context = Pick<AppContext, 'db' | 'now' | 'settings'>;

const lifetimeMs = 60 * 60_000;
const wishesAtOnce = 50;

/** Never given out, spent, replaced and expired look the same. */
const spent = () =>
  new HttpProblem(
    404,
    'password-link-spent',
    'This link has been used or has run out. Ask for a new one on the sign-in page.',
  );

/**
 * Writes down that somebody asked for a new password. Whether there is such an account is looked up later by the
 * sender: the work done here, and so the time taken, is the same for every address.
 */
export function wishForPassword({ db, now }: Context, email: string): void {
  db.insert(passwordWishes).values({ id: randomUUID(), email, createdAt: now().toISOString() }).run();
}

/** Queues a mail with a link for each wish that an active account stands behind, and forgets the wishes. */
export function grantPasswordWishes(context: Context): void {
  const { db } = context;
  const wishes = db
    .select()
    .from(passwordWishes)
    .orderBy(asc(passwordWishes.createdAt))
    .limit(wishesAtOnce)
    .all();
  for (const { id, email } of wishes) {
    db.transaction(
      (tx) => {
        // Of two senders that saw the wish, one grants it.
        if (tx.delete(passwordWishes).where(eq(passwordWishes.id, id)).run().changes === 0) return;
        const found = activeUserByEmail(tx, email);
        if (found) queueReset(context, tx, found.user.id);
      },
      { behavior: 'immediate' },
    );
  }
}

function queueReset({ now, settings }: Context, tx: Db, userId: string): void {
  const at = now();
  spendResets(tx, userId, at);
  const id = randomUUID();
  tx.insert(passwordResets)
    .values({
      id,
      userId,
      tokenHash: tokenHash(linkToken(linkKey(settings), 'password reset', id)),
      expiresAt: new Date(at.getTime() + lifetimeMs).toISOString(),
      createdAt: at.toISOString(),
    })
    .run();
  queueMail(tx, { kind: 'password-reset', to: userId, data: { resetId: id }, now: at });
}

/** Whose password an open link sets. */
export function resetFor(context: Context, token: string) {
  const { name, email } = openReset(context, token);
  return { name, email };
}

/** Sets the new password and spends every link of the account; whoever was signed in to it is signed out. */
export async function resetPassword(
  context: Context,
  token: string,
  password: string,
): Promise<SignedInUser> {
  const { db, now } = context;
  const asked = openReset(context, token);
  await refuseWeakPassword(password, [asked.name, asked.email, asked.clubName, 'stillstroke']);
  const passwordHash = await hashPassword(password);
  db.transaction((tx) => {
    const at = now();
    // Hashing took a while: of two who set one at once, one is too late.
    const used = tx
      .update(passwordResets)
      .set({ usedAt: at.toISOString() })
      .where(and(eq(passwordResets.tokenHash, tokenHash(token)), isNull(passwordResets.usedAt)))
      .run();
    if (used.changes !== 1) throw spent();
    spendResets(tx, asked.userId, at);
    revokeInvitations(tx, asked.userId, at);
    tx.update(users).set({ passwordHash }).where(eq(users.id, asked.userId)).run();
    endSignIns(tx, asked.userId);
  });
  const user = activeUser(db, asked.userId);
  if (!user) throw spent();
  return user;
}

function openReset({ db, now }: Context, token: string) {
  const found = db
    .select({ userId: users.id, name: users.name, email: users.email, clubName: clubs.name })
    .from(passwordResets)
    .innerJoin(users, eq(users.id, passwordResets.userId))
    .innerJoin(clubs, eq(clubs.id, users.clubId))
    .where(
      and(
        eq(passwordResets.tokenHash, tokenHash(token)),
        isNull(passwordResets.usedAt),
        gt(passwordResets.expiresAt, now().toISOString()),
        isNull(users.deactivatedAt),
      ),
    )
    .get();
  if (!found) throw spent();
  return found;
}
