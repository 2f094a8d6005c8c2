import Database from 'better-sqlite3';
import { drizzle, type BetterSQLite3Database } from 'drizzle-orm/better-sqlite3';
import { fold } from './folded';
import { schema } from './schema/all';

export type Db = BetterSQLite3Database<typeof schema>;

export interface OpenDatabase {
  readonly db: Db;
  readonly sqlite: Database.Database;
  close(): void;
}

/**
 * Opens the database file (`:memory:` in tests) with the settings that SQLite does not have by itself:
 * write-ahead log, full durability of commits, foreign keys, and a wait for a busy writer.
 */
export function openDatabase(path: string): OpenDatabase {
  const sqlite = new Database(path);
  sqlite.pragma('journal_mode = WAL');
  // With NORMAL a power cut may lose the newest acknowledged commits of a write-ahead log.
  sqlite.pragma('synchronous = FULL');
  sqlite.pragma('busy_timeout = 5000');
  sqlite.pragma('foreign_keys = ON');
  // In KiB: a trend over hundreds of sessions touches more pages than the default of 2 MB holds.
  sqlite.pragma('cache_size = -65536');
  sqlite.function('fold', { deterministic: true }, (text) => (typeof text === 'string' ? fold(text) : null));
  const db = drizzle(sqlite, { schema, casing: 'snake_case' });
  return { db, sqlite, close: () => sqlite.close() };
}
