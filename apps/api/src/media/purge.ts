import { clips, sessions } from '@stillstroke/db/schema/film';
import { targets } from '@stillstroke/db/schema/targets';
import { and, inArray, isNotNull, lte } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { undoCutoff } from '../sessions/undo';
import { clipFolder, dropFolder } from './clip-store';

type Context = Pick<AppContext, 'db' | 'settings' | 'now' | 'log'>;

const EVERY_MS = 60_000;

/**
 * Removes for good what was deleted longer ago than can be undone: rows first (index, strokes and marks go with them),
 * then files, so that a crash in between leaves files without a row, which the sweep at start takes.
 *
 * @returns ids of the clips that are gone
 */
export async function purgeDeleted({ db, settings, now }: Context): Promise<string[]> {
  const cutoff = undoCutoff(settings, now());
  const gone = db.transaction(
    (tx) => {
      const expired = tx
        .select({ id: sessions.id })
        .from(sessions)
        .where(and(isNotNull(sessions.deletedAt), lte(sessions.deletedAt, cutoff)))
        .all()
        .map(({ id }) => id);
      const ofSessions = tx
        .select({ id: clips.id })
        .from(clips)
        .where(inArray(clips.sessionId, expired))
        .all();
      const alone = tx
        .delete(clips)
        .where(and(isNotNull(clips.deletedAt), lte(clips.deletedAt, cutoff)))
        .returning({ id: clips.id })
        .all();
      tx.delete(sessions).where(inArray(sessions.id, expired)).run();
      tx.delete(targets)
        .where(and(isNotNull(targets.deletedAt), lte(targets.deletedAt, cutoff)))
        .run();
      return new Set([...ofSessions, ...alone].map(({ id }) => id));
    },
    { behavior: 'immediate' },
  );
  for (const clipId of gone) await dropFolder(clipFolder(settings, clipId));
  return [...gone];
}

/** Purges now and every minute until the function returned is called. */
export function startPurging(context: Context): () => void {
  const purge = (): void => {
    purgeDeleted(context).catch((error: unknown) => {
      context.log.error(
        { name: error instanceof Error ? error.name : 'unknown' },
        'purge of deleted clips failed',
      );
    });
  };
  purge();
  const timer = setInterval(purge, EVERY_MS);
  timer.unref();
  return () => clearInterval(timer);
}
