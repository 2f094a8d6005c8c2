import type { Response } from 'express';
import { notFound } from '../platform/problem';
import type { Settings } from '../platform/settings';
import { pictureName, stillsFolder } from './still-store';

/**
 * Sends the picture of a still. As films: no cache that several people share may keep it, and the browser has to ask
 * each time whether its copy may still be shown.
 */
export function sendPicture(settings: Settings, fileId: string, res: Response): Promise<void> {
  res.set({
    'Content-Type': 'image/jpeg',
    'Content-Disposition': 'inline; filename="still.jpg"',
    'Cache-Control': 'private, no-cache',
    'X-Content-Type-Options': 'nosniff',
    ETag: `"${fileId}"`,
  });
  return new Promise((resolve, reject) => {
    res.sendFile(
      pictureName(fileId),
      { root: stillsFolder(settings), cacheControl: false, lastModified: false },
      (error?: Error) => {
        const { code, status } = (error ?? {}) as NodeJS.ErrnoException & { status?: number };
        // Whoever leaves the page before the picture is there is no fault.
        if (!error || res.headersSent || code === 'ECONNABORTED') resolve();
        else {
          res.removeHeader('ETag');
          res.removeHeader('Content-Disposition');
          reject(status === 404 ? notFound('picture') : error);
        }
      },
    );
  });
}
