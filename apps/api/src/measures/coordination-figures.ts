import type { Coordination } from '@stillstroke/contract/coordination';
import type { Db } from '@stillstroke/db/open';
import { clips, sessions, strokes } from '@stillstroke/db/schema/film';
import { coordinationFigures } from '@stillstroke/db/schema/timing';
import { indexOfCoordination, summariseCoordination } from '@stillstroke/geometry/events/coordination';
import { and, asc, eq, isNull, type SQL } from 'drizzle-orm';
import { clipRow, clipTimes, readingContext, strokeEvents } from './clip-reading';

type Writer = Pick<Db, 'select' | 'insert' | 'delete'>;

/** Computes the passages of a clip again; call it in the transaction that changed a stroke or the capture rate. */
export function refreshCoordination(tx: Writer, clipId: string): void {
  tx.delete(coordinationFigures).where(eq(coordinationFigures.clipId, clipId)).run();
  const clip = clipRow(tx, clipId);
  if (!clip) return;
  const rows = tx.select().from(strokes).where(eq(strokes.clipId, clipId)).all();
  const timed = rows.map(({ id, breath, arm, ...row }) => ({
    id,
    breath,
    arm,
    ...strokeEvents({ id, breath, arm, ...row }),
  }));
  const arms = {
    left: timed.filter(({ arm }) => arm === 'left'),
    right: timed.filter(({ arm }) => arm === 'right'),
  };
  if (arms.left.length === 0 || arms.right.length === 0) return;
  const read = indexOfCoordination(arms, clipTimes(tx, clipId), readingContext(clip));
  if (!read.ok) return;
  const figures = read.value.cycles.map(({ index, uncertainty, frames, strokes: [first, other] }) => ({
    strokeId: first.id,
    clipId,
    value: index / 100,
    uncertainty: uncertainty / 100,
    breath: first.breath || other.breath,
    frame: frames[0],
  }));
  for (let from = 0; from < figures.length; from += 500) {
    tx.insert(coordinationFigures)
      .values(figures.slice(from, from + 500))
      .run();
  }
}

/** Kept passages by session date, clip and frame; what is deleted is left out. */
export function keptPassages(db: Pick<Db, 'select'>, of: SQL) {
  return db
    .select({
      sessionId: sessions.id,
      date: sessions.date,
      view: clips.view,
      stroke: clips.stroke,
      clipId: clips.id,
      strokeId: coordinationFigures.strokeId,
      breath: coordinationFigures.breath,
      value: coordinationFigures.value,
      uncertainty: coordinationFigures.uncertainty,
      frame: coordinationFigures.frame,
    })
    .from(sessions)
    .innerJoin(clips, eq(clips.sessionId, sessions.id))
    .innerJoin(coordinationFigures, eq(coordinationFigures.clipId, clips.id))
    .where(and(of, isNull(sessions.deletedAt), isNull(clips.deletedAt)))
    .orderBy(
      asc(sessions.date),
      asc(sessions.createdAt),
      asc(clips.createdAt),
      asc(coordinationFigures.frame),
    )
    .all();
}
export type KeptPassage = ReturnType<typeof keptPassages>[number];

/** The mean over some passages with its mode, and the way to each of them. */
export function coordinationOf(passages: readonly KeptPassage[]): Coordination {
  if (passages.length === 0)
    return { value: null, uncertainty: null, interval: null, mode: null, passages: [] };
  const { index, uncertainty, interval, mode } = summariseCoordination(
    passages.map(({ value, uncertainty }) => ({ index: value, uncertainty })),
  );
  return {
    value: index,
    uncertainty,
    interval,
    mode,
    passages: passages.map(({ clipId, strokeId, breath, value, uncertainty, frame }) => ({
      clipId,
      strokeId,
      breath,
      value,
      uncertainty,
      frame,
    })),
  };
}
