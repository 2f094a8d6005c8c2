import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Db } from '@stillstroke/db/open';
import type { AppContext } from '../platform/context';
import { HttpProblem, notFound } from '../platform/problem';
import { clipInReach, sessionInReach } from '../reach/reach';
import { undoCutoff } from './undo';

/** What is deleted is out of sight for everybody, whatever still can be undone. */

/** A session in reach that is not deleted, or 404. */
export function liveSession(db: Db, user: SignedInUser, sessionId: string) {
  const found = sessionInReach(db, user, sessionId);
  if (found.session.deletedAt !== null) throw notFound('session');
  return found;
}

/** A clip in reach that is not deleted, nor its session, or 404. */
export function liveClip(db: Db, user: SignedInUser, clipId: string) {
  const found = clipInReach(db, user, clipId);
  if (found.clip.deletedAt !== null || found.session.deletedAt !== null) throw notFound('clip');
  return found;
}

type Context = Pick<AppContext, 'db' | 'now' | 'settings'>;

/** A session in reach, deleted not longer ago than can be undone, or not at all. */
export function restorableSession(context: Context, user: SignedInUser, sessionId: string) {
  const found = sessionInReach(context.db, user, sessionId);
  refuseExpired(context, found.session.deletedAt);
  return found;
}

/** A clip in reach, deleted not longer ago than can be undone, or not at all; its session has to be there. */
export function restorableClip(context: Context, user: SignedInUser, clipId: string) {
  const found = clipInReach(context.db, user, clipId);
  if (found.session.deletedAt !== null) throw notFound('clip');
  refuseExpired(context, found.clip.deletedAt);
  return found;
}

/** Refuses to bring back what was deleted longer ago than can be undone. */
export function refuseExpired(
  { settings, now }: Pick<Context, 'settings' | 'now'>,
  deletedAt: string | null,
): void {
  if (deletedAt !== null && deletedAt <= undoCutoff(settings, now())) {
    throw new HttpProblem(410, 'undo-expired', 'This was deleted too long ago to be brought back.');
  }
}
