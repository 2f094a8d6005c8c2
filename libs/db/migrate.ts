import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { migrate } from 'drizzle-orm/better-sqlite3/migrator';
import type { OpenDatabase } from './open';

/** The database was written by a newer version of the program, which this one must not touch. */
export class DatabaseTooNewError extends Error {
  constructor() {
    super(
      'The database was written by a newer Stillstroke. Start that version, or point STILLSTROKE_DATA to another folder.',
    );
    this.name = 'DatabaseTooNewError';
  }
}

interface Journal {
  entries: { when: number }[];
}

/**
 * Brings the database to the newest schema. Foreign keys are switched off before the migrator opens its transaction,
 * since inside one SQLite ignores the switch and a rebuilt table would silently take its child rows along.
 *
 * @param folder the folder of migrations, with `meta/_journal.json`
 * @throws DatabaseTooNewError when the database knows migrations that the folder does not
 */
export function migrateDatabase({ db, sqlite }: OpenDatabase, folder: string): void {
  refuseNewer(sqlite, folder);
  sqlite.pragma('foreign_keys = OFF');
  try {
    migrate(db, { migrationsFolder: folder });
    const broken = sqlite.pragma('foreign_key_check') as unknown[];
    if (broken.length > 0) {
      throw new Error(
        `A migration left ${broken.length} rows without their parent; restore the backup beside the database.`,
      );
    }
  } finally {
    sqlite.pragma('foreign_keys = ON');
  }
}

function refuseNewer(sqlite: OpenDatabase['sqlite'], folder: string): void {
  const journalPath = join(folder, 'meta', '_journal.json');
  if (!existsSync(journalPath)) throw new Error(`No migrations at ${folder}; run npm run build.`);
  const known = (JSON.parse(readFileSync(journalPath, 'utf8')) as Journal).entries;
  const newestKnown = Math.max(0, ...known.map((entry) => entry.when));
  const table = sqlite
    .prepare("select 1 from sqlite_master where type = 'table' and name = '__drizzle_migrations'")
    .get();
  if (!table) return;
  const newest = sqlite.prepare('select max(created_at) as newest from __drizzle_migrations').get() as {
    newest: number | null;
  };
  if ((newest.newest ?? 0) > newestKnown) throw new DatabaseTooNewError();
}

/** Whether opening would migrate, i.e. whether a backup is due. */
export function migrationsPending({ sqlite }: OpenDatabase, folder: string): boolean {
  const table = sqlite.prepare("select 1 from sqlite_master where name = '__drizzle_migrations'").get();
  if (!table) return false;
  const done = sqlite.prepare('select count(*) as n from __drizzle_migrations').get() as { n: number };
  const known = (JSON.parse(readFileSync(join(folder, 'meta', '_journal.json'), 'utf8')) as Journal).entries
    .length;
  return done.n < known;
}
