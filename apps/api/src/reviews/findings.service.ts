import { randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf } from '@stillstroke/contract/endpoint';
import type { ReadingSource } from '@stillstroke/contract/review-readings';
import type {
  addFinding as addCall,
  Finding,
  updateFinding as updateCall,
} from '@stillstroke/contract/reviews';
import { sessions } from '@stillstroke/db/schema/film';
import { findingReadings, findings, observations, reviews, stills } from '@stillstroke/db/schema/review';
import { and, count, eq, max } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { badField, changedMeanwhile, HttpProblem, notFound } from '../platform/problem';
import { dropPictures } from '../stills/still-store';
import { clipOf } from './reading-stand';
import { findingAnswer } from './review-answer';
import { findingInReach, reviewInReach, type FindingRow, type Reader, type ReviewRow } from './review-reach';
import { draftOf, touch } from './reviews.service';

type Context = Pick<AppContext, 'db' | 'now' | 'settings'>;
type Transaction = Parameters<Parameters<AppContext['db']['transaction']>[0]>[0];
type Fields = Omit<BodyOf<typeof updateCall>, 'version'>;

/** A review tells a few things; more than this is a mistake. */
const MOST_FINDINGS = 40;

/** Adds a finding at the end of a draft. Sent twice under the same id it is one finding. */
export function addFinding(
  { db, now }: Context,
  user: SignedInUser,
  reviewId: string,
  { id = randomUUID(), ...fields }: BodyOf<typeof addCall>,
): Finding {
  reviewInReach(db, user, reviewId);
  return db.transaction(
    (tx) => {
      const review = draftOf(tx, reviewId);
      const there = tx.select().from(findings).where(eq(findings.id, id)).get();
      if (there) return sameAgain(tx, review, there, fields);
      const told = tx
        .select({ n: count(), last: max(findings.position) })
        .from(findings)
        .where(eq(findings.reviewId, reviewId))
        .get();
      if ((told?.n ?? 0) >= MOST_FINDINGS)
        throw new HttpProblem(
          409,
          'conflict',
          `A review holds ${MOST_FINDINGS} findings; take one away first.`,
        );
      checkFields(tx, user, review, fields);
      tx.insert(findings)
        .values({
          id,
          reviewId,
          position: (told?.last ?? -1) + 1,
          kind: fields.kind ?? 'to-work-on',
          words: fields.words ?? '',
          arm: fields.arm ?? 'none',
          phase: fields.phase ?? 'whole',
          observationId: fields.observationId ?? null,
          updatedAt: now().toISOString(),
          updatedBy: user.id,
        })
        .run();
      if (fields.readings) putReadings(tx, id, fields.readings);
      touch(tx, review, now());
      return findingAnswer(tx, review, id);
    },
    { behavior: 'immediate' },
  );
}

function sameAgain(tx: Reader, review: ReviewRow, there: FindingRow, fields: Fields): Finding {
  if (there.reviewId !== review.id)
    throw new HttpProblem(409, 'conflict', 'This id is taken; choose another.');
  const current = findingAnswer(tx, review, there.id);
  if (!isSame(current, fields)) throw changedMeanwhile('finding', current);
  return current;
}

export function updateFinding(
  { db, now }: Context,
  user: SignedInUser,
  findingId: string,
  { version, ...fields }: BodyOf<typeof updateCall>,
): Finding {
  const { review } = findingInReach(db, user, findingId);
  return db.transaction(
    (tx) => {
      const draft = draftOf(tx, review.id);
      const current = findingAnswer(tx, draft, findingId);
      // A change that arrived before its answer was lost is sent again; it is there already.
      if (version !== current.version && isSame(current, fields)) return current;
      if (version !== current.version) throw changedMeanwhile('finding', current);
      checkFields(tx, user, draft, fields, current);
      const { kind, words, arm, phase, observationId, readings } = fields;
      const at = now().toISOString();
      tx.update(findings)
        .set({
          ...(kind !== undefined && { kind }),
          ...(words !== undefined && { words }),
          ...(arm !== undefined && { arm }),
          ...(phase !== undefined && { phase }),
          ...(observationId !== undefined && { observationId }),
          version: current.version + 1,
          updatedAt: at,
          updatedBy: user.id,
        })
        .where(eq(findings.id, findingId))
        .run();
      if (readings) putReadings(tx, findingId, readings);
      tx.update(reviews).set({ updatedAt: at }).where(eq(reviews.id, draft.id)).run();
      return findingAnswer(tx, draft, findingId);
    },
    { behavior: 'immediate' },
  );
}

/** Takes a finding out of a draft with its pictures. */
export function deleteFinding(
  { db, now, settings }: Context,
  user: SignedInUser,
  findingId: string,
  version: number,
): void {
  const { review } = findingInReach(db, user, findingId);
  const files = db.transaction(
    (tx) => {
      const draft = draftOf(tx, review.id);
      const current = findingAnswer(tx, draft, findingId);
      if (version !== current.version) throw changedMeanwhile('finding', current);
      const pictures = tx
        .select({ fileId: stills.fileId })
        .from(stills)
        .where(eq(stills.findingId, findingId))
        .all();
      tx.delete(findings).where(eq(findings.id, findingId)).run();
      touch(tx, draft, now());
      return pictures.map(({ fileId }) => fileId);
    },
    { behavior: 'immediate' },
  );
  dropPictures(settings, files);
}

function isSame(current: Finding, { observationId, readings, ...plain }: Fields): boolean {
  const same = (Object.keys(plain) as (keyof typeof plain)[]).every((key) => current[key] === plain[key]);
  if (observationId !== undefined && (current.observation?.id ?? null) !== observationId) return false;
  const there = JSON.stringify(current.readings.map(({ source }) => source));
  return same && (readings === undefined || JSON.stringify(readings) === there);
}

/** A reading that is there already may stay when its film has gone meanwhile; it says so itself. */
function checkFields(
  tx: Reader,
  user: SignedInUser,
  review: ReviewRow,
  fields: Fields,
  current?: Finding,
): void {
  const { observationId, readings = [] } = fields;
  if (typeof observationId === 'string') {
    const mine = and(eq(observations.id, observationId), eq(observations.clubId, user.clubId));
    if (!tx.select({ id: observations.id }).from(observations).where(mine).get())
      throw badField('observationId', 'There is no such observation in the club’s list.');
  }
  const there = new Set(current?.readings.map(({ source }) => JSON.stringify(source)));
  readings.forEach((source, at) => {
    if (there.has(JSON.stringify(source))) return;
    if (!isOfAthlete(tx, review.athleteId, source))
      throw badField(`readings.${at}`, 'This was not read from a film of this athlete, or the film is gone.');
  });
}

function isOfAthlete(tx: Reader, athleteId: string, source: ReadingSource): boolean {
  if (source.kind !== 'session') return clipOf(tx, athleteId, source.clipId) !== undefined;
  const mine = and(eq(sessions.id, source.sessionId), eq(sessions.athleteId, athleteId));
  return tx.select({ id: sessions.id }).from(sessions).where(mine).get() !== undefined;
}

function putReadings(tx: Transaction, findingId: string, sources: readonly ReadingSource[]): void {
  tx.delete(findingReadings).where(eq(findingReadings.findingId, findingId)).run();
  sources.forEach((source, position) => {
    tx.insert(findingReadings)
      .values({ id: randomUUID(), findingId, position, source: JSON.stringify(source) })
      .run();
  });
}

/** Counts a change of a finding, for what hangs on it. */
export function touchFinding(tx: Transaction, finding: FindingRow, user: SignedInUser, at: Date): void {
  const updatedAt = at.toISOString();
  const changed = tx
    .update(findings)
    .set({ version: finding.version + 1, updatedAt, updatedBy: user.id })
    .where(eq(findings.id, finding.id))
    .run();
  if (changed.changes === 0) throw notFound('finding');
  tx.update(reviews).set({ updatedAt }).where(eq(reviews.id, finding.reviewId)).run();
}
