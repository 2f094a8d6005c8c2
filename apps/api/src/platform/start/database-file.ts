import { join } from 'node:path';
import { backupDatabase } from '@stillstroke/db/backup';
import { DatabaseTooNewError, migrateDatabase, migrationsPending } from '@stillstroke/db/migrate';
import { openDatabase, type OpenDatabase } from '@stillstroke/db/open';
import { StartProblem } from './start-problem';

export const databasePath = (dataFolder: string) => join(dataFolder, 'stillstroke.sqlite');

/**
 * Opens the database of a data folder and brings it to the newest schema, after a copy where there is something to lose.
 *
 * @throws StartProblem when it is damaged or was written by a newer version
 */
export function openDatabaseFile(dataFolder: string, migrationsFolder: string, now: Date): OpenDatabase {
  const path = databasePath(dataFolder);
  let opened: OpenDatabase | null = null;
  try {
    opened = openDatabase(path);
    if (migrationsPending(opened, migrationsFolder)) {
      const stamp = now.toISOString().replaceAll(/[:.]/g, '-');
      backupDatabase(opened, join(dataFolder, 'backups', `before-migration-${stamp}.sqlite`));
    }
    migrateDatabase(opened, migrationsFolder);
    return opened;
  } catch (error) {
    opened?.close();
    if (error instanceof DatabaseTooNewError) throw new StartProblem(error.message);
    const code = (error as { code?: string }).code ?? '';
    if (code.startsWith('SQLITE_NOTADB') || code.startsWith('SQLITE_CORRUPT')) {
      throw new StartProblem(
        `The database ${path} is damaged: put a copy from the folder backups in its place, or move it away to start anew.`,
      );
    }
    if (code.startsWith('SQLITE_CANTOPEN') || code.startsWith('SQLITE_READONLY')) {
      throw new StartProblem(
        `The database ${path} cannot be written: give this user the right to, or set STILLSTROKE_DATA to another folder.`,
      );
    }
    throw error;
  }
}
