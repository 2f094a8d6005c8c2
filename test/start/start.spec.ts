import { spawn, type ChildProcess } from 'node:child_process';
import { existsSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { request } from 'node:http';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import Database from 'better-sqlite3';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';

/** Starts the real process and reads what it says. */
const root = fileURLToPath(new URL('../..', import.meta.url));
const started: ChildProcess[] = [];
let folder: string;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'stillstroke-start-'));
});
afterEach(() => {
  for (const child of started.splice(0)) child.kill('SIGKILL');
  rmSync(folder, { recursive: true, force: true });
});

interface Run {
  readonly child: ChildProcess;
  readonly said: () => { out: string; err: string };
  readonly ended: Promise<number | null>;
}

function run(environment: Record<string, string> = {}, ...words: string[]): Run {
  const child = spawn(process.execPath, ['--import', 'tsx', 'apps/api/src/main.ts', ...words], {
    cwd: root,
    env: {
      PATH: process.env['PATH'] ?? '',
      PORT: '0',
      STILLSTROKE_DATA: folder,
      STILLSTROKE_DEMO: 'off',
      ...environment,
    },
  });
  started.push(child);
  const said = { out: '', err: '' };
  child.stdout.on('data', (text: Buffer) => (said.out += text.toString()));
  child.stderr.on('data', (text: Buffer) => (said.err += text.toString()));
  const ended = new Promise<number | null>((resolve) => child.on('exit', resolve));
  return { child, said: () => said, ended };
}

/** @returns the address it prints once it listens */
async function running(started: Run): Promise<string> {
  for (;;) {
    const url = /is at (http:\S+)[^]*Ctrl\+C stops it/.exec(started.said().out)?.[1];
    if (url !== undefined) return url;
    const next = new Promise((resolve) => started.child.stdout?.once('data', resolve));
    const code = await Promise.race([next, started.ended.then((exit) => exit ?? 'a signal')]);
    if (!Buffer.isBuffer(code)) throw new Error(`ended with ${String(code)}: ${started.said().err}`);
  }
}

async function refusal(environment: Record<string, string>): Promise<string> {
  const refused = run(environment);
  expect(await refused.ended).toBe(1);
  expect(refused.said().out).toBe('');
  const { err } = refused.said();
  expect(err.trim().split('\n'), 'one sentence, no stack').toHaveLength(1);
  return err.trim();
}

describe('a start that cannot succeed says in one sentence what to do', () => {
  it('port taken', async () => {
    const taken = createServer();
    await new Promise<void>((resolve) => taken.listen(0, '127.0.0.1', resolve));
    const { port } = taken.address() as AddressInfo;
    expect(await refusal({ PORT: String(port) })).toBe(
      `Port ${port} is taken: stop what uses it, or set PORT to another one.`,
    );
    taken.close();
  });

  it('bad setting', async () => {
    expect(await refusal({ PORT: 'eighty' })).toBe(
      'Setting PORT cannot be used: give a whole number from 0 to 65535.',
    );
    expect(await refusal({ STILLSTROKE_DEMO: 'maybe' })).toBe(
      'Setting STILLSTROKE_DEMO cannot be used: give on or off.',
    );
  });

  it('data folder that cannot be written', async () => {
    writeFileSync(join(folder, 'file'), '');
    const inFile = join(folder, 'file', 'data');
    expect(await refusal({ STILLSTROKE_DATA: inFile })).toContain(
      `The data folder ${inFile} cannot be written (ENOTDIR): give this user the right to`,
    );
  });

  it('database that is none', async () => {
    writeFileSync(
      join(folder, 'stillstroke.sqlite'),
      'not a database, but long enough to be read as one'.repeat(40),
    );
    expect(await refusal({})).toContain('is damaged: put a copy from the folder backups in its place');
  });

  it('database of a newer version, which is left alone', async () => {
    const first = run();
    await running(first);
    first.child.kill('SIGTERM');
    expect(await first.ended).toBe(0);
    const database = new Database(join(folder, 'stillstroke.sqlite'));
    database
      .prepare('insert into __drizzle_migrations (hash, created_at) values (?, ?)')
      .run('from the future', 4_000_000_000_000);
    database.close();
    expect(await refusal({})).toContain('written by a newer Stillstroke');
    expect(existsSync(join(folder, 'backups'))).toBe(false);
  });

  it('data folder in use', async () => {
    const first = run();
    await running(first);
    expect(await refusal({})).toBe(
      `Another Stillstroke is running on the data folder ${folder}: stop it, or set STILLSTROKE_DATA to another folder.`,
    );
    first.child.kill('SIGKILL');
    await first.ended;
    await running(run());
  });
});

describe('a running server', () => {
  it('prints where it is and answers there', async () => {
    const url = await running(run());
    const answer = await fetch(`${url}/api/health`);
    expect(await answer.json()).toMatchObject({ status: 'ok' });
  });

  it('tells how to make a club where there is none, and the link works', async () => {
    const empty = run();
    await running(empty);
    expect(empty.said().out).toContain('npm start -- new-club');
    empty.child.kill('SIGTERM');
    await empty.ended;
    const made = run({ PORT: '4300' }, 'new-club', 'Harbour Swim Club', 'Ada Wren', 'ada@harbour.example');
    expect(await made.ended).toBe(0);
    const token = /localhost:4300\/invitation\/([\w-]{43})/.exec(made.said().out)?.[1] ?? '';
    const url = await running(run());
    const invitation = await fetch(`${url}/api/invitations/${token}`);
    expect(await invitation.json()).toMatchObject({
      name: 'Ada Wren',
      role: 'admin',
      clubName: 'Harbour Swim Club',
    });
    const wrong = run({}, 'new-club', 'Harbour Swim Club');
    expect(await wrong.ended).toBe(1);
  });

  it.each(['SIGTERM', 'SIGINT'] as const)(
    'finishes what is running at %s, then ends well',
    async (signal) => {
      const server = run();
      const url = await running(server);
      const page = await fetch(`${url}/api/auth/page`);
      const token = /XSRF-TOKEN=([^;]+)/.exec(page.headers.get('set-cookie') ?? '')?.[1] ?? '';
      const body = JSON.stringify({ email: 'nobody@harbour.example', password: 'lane four at dawn' });
      // The body's second half is sent only after the signal: the request is running by then.
      const call = request(`${url}/api/auth/sign-in`, {
        method: 'POST',
        headers: {
          'Content-Type': 'application/json',
          'Content-Length': String(body.length),
          'X-XSRF-TOKEN': token,
          Cookie: `XSRF-TOKEN=${token}`,
        },
      });
      const status = new Promise<number | undefined>((resolve, reject) => {
        call.on('response', (response) => {
          response.resume();
          resolve(response.statusCode);
        });
        call.on('error', reject);
      });
      await new Promise<void>((resolve) => call.write(body.slice(0, 10), () => resolve()));
      await fetch(`${url}/api/health`);
      server.child.kill(signal);
      await refusedAt(url);
      call.end(body.slice(10));
      expect(await status).toBe(401);
      expect(await server.ended).toBe(0);
      expect(
        readdirSync(folder).some((name) => name.endsWith('-wal')),
        'the log is folded in',
      ).toBe(false);
    },
  );
});

/** Waits until nothing is accepted there any more. */
async function refusedAt(url: string): Promise<void> {
  for (;;) {
    const taken = await fetch(`${url}/api/health`, { headers: { Connection: 'close' } }).then(
      () => true,
      () => false,
    );
    if (!taken) return;
  }
}
