import { randomUUID } from 'node:crypto';
import { mails, passwordResets } from '@stillstroke/db/schema/mail';
import { eq } from 'drizzle-orm';
import { SMTPServer, type SMTPServerOptions } from 'smtp-server';
import { simpleParser, type ParsedMail } from 'mailparser';
import type { AddressInfo } from 'node:net';
import { tokenHash } from '../invitations/issue';
import type { TestClub } from '../platform/test-club';
import { linkKey, linkToken } from './link-token';
import { queueMail } from './queue-mail';

/** Mails and mail servers for tests. */

type Place = Pick<TestClub, 'context' | 'ids'>;

/** An open link with which `guardian` sets a new password. @returns its token */
export function placeReset({ context, ids }: Place): string {
  const id = randomUUID();
  const now = context.now();
  const token = linkToken(linkKey(context.settings), 'password reset', id);
  context.db
    .insert(passwordResets)
    .values({
      id,
      userId: ids.users.guardian,
      tokenHash: tokenHash(token),
      expiresAt: new Date(now.getTime() + 60_000).toISOString(),
      createdAt: now.toISOString(),
    })
    .run();
  return token;
}

/** A mail that tells somebody (`coach`, if nobody else) of an answer. @returns its id */
export function placeAnswerMail({ context, ids }: Place, to = ids.users.coach): string {
  const data = { page: '/reviews/r1', from: 'Ebba Lindqvist' };
  return context.db.transaction((tx) => queueMail(tx, { kind: 'answer', to, data, now: context.now() }));
}

export function placeGivenUpMail(club: Place): string {
  const id = placeAnswerMail(club);
  club.context.db
    .update(mails)
    .set({ status: 'given-up', attempts: 3, lastError: 'The mail server refused the address: 550 no' })
    .where(eq(mails.id, id))
    .run();
  return id;
}

export interface TestMailServer {
  readonly url: string;
  /** What it took, in order. */
  readonly taken: readonly ParsedMail[];
  readonly recipients: readonly string[];
  close(): Promise<void>;
}

/** A mail server on a free port of this machine that takes everything, unless its options say otherwise. */
export async function openMailServer(options: SMTPServerOptions = {}, port = 0): Promise<TestMailServer> {
  const taken: ParsedMail[] = [];
  const recipients: string[] = [];
  const server = new SMTPServer({
    authOptional: true,
    onData: (stream, session, done) => {
      simpleParser(stream).then(
        (mail) => {
          taken.push(mail);
          recipients.push(...session.envelope.rcptTo.map(({ address }) => address));
          done();
        },
        (error: unknown) => done(error instanceof Error ? error : new Error('unreadable')),
      );
    },
    ...options,
  });
  // A client that is killed, or that gives up waiting, is no fault of the server's.
  server.on('error', () => undefined);
  await new Promise<void>((resolve) => void server.listen(port, '127.0.0.1', resolve));
  const { port: at } = server.server.address() as AddressInfo;
  return {
    url: `smtp://127.0.0.1:${at}`,
    taken,
    recipients,
    close: () => new Promise((resolve) => void server.close(() => resolve())),
  };
}
