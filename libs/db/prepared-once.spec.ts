import { eq, sql } from 'drizzle-orm';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { migrateDatabase } from './migrate';
import { openDatabase, type OpenDatabase } from './open';
import { preparedOnce } from './prepared-once';
import { clubs } from './schema/club';

const migrations = fileURLToPath(new URL('./migrations', import.meta.url));

describe('a query prepared once', () => {
  let opened: OpenDatabase[];
  beforeEach(() => (opened = []));
  afterEach(() => opened.forEach((each) => each.close()));

  const open = () => {
    const one = openDatabase(':memory:');
    migrateDatabase(one, migrations);
    opened.push(one);
    return one.db;
  };

  it('is built once for a database and its transactions, and anew for another', () => {
    let built = 0;
    const byId = preparedOnce((db) => {
      built++;
      return db
        .select({ name: clubs.name })
        .from(clubs)
        .where(eq(clubs.id, sql.placeholder('id')))
        .prepare();
    });
    const [one, other] = [open(), open()];
    one.insert(clubs).values({ id: 'a', name: 'Tarn Valley', createdAt: '2026-01-05' }).run();
    expect(byId(one).get({ id: 'a' })).toEqual({ name: 'Tarn Valley' });
    one.transaction((tx) => {
      tx.update(clubs).set({ name: 'Renamed' }).where(eq(clubs.id, 'a')).run();
      expect(byId(tx).get({ id: 'a' })).toEqual({ name: 'Renamed' });
    });
    expect(byId(one).get({ id: 'a' })).toEqual({ name: 'Renamed' });
    expect(built).toBe(1);
    expect(byId(other).get({ id: 'a' })).toBeUndefined();
    expect(built).toBe(2);
  });
});
