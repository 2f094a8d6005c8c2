import { randomUUID } from 'node:crypto';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Clip } from '@stillstroke/contract/clip-facts';
import type { ClipIndex } from '@stillstroke/clip-index/frame-index';
import type { Db } from '@stillstroke/db/open';
import { clipFrames, clips, sessions } from '@stillstroke/db/schema/film';
import { and, eq, isNull } from 'drizzle-orm';
import { clipAnswer } from '../clips/clip-answer';
import { FORMULAS } from '../measures/figures';
import type { AppContext } from '../platform/context';
import { HttpProblem } from '../platform/problem';
import { liveSession } from '../sessions/live-film';
import { dropClip, keepIncoming } from './clip-store';
import { packFrames } from './frame-blobs';
import { makePoster, recogniseFilm } from './recognise';
import type { ReceivedFilm } from './receive-upload';

type Context = Pick<AppContext, 'db' | 'settings' | 'now'>;

/** A film recognised and ready to be kept. */
export interface RecognisedFilm extends ReceivedFilm {
  readonly index: ClipIndex;
  readonly hasPoster: boolean;
}

/**
 * Turns a received film into a clip of a session: recognises it, makes the poster, moves it to its place and enters it.
 *
 * @param incoming the folder in which the film lies; gone when this returns, still there when it throws
 */
export async function addFilm(
  context: Context,
  user: SignedInUser,
  sessionId: string,
  incoming: string,
  film: ReceivedFilm,
): Promise<Clip> {
  const { db, settings } = context;
  refuseDuplicate(db, liveSession(db, user, sessionId).athlete.id, film.sha256);
  const index = await recogniseFilm(incoming, settings.limits);
  const hasPoster = await makePoster(incoming, index);
  // Meanwhile the session may have been deleted, and the same film may have arrived a second time.
  const { athlete, session } = liveSession(db, user, sessionId);
  return keepFilm(context, athlete.id, session.id, incoming, { ...film, index, hasPoster });
}

/**
 * Moves the film's folder and enters its rows in one synchronous transaction. A crash in between leaves a folder without
 * a row, which is swept at the next start, never a row without its film.
 */
export function keepFilm(
  { db, settings, now }: Context,
  athleteId: string,
  sessionId: string,
  incoming: string,
  film: RecognisedFilm,
): Clip {
  const clipId = randomUUID();
  let moved = false;
  try {
    return db.transaction(
      (tx) => {
        refuseDuplicate(tx, athleteId, film.sha256);
        keepIncoming(settings, incoming, clipId);
        moved = true;
        tx.insert(clips)
          .values(clipRow(clipId, sessionId, film, now()))
          .run();
        tx.insert(clipFrames)
          .values({ clipId, ...packFrames(film.index) })
          .run();
        return clipAnswer(tx, clipId);
      },
      { behavior: 'immediate' },
    );
  } catch (error) {
    if (moved) dropClip(settings, clipId);
    throw error;
  }
}

function clipRow(
  id: string,
  sessionId: string,
  { index, name, fields, sizeBytes, sha256, hasPoster }: RecognisedFilm,
  now: Date,
): typeof clips.$inferInsert {
  return {
    id,
    sessionId,
    name,
    ...fields,
    status: 'ready',
    width: index.width,
    height: index.height,
    frameCount: index.timestampsUs.length,
    durationUs: index.durationUs,
    frameRate: index.frameRate,
    codec: index.codec,
    container: index.container,
    sizeBytes,
    sha256,
    cutOff: index.truncated,
    hasPoster,
    createdAt: now.toISOString(),
    figuresFormulas: FORMULAS,
  };
}

type Reader = Pick<Db, 'select'>;

/** The same bytes are one clip of an athlete: marks on two copies would never meet. */
function refuseDuplicate(db: Reader, athleteId: string, sha256: string): void {
  const there = db
    .select({ clipId: clips.id, sessionId: sessions.id, date: sessions.date })
    .from(clips)
    .innerJoin(sessions, eq(sessions.id, clips.sessionId))
    .where(
      and(
        eq(clips.sha256, sha256),
        eq(sessions.athleteId, athleteId),
        isNull(clips.deletedAt),
        isNull(sessions.deletedAt),
      ),
    )
    .get();
  if (!there) return;
  throw new HttpProblem(
    409,
    'duplicate-clip',
    `This file is already there, in the session of ${there.date}. Open it there, or delete it first.`,
    { current: { clipId: there.clipId, sessionId: there.sessionId, sessionDate: there.date } },
  );
}
