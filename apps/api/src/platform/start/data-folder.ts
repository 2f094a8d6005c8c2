import { accessSync, constants, mkdirSync } from 'node:fs';
import { join } from 'node:path';
import Database from 'better-sqlite3';
import { StartProblem } from './start-problem';

/** How long a server that is just ending may take to let go of the folder. */
const patienceMs = 2000;

/**
 * Makes sure of the data folder and takes it for this process alone. The hold is a lock of the operating system, so it
 * ends with the process however that ends.
 *
 * @returns lets go of the folder
 * @throws StartProblem when it cannot be made or written, or another server has it
 */
export function takeDataFolder(folder: string): () => void {
  try {
    mkdirSync(folder, { recursive: true });
    accessSync(folder, constants.R_OK | constants.W_OK | constants.X_OK);
  } catch (error) {
    throw new StartProblem(
      `The data folder ${folder} cannot be written (${reason(error)}): give this user the right to, or set ` +
        'STILLSTROKE_DATA to another folder.',
    );
  }
  return lock(folder);
}

function lock(folder: string): () => void {
  let held: Database.Database | null = null;
  try {
    held = new Database(join(folder, 'in-use'), { timeout: patienceMs });
    held.pragma('journal_mode = MEMORY');
    held.exec('begin exclusive');
    const kept = held;
    return () => kept.close();
  } catch (error) {
    held?.close();
    const code = (error as { code?: string }).code ?? '';
    if (code.startsWith('SQLITE_BUSY')) {
      throw new StartProblem(
        `Another Stillstroke is running on the data folder ${folder}: stop it, or set STILLSTROKE_DATA to another folder.`,
      );
    }
    throw new StartProblem(
      `The data folder ${folder} cannot be written (${reason(error)}): give this user the right to, free space on ` +
        'its disk, or set STILLSTROKE_DATA to another folder.',
    );
  }
}

const reason = (error: unknown) => (error as { code?: string }).code ?? 'unknown reason';
