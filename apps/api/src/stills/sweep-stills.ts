import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import { stills } from '@stillstroke/db/schema/review';
import { isNotNull } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { pictureName, stillsFolder, storedPictures } from './still-store';

/**
 * Puts pictures and rows in step after a crash, and after rows went with an athlete or a club. Call it once this process
 * alone holds the data folder.
 */
export async function sweepStills({
  db,
  settings,
  log,
}: Pick<AppContext, 'db' | 'settings' | 'log'>): Promise<{ removed: number; missing: readonly string[] }> {
  const stored = new Set(storedPictures(settings));
  const rows = db
    .select({ id: stills.id, fileId: stills.fileId })
    .from(stills)
    .where(isNotNull(stills.fileId))
    .all();
  const known = new Map(rows.map(({ id, fileId }) => [pictureName(fileId ?? ''), id]));
  const stray = [...stored].filter((name) => !known.has(name));
  for (const name of stray) await rm(join(stillsFolder(settings), name), { recursive: true, force: true });
  const missing = [...known].flatMap(([name, id]) => (stored.has(name) ? [] : [id]));
  if (missing.length > 0)
    log.error({ stills: missing }, 'pictures of reviews are missing from the data folder');
  return { removed: stray.length, missing };
}
