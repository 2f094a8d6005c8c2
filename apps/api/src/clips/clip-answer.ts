import type { Clip, KnownDistance } from '@stillstroke/contract/clip-facts';
import type { Db } from '@stillstroke/db/open';
import { inListed, preparedOnce } from '@stillstroke/db/prepared-once';
import { clips, marks, sessions, strokes } from '@stillstroke/db/schema/film';
import {
  defaultJointUncertaintyPx,
  type JointUncertaintyPx,
} from '@stillstroke/geometry/uncertainty/joint-uncertainty';
import { clipDistances } from '@stillstroke/db/schema/timing';
import { and, asc, eq, isNull, sql, type SQL } from 'drizzle-orm';
import { notFound } from '../platform/problem';

export type ClipRow = typeof clips.$inferSelect;

/** Clips of some sessions by session, deleted ones left out, oldest first. */
export function clipsOfSessions(db: Db, sessionIds: readonly string[]): Map<string, Clip[]> {
  const bySession = new Map<string, Clip[]>();
  if (sessionIds.length === 0) return bySession;
  const found = ofSessions(db).all({ sessionIds: JSON.stringify(sessionIds) });
  for (const clip of found.map(asAnswer)) {
    const listed = bySession.get(clip.sessionId);
    if (listed) listed.push(clip);
    else bySession.set(clip.sessionId, [clip]);
  }
  return bySession;
}

/** One clip as the contract describes it; the caller has made sure that it may be seen. */
export function clipAnswer(db: Db, clipId: string): Clip {
  const found = byId(db).get({ id: clipId });
  if (!found) throw notFound('clip');
  return asAnswer(found);
}

const byId = preparedOnce((db) => answersWhere(db, eq(clips.id, sql.placeholder('id'))).prepare());
const ofSessions = preparedOnce((db) =>
  answersWhere(db, and(inListed(clips.sessionId, 'sessionIds'), isNull(clips.deletedAt))).prepare(),
);

function answersWhere(db: Db, where: SQL | undefined) {
  return db
    .select({
      clip: clips,
      distance: clipDistances,
      athleteId: sessions.athleteId,
      markedFrames: sql<number>`(select count(distinct ${marks.frame}) from ${marks} where ${marks.clipId} = ${clips.id})`,
      strokeCount: sql<number>`(select count(*) from ${strokes} where ${strokes.clipId} = ${clips.id})`,
    })
    .from(clips)
    .innerJoin(sessions, eq(sessions.id, clips.sessionId))
    .leftJoin(clipDistances, eq(clipDistances.clipId, clips.id))
    .where(where)
    .orderBy(asc(clips.createdAt), asc(clips.id));
}

type DistanceRow = typeof clipDistances.$inferSelect;
type Found = { clip: ClipRow; distance: DistanceRow | null } & Pick<
  Clip,
  'athleteId' | 'markedFrames' | 'strokeCount'
>;

function asAnswer({ clip: row, distance, ...counted }: Found): Clip {
  const { plumbTopX, plumbTopY, plumbBottomX, plumbBottomY, figuresFormulas: _, ...rest } = row;
  const { markerId: _marker, jointShoulderPx, jointElbowPx: _elbow, jointWristPx: _wrist, ...others } = rest;
  const { fieldOfViewDeg, fieldOfViewMedium, ...facts } = others;
  return {
    ...facts,
    fieldOfView: fieldOfViewOf({ fieldOfViewDeg, fieldOfViewMedium }),
    plumb: plumbOf({ plumbTopX, plumbTopY, plumbBottomX, plumbBottomY }),
    jointUncertaintyPx: { ...jointUncertaintyOf(row) },
    jointUncertaintyOwn: jointShoulderPx !== null,
    distance: distance && distanceOf(distance),
    ...counted,
  };
}

/** The spread of whoever placed most of the marks, or the default for the picture's size. */
export function jointUncertaintyOf(row: ClipRow): JointUncertaintyPx {
  const { jointShoulderPx: shoulder, jointElbowPx: elbow, jointWristPx: wrist } = row;
  if (shoulder === null || elbow === null || wrist === null) return defaultJointUncertaintyPx(row);
  return { shoulder, elbow, wrist };
}

function distanceOf({ metres, uncertaintyM, fromFrame, toFrame }: DistanceRow): KnownDistance {
  return { metres, uncertaintyM, fromFrame, toFrame };
}

/** The plumb line of a clip's row; null where none was drawn. */
export function plumbOf(
  row: Pick<ClipRow, 'plumbTopX' | 'plumbTopY' | 'plumbBottomX' | 'plumbBottomY'>,
): Clip['plumb'] {
  const { plumbTopX, plumbTopY, plumbBottomX, plumbBottomY } = row;
  if (plumbTopX === null || plumbTopY === null || plumbBottomX === null || plumbBottomY === null) return null;
  return { top: { x: plumbTopX, y: plumbTopY }, bottom: { x: plumbBottomX, y: plumbBottomY } };
}

/** The field of view of a clip's row; null while nobody has said it. */
export function fieldOfViewOf({
  fieldOfViewDeg: deg,
  fieldOfViewMedium: medium,
}: Pick<ClipRow, 'fieldOfViewDeg' | 'fieldOfViewMedium'>): Clip['fieldOfView'] {
  return deg === null || medium === null ? null : { deg, medium };
}
