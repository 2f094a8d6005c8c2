import { rmSync, writeFileSync } from 'node:fs';
import { clubs } from '@stillstroke/db/schema/club';
import { count } from 'drizzle-orm';
import type { AppContext } from '../context';
import { unfinishedMark } from './database-file';

/** Puts a demo into an empty database. */
export type Filling = (context: AppContext) => Promise<void>;

export const isEmpty = ({ db }: Pick<AppContext, 'db'>): boolean =>
  (db.select({ n: count() }).from(clubs).get()?.n ?? 0) === 0;

/** Fills an empty database while the demo is on. When the process ends in the middle, the next start begins again. */
export async function fillWhenEmpty(context: AppContext, fill: Filling): Promise<void> {
  if (!context.settings.demo || !isEmpty(context)) return;
  const mark = unfinishedMark(context.settings.dataFolder);
  writeFileSync(mark, '');
  await fill(context);
  rmSync(mark);
}
