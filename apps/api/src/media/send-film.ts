import type { Response } from 'express';
import type { ClipRow } from '../clips/clip-answer';
import { HttpProblem, notFound } from '../platform/problem';
import type { Settings } from '../platform/settings';
import { clipFolder } from './clip-store';
import { disposition } from './film-name';

/**
 * Films show people, most in swimwear and some of them minors. No cache that several people share may keep them, and the
 * browser may keep its copy but has to ask each time whether it may still be shown: after sign-out, or when the athlete
 * has moved to another squad, the copy is worth nothing. Asking costs one answer without a body (304), since the film's
 * hash is its tag.
 */
const CACHE = 'private, no-cache';

const contentTypes: Record<string, string> = {
  MP4: 'video/mp4',
  'QuickTime File Format': 'video/quicktime',
  Matroska: 'video/x-matroska',
  WebM: 'video/webm',
  'MPEG Transport Stream': 'video/mp2t',
};

/** Sends the film, whole or the range asked for. */
export async function sendFilm(settings: Settings, clip: ClipRow, res: Response): Promise<void> {
  res.set({
    'Content-Type': contentTypes[clip.container] ?? 'application/octet-stream',
    'Content-Disposition': disposition(clip.name),
    ETag: `"${clip.sha256}"`,
  });
  await send(settings, clip.id, 'film', res);
}

/** Sends the poster; 404 where none could be made. */
export async function sendPoster(settings: Settings, clip: ClipRow, res: Response): Promise<void> {
  if (!clip.hasPoster) throw notFound('poster');
  res.set({ 'Content-Type': 'image/jpeg', ETag: `"${clip.sha256}-poster"` });
  await send(settings, clip.id, 'poster.jpg', res);
}

function send(settings: Settings, clipId: string, file: string, res: Response): Promise<void> {
  res.set({ 'Cache-Control': CACHE, 'X-Content-Type-Options': 'nosniff' });
  return new Promise((resolve, reject) => {
    res.sendFile(
      file,
      // The tag is of the content: a date would change when the data folder is copied.
      { root: clipFolder(settings, clipId), cacheControl: false, lastModified: false },
      (error?: Error) => {
        // A browser leaves a film half read whenever it jumps or goes to another page: no fault, and nobody to tell.
        if (!error || res.headersSent || isAborted(error)) resolve();
        else reject(problemOf(error, res));
      },
    );
  });
}

function isAborted(error: Error): boolean {
  return (error as NodeJS.ErrnoException).code === 'ECONNABORTED';
}

function problemOf(error: Error, res: Response): Error {
  res.removeHeader('Content-Disposition');
  res.removeHeader('ETag');
  const { status, headers } = error as { status?: number; headers?: Record<string, string> };
  if (status === 416) {
    res.set(headers ?? {});
    return new HttpProblem(
      416,
      'range-not-satisfiable',
      'The film ends before the range that was asked for begins.',
    );
  }
  return status === 404 ? notFound('film') : error;
}
