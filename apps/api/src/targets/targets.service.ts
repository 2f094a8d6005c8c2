import { randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf } from '@stillstroke/contract/endpoint';
import { measureSchema, type Measure } from '@stillstroke/contract/measures';
import {
  targetRange,
  type createTarget as createCall,
  type Target,
  type updateTarget as updateCall,
} from '@stillstroke/contract/targets';
import type { Db } from '@stillstroke/db/open';
import { users } from '@stillstroke/db/schema/club';
import { targets } from '@stillstroke/db/schema/targets';
import { band } from '@stillstroke/geometry/targets/band';
import { and, eq, isNull, type SQL } from 'drizzle-orm';
import { unitOf } from '../measures/units';
import type { AppContext } from '../platform/context';
import { badField, changedMeanwhile, HttpProblem, notFound } from '../platform/problem';
import { athleteInReach } from '../reach/reach';
import { refuseExpired } from '../sessions/live-film';
import { undoUntil } from '../sessions/undo';

type Context = Pick<AppContext, 'db' | 'now' | 'settings'>;
type Row = typeof targets.$inferSelect;

/** Targets of an athlete in the caller's reach, by measure and arm. */
export function listTargets({ db }: Pick<Context, 'db'>, user: SignedInUser, athleteId: string): Target[] {
  const athlete = athleteInReach(db, user, athleteId);
  return answers(db, and(eq(targets.athleteId, athlete.id), isNull(targets.deletedAt)));
}

/** Sets a band; where there is one for this measure and arm already, that one is to be changed instead. */
export function createTarget(
  { db, now }: Context,
  user: SignedInUser,
  athleteId: string,
  body: BodyOf<typeof createCall>,
): Target {
  const athlete = athleteInReach(db, user, athleteId);
  checkEnds(body.measure, body);
  const id = randomUUID();
  db.transaction(
    (tx) => {
      refuseSecond(tx, athlete.id, body);
      tx.insert(targets)
        .values({ id, athleteId: athlete.id, ...body, ...stamp(user, now) })
        .run();
    },
    { behavior: 'immediate' },
  );
  return answerOf(db, id);
}

export function updateTarget(
  { db, now }: Context,
  user: SignedInUser,
  targetId: string,
  { version, low, high, words }: BodyOf<typeof updateCall>,
): Target {
  targetInReach(db, user, targetId);
  db.transaction(
    (tx) => {
      const there = liveTarget(tx, user, targetId);
      if (version !== there.version) throw changedMeanwhile('target', answerOf(tx, targetId));
      const next = {
        low: low === undefined ? there.low : low,
        high: high === undefined ? there.high : high,
        words: words ?? there.words,
      };
      checkEnds(measureSchema.parse(there.measure), next);
      tx.update(targets)
        .set({ ...next, ...stamp(user, now), version: there.version + 1 })
        .where(eq(targets.id, targetId))
        .run();
    },
    { behavior: 'immediate' },
  );
  return answerOf(db, targetId);
}

/** Takes a target out of sight; until the instant answered it can be brought back. */
export function deleteTarget(
  { db, now, settings }: Context,
  user: SignedInUser,
  targetId: string,
): { undoUntil: string } {
  const target = liveTarget(db, user, targetId);
  const deletedAt = now().toISOString();
  db.update(targets).set({ deletedAt }).where(eq(targets.id, target.id)).run();
  return { undoUntil: undoUntil(settings, deletedAt) };
}

/** Brings a deleted target back, unless another was set in its place meanwhile; one that is there stays as it is. */
export function restoreTarget(context: Context, user: SignedInUser, targetId: string): Target {
  const { db } = context;
  targetInReach(db, user, targetId);
  db.transaction(
    (tx) => {
      const target = targetInReach(tx, user, targetId);
      if (target.deletedAt === null) return;
      refuseExpired(context, target.deletedAt);
      refuseSecond(tx, target.athleteId, target);
      tx.update(targets).set({ deletedAt: null }).where(eq(targets.id, target.id)).run();
    },
    { behavior: 'immediate' },
  );
  return answerOf(db, targetId);
}

/** The target of an athlete in reach, deleted ones included, or 404. */
function targetInReach(db: Db, user: SignedInUser, targetId: string): Row {
  const target = db.select().from(targets).where(eq(targets.id, targetId)).get();
  if (!target) throw notFound('target');
  try {
    athleteInReach(db, user, target.athleteId);
  } catch (error) {
    // The same words as for a target that is not there.
    throw error instanceof HttpProblem && error.status === 404 ? notFound('target') : error;
  }
  return target;
}

function liveTarget(db: Db, user: SignedInUser, targetId: string): Row {
  const target = targetInReach(db, user, targetId);
  if (target.deletedAt !== null) throw notFound('target');
  return target;
}

function refuseSecond(db: Db, athleteId: string, { measure, arm }: Pick<Row, 'measure' | 'arm'>): void {
  const there = db
    .select({ id: targets.id })
    .from(targets)
    .where(
      and(
        eq(targets.athleteId, athleteId),
        eq(targets.measure, measure),
        eq(targets.arm, arm),
        isNull(targets.deletedAt),
      ),
    )
    .get();
  if (there) {
    throw new HttpProblem(409, 'conflict', 'There is a target for this measure and arm; change that one.');
  }
}

/** Both ends make a band, within what the measure can be. */
function checkEnds(measure: Measure, { low, high }: Pick<Target, 'low' | 'high'>): void {
  const made = band(low, high);
  if (!made.ok) {
    throw made.reason === 'open-on-both-sides'
      ? badField('low', 'Give at least one end of the band.')
      : badField('high', 'The upper end has to be above the lower one.');
  }
  const range = targetRange(measure, unitOf[measure]);
  for (const [path, end] of Object.entries({ low, high })) {
    if (end !== null && (end < range.low || end > range.high)) {
      throw badField(path, 'This measure cannot be as small or as large as that.');
    }
  }
}

function stamp(user: SignedInUser, now: () => Date) {
  return { setBy: user.id, setAt: now().toISOString() };
}

function answers(db: Db, filter: SQL | undefined): Target[] {
  return db
    .select({ target: targets, setBy: users.name })
    .from(targets)
    .leftJoin(users, eq(users.id, targets.setBy))
    .where(filter)
    .orderBy(targets.measure, targets.arm)
    .all()
    .flatMap(({ target: { deletedAt: _, measure, ...target }, setBy }) => {
      const known = measureSchema.safeParse(measure);
      return known.success ? [{ ...target, measure: known.data, setBy }] : [];
    });
}

function answerOf(db: Db, targetId: string): Target {
  const [answer] = answers(db, eq(targets.id, targetId));
  if (!answer) throw notFound('target');
  return answer;
}
