import { cpSync, existsSync, mkdtempSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import Database from 'better-sqlite3';
import { drizzle } from 'drizzle-orm/better-sqlite3';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { backupDatabase } from './backup';
import { isUniqueViolation } from './constraint';
import { DatabaseTooNewError, migrateDatabase, migrationsPending } from './migrate';
import { openDatabase } from './open';
import { clubs } from './schema/club';

const released = join(import.meta.dirname, 'migrations');
let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'stillstroke-db-'));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

interface Journal {
  entries: { idx: number; when: number; tag: string }[];
}
const journalOf = (migrations: string) =>
  JSON.parse(readFileSync(join(migrations, 'meta', '_journal.json'), 'utf8')) as Journal;

/** A copy of the released migrations that ends after some of them, with more of one's own behind. */
function migrationsUpTo(count: number, ...more: string[]): string {
  const copy = join(folder, `migrations-${count}-${more.length}`);
  cpSync(released, copy, { recursive: true });
  const journal = journalOf(copy);
  journal.entries = journal.entries.slice(0, count);
  more.forEach((text, n) => {
    const last = journal.entries.at(-1)?.when ?? 0;
    const tag = `9${n}_more`;
    writeFileSync(join(copy, `${tag}.sql`), text);
    journal.entries.push({
      ...journal.entries[0],
      idx: count + n,
      when: last + 1000,
      tag,
    });
  });
  writeFileSync(join(copy, 'meta', '_journal.json'), JSON.stringify(journal));
  return copy;
}

const family = `
  insert into clubs (id, name, created_at) values ('c', 'Tarn Valley', '2026-01-01');
  insert into squads (id, club_id, name, created_at) values ('s', 'c', 'Dawn', '2026-01-01');
  insert into athletes (id, club_id, squad_id, name, created_at) values ('a', 'c', 's', 'Ebba', '2026-01-01');
  insert into sessions (id, athlete_id, date, created_at) values ('v', 'a', '2026-02-01', '2026-02-01');
  insert into clips (id, session_id, name, view, travel, stroke, status, width, height, frame_count, duration_us, codec,
    container, size_bytes, sha256, cut_off, has_poster, created_at)
    values ('k', 'v', 'lane.mp4', 'side-underwater', 'right', 'full', 'ready', 2, 2, 9, 9, 'avc', 'MP4', 9, 'x', 0, 0, '2026-02-01');
  insert into strokes (id, clip_id, arm, entry_frame, catch_frame, exit_frame, breath, updated_at)
    values ('t', 'k', 'left', 1, 2, 3, 0, '2026-02-01');
  insert into marks (clip_id, arm, frame, shoulder_x, shoulder_y, elbow_x, elbow_y, wrist_x, wrist_y, updated_at)
    values ('k', 'left', 2, 1, 1, 2, 2, 3, 3, '2026-02-01');
`;
const kept = ['clubs', 'squads', 'athletes', 'sessions', 'clips', 'strokes', 'marks'];
const counts = ({ sqlite }: ReturnType<typeof openDatabase>) =>
  kept.map((table) => (sqlite.prepare(`select count(*) as n from ${table}`).get() as { n: number }).n);

describe('migrating', () => {
  const total = journalOf(released).entries.length;

  it.each(Array.from({ length: total - 1 }, (_, n) => n + 1))(
    'keeps every row and its children from version %i on',
    (version) => {
      const opened = openDatabase(':memory:');
      migrateDatabase(opened, migrationsUpTo(version));
      opened.sqlite.exec(family);
      expect(migrationsPending(opened, released)).toBe(true);
      migrateDatabase(opened, released);
      expect(counts(opened)).toEqual(kept.map(() => 1));
      expect(migrationsPending(opened, released)).toBe(false);
      opened.close();
    },
  );

  it('keeps the children of a table that is rebuilt, and checks foreign keys afterwards', () => {
    const opened = openDatabase(':memory:');
    migrateDatabase(opened, released);
    opened.sqlite.exec(family);
    const rebuild = `CREATE TABLE __new_clubs (id text PRIMARY KEY NOT NULL, name text NOT NULL, created_at text NOT NULL, town text);
--> statement-breakpoint
INSERT INTO __new_clubs (id, name, created_at) SELECT id, name, created_at FROM clubs;
--> statement-breakpoint
DROP TABLE clubs;
--> statement-breakpoint
ALTER TABLE __new_clubs RENAME TO clubs;`;
    migrateDatabase(opened, migrationsUpTo(total, rebuild));
    expect(counts(opened)).toEqual(kept.map(() => 1));
    expect(opened.sqlite.pragma('foreign_keys', { simple: true })).toBe(1);
    opened.close();
  });

  it('says so when a migration leaves rows without their parent', () => {
    const opened = openDatabase(':memory:');
    migrateDatabase(opened, released);
    opened.sqlite.exec(family);
    expect(() => migrateDatabase(opened, migrationsUpTo(total, 'DELETE FROM clubs;'))).toThrow(
      /rows without their parent; restore the backup/,
    );
    opened.close();
  });

  it('does not touch a database of a newer version', () => {
    const opened = openDatabase(':memory:');
    migrateDatabase(opened, migrationsUpTo(total, 'CREATE TABLE of_the_future (id text);'));
    expect(() => migrateDatabase(opened, released)).toThrow(DatabaseTooNewError);
    expect(opened.sqlite.prepare('select count(*) as n from of_the_future').get()).toEqual({ n: 0 });
    opened.close();
  });

  it('has nothing to back up in a new database', () => {
    const opened = openDatabase(':memory:');
    expect(migrationsPending(opened, released)).toBe(false);
    opened.close();
  });
});

describe('a backup', () => {
  it('is a whole database of its own, and never half a file under its name', () => {
    const opened = openDatabase(join(folder, 'live.sqlite'));
    migrateDatabase(opened, released);
    opened.sqlite.exec(family);
    const path = join(folder, 'backups', 'copy.sqlite');
    backupDatabase(opened, path);
    opened.sqlite.exec('delete from clubs');
    opened.close();
    const copy = openDatabase(path);
    expect(counts(copy)).toEqual(kept.map(() => 1));
    copy.close();
    expect(readdirSync(join(folder, 'backups')).filter((name) => name.includes('unfinished'))).toEqual([]);
    expect(existsSync(path)).toBe(true);
  });
});

describe('an open database', () => {
  it('has the settings that SQLite does not have by itself', () => {
    const opened = openDatabase(join(folder, 'live.sqlite'));
    const pragma = (name: string): unknown => opened.sqlite.pragma(name, { simple: true });
    expect([pragma('journal_mode'), pragma('synchronous'), pragma('foreign_keys')]).toEqual(['wal', 2, 1]);
    opened.close();
  });

  it('folds names for search and order', () => {
    const opened = openDatabase(':memory:');
    expect(opened.sqlite.prepare("select fold('ÅSA Nyström') as f, fold(null) as n").get()).toEqual({
      f: 'asa nystrom',
      n: null,
    });
    opened.close();
  });
});

describe('a unique violation', () => {
  it('is told from other errors, wherever its code sits', () => {
    const opened = openDatabase(':memory:');
    migrateDatabase(opened, released);
    const row = { id: 'c', name: 'Tarn Valley', createdAt: '2026-01-01' };
    opened.db.insert(clubs).values(row).run();
    const failing = [
      () => opened.db.insert(clubs).values(row).run(),
      () => opened.db.run("insert into clubs (id, name, created_at) values ('c', 'x', 'y')"),
    ];
    for (const fail of failing) expect(isUniqueViolation(caught(fail))).toBe(true);
    const bare = drizzle(new Database(':memory:'));
    expect(isUniqueViolation(caught(() => bare.run('select * from nowhere')))).toBe(false);
    expect(isUniqueViolation('text')).toBe(false);
    opened.close();
  });
});

function caught(work: () => unknown): unknown {
  try {
    work();
  } catch (error) {
    return error;
  }
  throw new Error('it did not fail');
}
