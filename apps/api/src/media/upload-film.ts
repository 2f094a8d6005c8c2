import type { SignedInUser } from '@stillstroke/contract/auth';
import type { Clip } from '@stillstroke/contract/clip-facts';
import type { Request } from 'express';
import type { AppContext } from '../platform/context';
import { liveSession } from '../sessions/live-film';
import { addFilm } from './add-film';
import { dropFolder, filmPath, openIncoming } from './clip-store';
import { receiveUpload } from './receive-upload';

/** How long the rest of a refused upload is read and thrown away, so that the sender gets to read the refusal. */
const DRAIN_MS = 30_000;

/** Takes an upload in: nothing of it stays on disk unless it became a clip. */
export async function uploadFilm(
  context: AppContext,
  user: SignedInUser,
  sessionId: string,
  req: Request,
): Promise<Clip> {
  let incoming: string | null = null;
  try {
    // Before the first byte is written, and again once all have arrived.
    liveSession(context.db, user, sessionId);
    incoming = openIncoming(context.settings);
    const film = await receiveUpload(req, filmPath(incoming), context.settings.limits.clipBytes);
    return await addFilm(context, user, sessionId, incoming, film);
  } catch (error) {
    drain(req);
    throw error;
  } finally {
    if (incoming !== null) await dropFolder(incoming);
  }
}

function drain(req: Request): void {
  if (req.complete || req.destroyed) return;
  req.resume();
  const late = setTimeout(() => req.destroy(), DRAIN_MS);
  late.unref();
  req.once('close', () => clearTimeout(late));
}
