import { openDatabase } from '@stillstroke/db/open';
import { pino } from 'pino';
import { readSettings } from '../platform/settings';
import { startSending } from './sender';

/** A sender in a process of its own, for tests that kill it: the database file is its one argument. */
const opened = openDatabase(process.argv[2] ?? '');
const settings = readSettings(process.env);
startSending(
  { settings, db: opened.db, sqlite: opened.sqlite, log: pino({ level: 'silent' }), now: () => new Date() },
  undefined,
  { idleMs: 20, troubleMs: 50 },
);
