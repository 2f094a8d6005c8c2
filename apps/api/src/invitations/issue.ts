import { createHash, randomUUID } from 'node:crypto';
import type { Db } from '@stillstroke/db/open';
import { invitations } from '@stillstroke/db/schema/sign-in';
import { and, eq, isNull } from 'drizzle-orm';
import { linkToken } from '../mail/link-token';

const lifetimeMs = 7 * 24 * 60 * 60 * 1000;

export interface IssuedInvitation {
  readonly id: string;
  /** Known to whoever gets the link; only its hash is stored. */
  readonly token: string;
  /** ISO 8601 UTC. */
  readonly expiresAt: string;
}

/**
 * Makes an invitation for an account and spends those given out before.
 *
 * @param key of `linkKey`: with it the mail that is sent later can name the same link
 */
export function issueInvitation(db: Db, now: Date, userId: string, key: string): IssuedInvitation {
  revokeInvitations(db, userId, now);
  const id = randomUUID();
  const token = linkToken(key, 'invitation', id);
  const expiresAt = new Date(now.getTime() + lifetimeMs).toISOString();
  db.insert(invitations)
    .values({
      id,
      userId,
      tokenHash: tokenHash(token),
      expiresAt,
      createdAt: now.toISOString(),
    })
    .run();
  return { id, token, expiresAt };
}

/** Spends every open invitation of an account. */
export function revokeInvitations(db: Db, userId: string, now: Date): void {
  db.update(invitations)
    .set({ usedAt: now.toISOString() })
    .where(and(eq(invitations.userId, userId), isNull(invitations.usedAt)))
    .run();
}

export const tokenHash = (token: string) => createHash('sha256').update(token).digest('hex');

/**
 * The address to hand to the invited person.
 *
 * @param base origin under which people reach the product
 */
export const invitationUrl = (base: string, token: string) => new URL(`/invitation/${token}`, base).href;
