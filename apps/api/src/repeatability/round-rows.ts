import type { Joints, MarkingRound, RoundMark } from '@stillstroke/contract/repeatability';
import type { Db } from '@stillstroke/db/open';
import { athletes } from '@stillstroke/db/schema/club';
import { clips, sessions } from '@stillstroke/db/schema/film';
import { markingRounds, roundMarks } from '@stillstroke/db/schema/repeatability';
import type { PlacedTwice } from '@stillstroke/geometry/uncertainty/own-uncertainty';
import { and, asc, count, desc, eq, isNotNull, isNull, sql, type SQL } from 'drizzle-orm';
import { plumbOf, type ClipRow } from '../clips/clip-answer';

export type RoundRow = typeof markingRounds.$inferSelect;
export type RoundMarkRow = typeof roundMarks.$inferSelect;

/** Rounds as the contract describes them, newest first. Rounds on deleted films are left out. */
export function roundAnswers(db: Pick<Db, 'select'>, where: SQL | undefined): MarkingRound[] {
  return db
    .select({
      id: markingRounds.id,
      clipId: clips.id,
      clipName: clips.name,
      sessionId: clips.sessionId,
      athleteName: athletes.name,
      createdAt: markingRounds.createdAt,
      finishedAt: markingRounds.finishedAt,
      frames: count(roundMarks.position),
      marked: count(roundMarks.shoulderX),
      own: sql<number>`count(case when ${roundMarks.firstBy} = ${markingRounds.userId} then 1 end)`,
    })
    .from(markingRounds)
    .innerJoin(clips, eq(clips.id, markingRounds.clipId))
    .innerJoin(sessions, eq(sessions.id, clips.sessionId))
    .innerJoin(athletes, eq(athletes.id, sessions.athleteId))
    .leftJoin(roundMarks, eq(roundMarks.roundId, markingRounds.id))
    .where(and(where, isNull(clips.deletedAt), isNull(sessions.deletedAt)))
    .groupBy(markingRounds.id)
    .orderBy(desc(markingRounds.createdAt), asc(markingRounds.id))
    .all();
}

export function roundMarkAnswer(row: RoundMarkRow): RoundMark {
  return { position: row.position, arm: row.arm, frame: row.frame, again: againOf(row) };
}

export function marksOfRound(db: Pick<Db, 'select'>, roundId: string): RoundMarkRow[] {
  return db
    .select()
    .from(roundMarks)
    .where(eq(roundMarks.roundId, roundId))
    .orderBy(asc(roundMarks.position))
    .all();
}

/** A frame that two marks of are known, by whom each was placed. */
export interface TwiceRow {
  readonly row: RoundMarkRow;
  readonly clip: ClipRow;
  readonly againBy: string;
  readonly finishedAt: string;
}

/** All frames marked again in finished rounds on films that are still there, oldest round first. */
export function markedTwice(db: Pick<Db, 'select'>, where: SQL | undefined): TwiceRow[] {
  return db
    .select({ row: roundMarks, clip: clips, round: markingRounds })
    .from(roundMarks)
    .innerJoin(markingRounds, eq(markingRounds.id, roundMarks.roundId))
    .innerJoin(clips, eq(clips.id, markingRounds.clipId))
    .innerJoin(sessions, eq(sessions.id, clips.sessionId))
    .where(
      and(
        where,
        isNotNull(markingRounds.finishedAt),
        isNotNull(roundMarks.shoulderX),
        isNull(clips.deletedAt),
        isNull(sessions.deletedAt),
      ),
    )
    .orderBy(asc(markingRounds.finishedAt), asc(roundMarks.roundId), asc(roundMarks.position))
    .all()
    .map(({ row, clip, round }) => ({
      row,
      clip,
      againBy: round.userId,
      finishedAt: round.finishedAt ?? round.createdAt,
    }));
}

/** What the geometry library compares; null for a frame that was not marked again. */
export function placedTwice({ row, clip }: Pick<TwiceRow, 'row' | 'clip'>): PlacedTwice | null {
  const again = againOf(row);
  if (!again) return null;
  return {
    size: { width: clip.width, height: clip.height },
    axes: { travel: clip.travel, plumb: plumbOf(clip) },
    first: {
      shoulder: { x: row.firstShoulderX, y: row.firstShoulderY },
      elbow: { x: row.firstElbowX, y: row.firstElbowY },
      wrist: { x: row.firstWristX, y: row.firstWristY },
    },
    again,
  };
}

function againOf(row: RoundMarkRow): Joints | null {
  const shoulder = pointOf(row.shoulderX, row.shoulderY);
  const elbow = pointOf(row.elbowX, row.elbowY);
  const wrist = pointOf(row.wristX, row.wristY);
  return shoulder && elbow && wrist ? { shoulder, elbow, wrist } : null;
}

function pointOf(x: number | null, y: number | null) {
  return x === null || y === null ? null : { x, y };
}
