import { randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf } from '@stillstroke/contract/endpoint';
import type { Observation, updateObservation as updateCall } from '@stillstroke/contract/review-lists';
import { isUniqueViolation } from '@stillstroke/db/constraint';
import { observations } from '@stillstroke/db/schema/review';
import { and, asc, eq, sql } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { changedMeanwhile, HttpProblem, notFound } from '../platform/problem';

type Context = Pick<AppContext, 'db' | 'now'>;

/** What coaches look for beside angles: common practice, no source. Every club starts with these and makes the list its own. */
export const firstObservations: readonly string[] = [
  'Head lift at the breath',
  'Hand crossing the centre line at entry',
  'Reach',
  'Body roll',
  'Hips and legs sinking',
  'Follow-through',
  'Timing of the kick',
  'Body position when drilling',
];

/** The club's list, by name. A club that has none yet gets the first ones. */
export function listObservations({ db, now }: Context, user: SignedInUser): Observation[] {
  const list = () =>
    db
      .select()
      .from(observations)
      .where(eq(observations.clubId, user.clubId))
      .orderBy(asc(sql`fold(${observations.name})`), asc(observations.id))
      .all()
      .map(answerOf);
  const there = list();
  if (there.length > 0) return there;
  const createdAt = now().toISOString();
  db.insert(observations)
    .values(firstObservations.map((name) => ({ id: randomUUID(), clubId: user.clubId, name, createdAt })))
    .onConflictDoNothing()
    .run();
  return list();
}

export function addObservation(context: Context, user: SignedInUser, name: string): Observation {
  // A first one of one's own must not keep the others from coming.
  listObservations(context, user);
  const { db, now } = context;
  return named(name, () =>
    answerOf(
      db
        .insert(observations)
        .values({ id: randomUUID(), clubId: user.clubId, name, createdAt: now().toISOString() })
        .returning()
        .get(),
    ),
  );
}

export function updateObservation(
  { db }: Context,
  user: SignedInUser,
  id: string,
  { version, name, retired }: BodyOf<typeof updateCall>,
): Observation {
  return db.transaction(
    (tx) => {
      const mine = and(eq(observations.id, id), eq(observations.clubId, user.clubId));
      const there = tx.select().from(observations).where(mine).get();
      if (!there) throw notFound('observation');
      if (version !== there.version) throw changedMeanwhile('observation', answerOf(there));
      return named(name ?? there.name, () => {
        const changed = tx
          .update(observations)
          .set({
            ...(name !== undefined && { name }),
            ...(retired !== undefined && { retired }),
            version: there.version + 1,
          })
          .where(mine)
          .returning()
          .get();
        if (!changed) throw notFound('observation');
        return answerOf(changed);
      });
    },
    { behavior: 'immediate' },
  );
}

function named(name: string, write: () => Observation): Observation {
  try {
    return write();
  } catch (error) {
    if (!isUniqueViolation(error)) throw error;
    throw new HttpProblem(409, 'name-taken', `The list has “${name}” already, perhaps retired.`);
  }
}

function answerOf({ id, name, retired, version }: typeof observations.$inferSelect): Observation {
  return { id, name, retired, version };
}
