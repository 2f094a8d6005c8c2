import { spawn, type ChildProcess } from 'node:child_process';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { openDatabase, type OpenDatabase } from '@stillstroke/db/open';
import { mails } from '@stillstroke/db/schema/mail';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { openTestClub, type TestClub } from '../platform/test-club';
import { deliveryOf, sendNext } from './sender';
import { openMailServer, placeAnswerMail, type TestMailServer } from './test-mails';
import { readSettings } from '../platform/settings';

/** Senders in processes of their own over one database file. */
const root = fileURLToPath(new URL('../../../..', import.meta.url));
let club: TestClub;
let path: string;
let file: OpenDatabase | undefined;
const children: ChildProcess[] = [];
const servers: TestMailServer[] = [];

beforeEach(async () => {
  club = await openTestClub();
  path = join(club.context.settings.dataFolder, 'mails.sqlite');
});
afterEach(async () => {
  for (const child of children.splice(0)) child.kill('SIGKILL');
  file?.close();
  for (const server of servers.splice(0)) await server.close();
  club.close();
});

/** Puts what is in the test club into the file. */
function writeFile(): OpenDatabase {
  club.context.sqlite.prepare('vacuum into ?').run(path);
  file = openDatabase(path);
  return file;
}

function startChild(url: string): ChildProcess {
  const child = spawn(
    process.execPath,
    ['--import', 'tsx', 'apps/api/src/mail/test-sender-process.ts', path],
    {
      cwd: root,
      env: {
        PATH: process.env['PATH'] ?? '',
        STILLSTROKE_DATA: club.context.settings.dataFolder,
        SMTP_URL: url,
      },
      stdio: 'inherit',
    },
  );
  children.push(child);
  return child;
}

describe('senders in processes of their own', () => {
  it('killed between taking and sending: the mail goes out once its lease is over, once', async () => {
    let arrived: () => void = () => undefined;
    const there = new Promise<void>((resolve) => (arrived = resolve));
    const silent = await openMailServer({ onConnect: () => arrived() });
    servers.push(silent);
    placeAnswerMail(club);
    const { db, sqlite } = writeFile();
    const child = startChild(silent.url);
    await there;
    const ended = new Promise((resolve) => child.on('exit', resolve));
    child.kill('SIGKILL');
    await ended;
    const left = db.select().from(mails).all();
    expect(left).toMatchObject([{ status: 'sending', attempts: 1 }]);

    const server = await openMailServer();
    servers.push(server);
    let now = new Date();
    const settings = readSettings({
      STILLSTROKE_DATA: club.context.settings.dataFolder,
      SMTP_URL: server.url,
    });
    const context = { ...club.context, db, sqlite, settings, now: () => now };
    expect(await sendNext(context, deliveryOf(context))).toBe('nothing-due');
    now = new Date(now.getTime() + 6 * 60_000);
    expect(await sendNext(context, deliveryOf(context))).toBe('settled');
    expect(await sendNext(context, deliveryOf(context))).toBe('nothing-due');
    expect(server.taken.map(({ messageId }) => messageId)).toEqual([left[0]?.messageId]);
    expect(db.select().from(mails).all()).toMatchObject([{ status: 'sent', attempts: 2 }]);
  });

  it('two at once: every mail goes out, none twice', async () => {
    const server = await openMailServer();
    servers.push(server);
    const ids = Array.from({ length: 30 }, () => placeAnswerMail(club));
    const { db } = writeFile();
    startChild(server.url);
    startChild(server.url);
    await vi.waitFor(
      () =>
        expect(
          db
            .select()
            .from(mails)
            .all()
            .every(({ status }) => status === 'sent'),
        ).toBe(true),
      { timeout: 50_000, interval: 100 },
    );
    expect(server.taken).toHaveLength(ids.length);
    expect(new Set(server.taken.map(({ messageId }) => messageId)).size).toBe(ids.length);
    expect(
      db
        .select()
        .from(mails)
        .all()
        .every(({ attempts }) => attempts === 1),
    ).toBe(true);
  });
});
