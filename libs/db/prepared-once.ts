import { type AnyColumn, sql, type SQL } from 'drizzle-orm';
import type { Db } from './open';

/** A database or a transaction in it. */
type Connection = Pick<Db, 'select'>;

/**
 * A query that is built and compiled once for each open database, with `sql.placeholder` where its values go. Building a
 * query costs several times what SQLite needs to answer it, so what every request asks is kept.
 *
 * SQLite has one connection here, so a statement made outside of a transaction sees what that transaction has written.
 */
export function preparedOnce<Query>(prepare: (db: Db) => Query): (db: Connection) => Query {
  const kept = new WeakMap<object, Query>();
  return (db) => {
    const session = sessionOf(db);
    const there = kept.get(session);
    if (there !== undefined) return there;
    const made = prepare(db as Db);
    kept.set(session, made);
    return made;
  };
}

/** `column in (…)` for a prepared query whose list differs each time; the list goes in as a JSON array under that name. */
export function inListed(column: AnyColumn, name: string): SQL {
  return sql`${column} in (select value from json_each(${sql.placeholder(name)}))`;
}

/** What a database and its transactions have in common; a transaction is an object of its own each time. */
function sessionOf(db: Connection): object {
  const { session } = db as unknown as { session?: object };
  return session ?? db;
}
