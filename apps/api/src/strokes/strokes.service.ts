import { randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf } from '@stillstroke/contract/endpoint';
import type {
  createStroke as createCall,
  Stroke,
  updateStroke as updateCall,
} from '@stillstroke/contract/strokes';
import type { Db } from '@stillstroke/db/open';
import { strokes } from '@stillstroke/db/schema/film';
import { and, eq } from 'drizzle-orm';
import type { ClipRow } from '../clips/clip-answer';
import { strokeRows } from '../measures/clip-reading';
import { refreshCoordination } from '../measures/coordination-figures';
import { refreshStrokeFigures } from '../measures/figures';
import type { AppContext } from '../platform/context';
import { changedMeanwhile, HttpProblem, notFound } from '../platform/problem';
import { liveClip } from '../sessions/live-film';
import { strokeAnswer, strokeColumns } from './stroke-answer';
import { checkEvents, checkNoOverlap } from './stroke-rules';

type Context = Pick<AppContext, 'db' | 'now'>;
type Row = typeof strokes.$inferSelect;

/** Strokes of a clip, by arm and entry. */
export function listStrokes({ db }: Context, user: SignedInUser, clipId: string): Stroke[] {
  const { clip } = liveClip(db, user, clipId);
  return strokeRows(db, clip.id).map(strokeAnswer);
}

/** Adds a stroke. Sent twice under the same id with the same content, it is one stroke. */
export function createStroke(
  { db, now }: Context,
  user: SignedInUser,
  clipId: string,
  body: BodyOf<typeof createCall>,
): Stroke {
  const { clip } = liveClip(db, user, clipId);
  const { id = randomUUID(), ...wanted } = body;
  const fields: Fields = {
    ...wanted,
    nextEntry: wanted.nextEntry ?? null,
    entrySource: wanted.entrySource ?? 'hand-seen',
    catchSource: wanted.catchSource ?? 'hand-seen',
    exitSource: wanted.exitSource ?? 'hand-seen',
    nextEntrySource: wanted.nextEntrySource ?? 'hand-seen',
  };
  return db.transaction(
    (tx) => {
      const there = tx.select().from(strokes).where(eq(strokes.id, id)).get();
      if (there) return sameAgain(there, clip, fields);
      checkEvents(fields, clip.frameCount);
      checkNoOverlap(tx, { ...fields, id, clipId: clip.id });
      const row = { id, clipId: clip.id, ...strokeColumns(fields), arm: fields.arm, ...stamp(user, now) };
      const stroke = tx.insert(strokes).values(row).returning().get();
      refreshStrokeFigures(tx, clip.id, id);
      return strokeAnswer(stroke);
    },
    { behavior: 'immediate' },
  );
}

type Fields = Omit<Stroke, 'id' | 'clipId' | 'version'>;

/** A stroke of that id is there: the same one sent again, or a clash. Of another clip's nothing is told. */
function sameAgain(there: Row, clip: ClipRow, wanted: Fields): Stroke {
  const current = strokeAnswer(there);
  if (there.clipId !== clip.id) {
    throw new HttpProblem(409, 'conflict', 'This id is taken; choose another.');
  }
  const same = (Object.keys(wanted) as (keyof Fields)[]).every((key) => current[key] === wanted[key]);
  if (!same) throw changedMeanwhile('stroke', current);
  return current;
}

export function updateStroke(
  { db, now }: Context,
  user: SignedInUser,
  strokeId: string,
  { version, ...change }: BodyOf<typeof updateCall>,
): Stroke {
  const { clip } = strokeInReach(db, user, strokeId);
  return db.transaction(
    (tx) => {
      const there = tx.select().from(strokes).where(eq(strokes.id, strokeId)).get();
      if (!there) throw notFound('stroke');
      const current = strokeAnswer(there);
      if (version !== undefined && version !== current.version) throw changedMeanwhile('stroke', current);
      const given = Object.fromEntries(Object.entries(change).filter(([, value]) => value !== undefined));
      const next: Stroke = { ...current, ...given };
      checkEvents(next, clip.frameCount);
      checkNoOverlap(tx, next);
      const stroke = tx
        .update(strokes)
        .set({ ...strokeColumns(next), ...stamp(user, now), version: current.version + 1 })
        .where(eq(strokes.id, strokeId))
        .returning()
        .get();
      refreshStrokeFigures(tx, clip.id, strokeId);
      return strokeAnswer(stroke);
    },
    { behavior: 'immediate' },
  );
}

/** Takes a stroke away; its marks stay. */
export function deleteStroke({ db }: Context, user: SignedInUser, strokeId: string): void {
  const { clip } = strokeInReach(db, user, strokeId);
  db.transaction(
    (tx) => {
      tx.delete(strokes).where(eq(strokes.id, strokeId)).run();
      refreshCoordination(tx, clip.id);
    },
    { behavior: 'immediate' },
  );
}

function strokeInReach(db: Db, user: SignedInUser, strokeId: string): { clip: ClipRow } {
  const stroke = db
    .select()
    .from(strokes)
    .where(and(eq(strokes.id, strokeId)))
    .get();
  if (!stroke) throw notFound('stroke');
  return liveClip(db, user, stroke.clipId);
}

function stamp(user: SignedInUser, now: () => Date) {
  return { updatedAt: now().toISOString(), updatedBy: user.id };
}
