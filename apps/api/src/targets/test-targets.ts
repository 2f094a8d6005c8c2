import { randomUUID } from 'node:crypto';
import { targets } from '@stillstroke/db/schema/targets';
import type { AppContext } from '../platform/context';

/** Enters a target for "vertical at", both arms, up to 0.35; gives its id. For tests. */
export function placeTarget({ db, now }: Pick<AppContext, 'db' | 'now'>, athleteId: string): string {
  const id = randomUUID();
  db.insert(targets)
    .values({
      id,
      athleteId,
      measure: 'verticalAt',
      arm: 'both',
      high: 0.35,
      words: 'fingers down early',
      setAt: now().toISOString(),
    })
    .run();
  return id;
}
