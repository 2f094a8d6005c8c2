import { clubs } from '@stillstroke/db/schema/club';
import { pino } from 'pino';
import { createApp } from '../../app';
import { demoAccounts } from '../../auth/demo-accounts';
import { startPurging } from '../../media/purge';
import { seedDemo } from '../../demo/seed';
import { startSending } from '../../mail/sender';
import { refreshOutdatedFigures } from '../../measures/figures';
import { sweepFilms } from '../../media/sweep';
import { sweepStills } from '../../stills/sweep-stills';
import type { AppContext } from '../context';
import { readSettings, type Settings } from '../settings';
import { takeDataFolder } from './data-folder';
import { openDatabaseFile } from './database-file';
import { checkPort, listen, stopListening } from './listen';
import { makeClub, newClubUsage } from './new-club';

export interface StartOptions {
  readonly environment: Record<string, string | undefined>;
  readonly migrationsFolder: string;
  readonly webFolder: string;
  readonly print: (line: string) => void;
}

/** How long open requests may take to finish when the server is told to stop. */
const stopBoundMs = 8000;

export interface Started {
  /** Where it is and who can sign in, to be printed once a signal would be answered: whoever reads it may send one at once. */
  readonly greeting: readonly string[];
  /** Finishes what is running, then closes everything. */
  readonly stop: () => Promise<void>;
}

/**
 * Starts the server: settings, port, data folder, database, demo, listening.
 *
 * @throws StartProblem or BadSettingError with a sentence for whoever started it
 */
export async function start(options: StartOptions): Promise<Started> {
  const settings = readSettings(options.environment);
  await checkPort(settings);
  const { context, close } = openContext(settings, options.migrationsFolder);
  try {
    await sweepFilms(context);
    await sweepStills(context);
    refreshOutdatedFigures(context);
    if (settings.demo) await seedDemo(context);
    const app = createApp(context, { webFolder: options.webFolder });
    const { server, url } = await listen(app, settings);
    const stopPurging = startPurging(context);
    const stopSending = startSending(context);
    const stop = async () => {
      stopPurging();
      await Promise.all([stopListening(server, stopBoundMs), stopSending(stopBoundMs)]);
      close();
    };
    return { greeting: greeting(context, url), stop };
  } catch (error) {
    close();
    throw error;
  }
}

/** Makes a club with its first admin on a data folder that no server is using, and prints the admin's link. */
export function startNewClub(options: StartOptions, words: readonly string[]): void {
  const { context, close } = openContext(readSettings(options.environment), options.migrationsFolder);
  try {
    const link = makeClub(context, words);
    options.print('The club is there. With this link its admin sets the password, once, within seven days:');
    options.print(`  ${link}`);
  } finally {
    close();
  }
}

function openContext(
  settings: Settings,
  migrationsFolder: string,
): { context: AppContext; close: () => void } {
  const now = () => new Date();
  const letGo = takeDataFolder(settings.dataFolder);
  try {
    const opened = openDatabaseFile(settings.dataFolder, migrationsFolder, now());
    const log = pino({ level: settings.logLevel });
    return {
      context: { settings, db: opened.db, sqlite: opened.sqlite, log, now },
      close: () => {
        opened.close();
        letGo();
      },
    };
  } catch (error) {
    letGo();
    throw error;
  }
}

function greeting(context: AppContext, url: string): string[] {
  const lines = [`Stillstroke is at ${url}`];
  const demo = context.settings.demo ? demoAccounts(context.db) : null;
  if (demo) {
    lines.push(`Demo accounts, password ${demo.password}:`);
    const width = Math.max(...demo.accounts.map((account) => account.email.length));
    for (const { email, role, clubName } of demo.accounts) {
      lines.push(`  ${email.padEnd(width)}  ${role}, ${clubName}`);
    }
  }
  const hasClub = context.db.select({ id: clubs.id }).from(clubs).limit(1).get() !== undefined;
  if (!hasClub) lines.push(`There is no club yet. Stop the server and make one: ${newClubUsage}`);
  lines.push('Ctrl+C stops it.');
  return lines;
}
