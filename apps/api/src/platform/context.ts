import type { OpenDatabase } from '@stillstroke/db/open';
import type { Logger } from 'pino';
import type { Settings } from './settings';

/** What every service gets handed: no module of the server holds state of its own. */
export interface AppContext {
  readonly settings: Settings;
  readonly db: OpenDatabase['db'];
  readonly sqlite: OpenDatabase['sqlite'];
  readonly log: Logger;
  /** The clock; tests set it. */
  readonly now: () => Date;
}
