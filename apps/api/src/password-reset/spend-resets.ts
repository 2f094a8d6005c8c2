import type { Db } from '@stillstroke/db/open';
import { passwordResets } from '@stillstroke/db/schema/mail';
import { and, eq, isNull } from 'drizzle-orm';

/** Spends every open link that sets a new password for an account. */
export function spendResets(tx: Db, userId: string, now: Date): void {
  tx.update(passwordResets)
    .set({ usedAt: now.toISOString() })
    .where(and(eq(passwordResets.userId, userId), isNull(passwordResets.usedAt)))
    .run();
}
