import { mkdirSync, renameSync, rmSync } from 'node:fs';
import { dirname } from 'node:path';
import type { OpenDatabase } from './open';

/**
 * Writes a complete copy of the database to a file, which must not be there yet. The file has its name only once it is
 * whole.
 */
export function backupDatabase({ sqlite }: Pick<OpenDatabase, 'sqlite'>, path: string): void {
  mkdirSync(dirname(path), { recursive: true });
  const unfinished = `${path}.unfinished`;
  rmSync(unfinished, { force: true });
  sqlite.prepare('vacuum into ?').run(unfinished);
  renameSync(unfinished, path);
}
