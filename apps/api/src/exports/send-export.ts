import { setImmediate } from 'node:timers/promises';
import type { Response } from 'express';
import { disposition } from '../media/film-name';
import { csvZipChunks } from './csv-zip';
import type { ExportParts } from './export-parts';
import { jsonChunks } from './json-chunks';

/**
 * Sends an export as a download. It is about one person and is kept by nobody on the way: `no-store`. Others are served
 * between two sessions, and no more is read than the other side takes. When something fails on the way the connection
 * breaks off, so that half a file is never taken for a whole one.
 */
export async function sendExport(parts: ExportParts, format: 'json' | 'csv', res: Response): Promise<void> {
  const chunks = format === 'json' ? jsonChunks(parts) : csvZipChunks(parts);
  res.set({
    'Content-Type': format === 'json' ? 'application/json; charset=utf-8' : 'application/zip',
    'Content-Disposition': disposition(
      `${parts.fileName}.${format === 'json' ? 'json' : 'zip'}`,
      'attachment',
    ),
    'Cache-Control': 'private, no-store',
    'X-Content-Type-Options': 'nosniff',
  });
  for (const chunk of chunks) {
    if (res.destroyed) return;
    if (!res.write(chunk)) await drained(res);
    await setImmediate();
  }
  res.end();
}

/** Until the other side has taken what was written, or has gone. */
function drained(res: Response): Promise<void> {
  return new Promise((resolve) => {
    const done = () => {
      res.off('drain', done).off('close', done);
      resolve();
    };
    res.on('drain', done).on('close', done);
  });
}
