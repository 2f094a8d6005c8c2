import { randomUUID } from 'node:crypto';
import { emailSchema, nameSchema } from '@stillstroke/contract/fields';
import { isUniqueViolation } from '@stillstroke/db/constraint';
import { clubs, users } from '@stillstroke/db/schema/club';
import { invitationUrl, issueInvitation } from '../../invitations/issue';
import { linkKey } from '../../mail/link-token';
import type { AppContext } from '../context';
import { StartProblem } from './start-problem';

export const newClubUsage = 'npm start -- new-club "Name of the club" "Name of its admin" admin@club.example';

/**
 * Makes a club with its first admin.
 *
 * @param words name of the club, name of the admin, the admin's e-mail
 * @returns the link with which the admin sets the password
 */
export function makeClub(context: AppContext, words: readonly string[]): string {
  const club = nameSchema.safeParse(words[0]);
  const name = nameSchema.safeParse(words[1]);
  const email = emailSchema.safeParse(words[2]);
  if (!club.success || !name.success || !email.success || words.length !== 3) {
    throw new StartProblem(`Say it like this: ${newClubUsage}`);
  }
  const now = context.now();
  const [clubId, userId] = [randomUUID(), randomUUID()];
  const createdAt = now.toISOString();
  try {
    const { token } = context.db.transaction((tx) => {
      tx.insert(clubs).values({ id: clubId, name: club.data, createdAt }).run();
      tx.insert(users)
        .values({ id: userId, clubId, name: name.data, email: email.data, role: 'admin', createdAt })
        .run();
      return issueInvitation(tx, now, userId, linkKey(context.settings));
    });
    return invitationUrl(context.settings.publicUrl, token);
  } catch (error) {
    if (!isUniqueViolation(error)) throw error;
    throw new StartProblem(`${email.data} already has an account: use another address.`);
  }
}
