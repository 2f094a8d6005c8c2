import type { SignedInUser } from '@stillstroke/contract/auth';
import type { AnswerOf } from '@stillstroke/contract/endpoint';
import { switchableMails, type getMailWishes, type SwitchableMail } from '@stillstroke/contract/mail';
import { mailsSwitchedOff } from '@stillstroke/db/schema/mail';
import { and, eq } from 'drizzle-orm';
import type { AppContext } from '../platform/context';

type Context = Pick<AppContext, 'db' | 'now'>;
type Wishes = AnswerOf<typeof getMailWishes>;

/** Which mails a person gets; what was never switched is on. */
export function mailWishes({ db }: Pick<Context, 'db'>, { id, email }: SignedInUser): Wishes {
  const off = new Set(
    db
      .select({ kind: mailsSwitchedOff.kind })
      .from(mailsSwitchedOff)
      .where(eq(mailsSwitchedOff.personId, id))
      .all()
      .map(({ kind }) => kind),
  );
  return { address: email, kinds: switchableMails.map((kind) => ({ kind, on: !off.has(kind) })) };
}

/** Switches one kind. It says what shall be, so two tabs cannot undo each other unseen and no version is needed. */
export function setMailWish(context: Context, user: SignedInUser, kind: SwitchableMail, on: boolean): Wishes {
  const { db, now } = context;
  if (on) {
    db.delete(mailsSwitchedOff)
      .where(and(eq(mailsSwitchedOff.personId, user.id), eq(mailsSwitchedOff.kind, kind)))
      .run();
  } else {
    db.insert(mailsSwitchedOff)
      .values({ personId: user.id, kind, since: now().toISOString() })
      .onConflictDoNothing()
      .run();
  }
  return mailWishes(context, user);
}
