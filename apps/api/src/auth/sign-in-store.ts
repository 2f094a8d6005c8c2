import { createHash } from 'node:crypto';
import { preparedOnce } from '@stillstroke/db/prepared-once';
import { signIns } from '@stillstroke/db/schema/sign-in';
import { and, eq, gt, lte, sql } from 'drizzle-orm';
import { Store, type SessionData } from 'express-session';
import type { AppContext } from '../platform/context';

const minute = 60_000;
const pruneEvery = 15 * minute;
/** Expiry is moved in steps of this, so that reading does not write to the disk each time. */
const touchStep = 10 * minute;

const signInBy = preparedOnce((db) =>
  db
    .select({ data: signIns.data, expiresAt: signIns.expiresAt })
    .from(signIns)
    .where(and(eq(signIns.idHash, sql.placeholder('idHash')), gt(signIns.expiresAt, sql.placeholder('now'))))
    .prepare(),
);

const prolong = preparedOnce((db) =>
  db
    .update(signIns)
    .set({ expiresAt: sql`${sql.placeholder('expiresAt')}` })
    .where(eq(signIns.idHash, sql.placeholder('idHash')))
    .prepare(),
);

type Done<T = void> = (error?: unknown, value?: T) => void;

/** Keeps who is signed in, in the database: under a hash of the cookie's id, with an expiry, pruned now and then. */
export class SignInStore extends Store {
  private prunedAt = 0;

  constructor(
    private readonly context: Pick<AppContext, 'db' | 'now'>,
    private readonly lifetimeMs: number,
  ) {
    super();
  }

  override get(id: string, done: (error: unknown, data?: SessionData | null) => void): void {
    attempt(done, () => {
      const { db } = this.context;
      const row = signInBy(db).get({ idHash: hashOf(id), now: this.now() });
      return row ? (JSON.parse(row.data) as SessionData) : null;
    });
  }

  override set(id: string, data: SessionData, done: Done = ignore): void {
    attempt(done, () => {
      this.prune();
      const row = {
        idHash: hashOf(id),
        userId: userIdIn(data),
        data: JSON.stringify(data),
        expiresAt: this.now() + this.lifetimeMs,
      };
      this.context.db
        .insert(signIns)
        .values(row)
        .onConflictDoUpdate({
          target: signIns.idHash,
          set: { userId: row.userId, data: row.data, expiresAt: row.expiresAt },
        })
        .run();
    });
  }

  override destroy(id: string, done: Done = ignore): void {
    attempt(done, () => {
      const { db } = this.context;
      db.delete(signIns)
        .where(eq(signIns.idHash, hashOf(id)))
        .run();
    });
  }

  override touch(id: string, _data: SessionData, done: Done = ignore): void {
    attempt(done, () => {
      const { db } = this.context;
      const idHash = hashOf(id);
      const now = this.now();
      // Read first: an update waits for other writers even when it finds nothing to change.
      const expiresAt = now + this.lifetimeMs;
      const there = signInBy(db).get({ idHash, now });
      if (there && there.expiresAt < expiresAt - touchStep) prolong(db).run({ idHash, expiresAt });
    });
  }

  /** Deletes what has expired, at most every quarter of an hour. */
  prune(): void {
    if (this.now() - this.prunedAt < pruneEvery) return;
    this.prunedAt = this.now();
    const { db } = this.context;
    db.delete(signIns).where(lte(signIns.expiresAt, this.now())).run();
  }

  private now(): number {
    return this.context.now().getTime();
  }
}

const ignore = () => undefined;
const hashOf = (id: string) => createHash('sha256').update(id).digest('hex');

function userIdIn(data: SessionData): string | null {
  const kept = (data as { passport?: { user?: { id?: unknown } } }).passport?.user?.id;
  return typeof kept === 'string' ? kept : null;
}

/** express-session expects answers by callback; a failing query must reach it as an error, once. */
function attempt<T>(done: (error: unknown, value?: T) => void, work: () => T): void {
  let value: T;
  try {
    value = work();
  } catch (error) {
    done(error);
    return;
  }
  done(null, value);
}
