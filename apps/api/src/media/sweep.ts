import { clips } from '@stillstroke/db/schema/film';
import type { AppContext } from '../platform/context';
import { abandonedIncoming, clipFolder, dropFolder, filmPath, storedClipIds } from './clip-store';
import { existsSync } from 'node:fs';

/** What a sweep found. */
export interface Swept {
  /** How many folders without a row, and uploads that were never finished, were removed. */
  readonly removed: number;
  /** Ids of clips whose film is gone from the disk: for whoever runs the server to bring back from a backup. */
  readonly missing: readonly string[];
}

/**
 * Puts films and rows in step after a crash. Call it once this process alone holds the data folder.
 *
 * @param startedAt uploads last touched before this instant belong to a process that is gone
 */
export async function sweepFilms(
  { db, settings, log }: Pick<AppContext, 'db' | 'settings' | 'log'>,
  startedAt: Date = new Date(performance.timeOrigin),
): Promise<Swept> {
  // Read in one go with the rows, so that no upload can finish between the two.
  const stored = storedClipIds(settings);
  const known = new Set(
    db
      .select({ id: clips.id })
      .from(clips)
      .all()
      .map(({ id }) => id),
  );
  const stray = [
    ...stored.filter((id) => !known.has(id)).map((id) => clipFolder(settings, id)),
    ...abandonedIncoming(settings, startedAt),
  ];
  for (const folder of stray) await dropFolder(folder);
  const missing = [...known].filter((id) => !existsSync(filmPath(clipFolder(settings, id))));
  if (missing.length > 0)
    log.error({ clips: missing }, 'films of these clips are missing from the data folder');
  return { removed: stray.length, missing };
}
