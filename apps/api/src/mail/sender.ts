import { users } from '@stillstroke/db/schema/club';
import { eq } from 'drizzle-orm';
import { grantPasswordWishes } from '../password-reset/password-reset.service';
import type { AppContext } from '../platform/context';
import type { Delivery, Dispatch, Outcome } from './delivery';
import { fileDelivery } from './file-delivery';
import { forgetOldMails } from './old-mails';
import { smtpDelivery } from './smtp-delivery';
import { settleMail, takeMail, type TakenMail } from './take-mail';
import { isAboutAccount, reasonToWithhold, switchesUrl, writeLetter } from './write-letter';

/** What became of one look into the queue. */
export type Step = 'nothing-due' | 'settled' | 'server-in-trouble';

export interface Pace {
  /** Between looks while nothing is due. */
  readonly idleMs: number;
  /** After a failure that the next mail would meet too. */
  readonly troubleMs: number;
}

const pace: Pace = { idleMs: 2000, troubleMs: 15_000 };

/** Through the mail server of the settings, or into files while there is none. */
export function deliveryOf({ settings }: Pick<AppContext, 'settings'>): Delivery {
  return settings.mail.server ? smtpDelivery(settings.mail.server) : fileDelivery(settings);
}

/** Takes one due mail and sends it. */
export async function sendNext(context: AppContext, delivery: Delivery): Promise<Step> {
  const taken = takeMail(context);
  if (!taken) return 'nothing-due';
  const reason = reasonToWithhold(context, taken.mail);
  if (reason !== null) {
    settleMail(context, taken, { how: 'withheld', reason });
    return 'settled';
  }
  const dispatch = writtenOrNull(context, taken);
  const outcome: Outcome = dispatch
    ? await delivery.send(dispatch)
    : { how: 'refused', reason: 'The mail could not be written; please report this.' };
  settleMail(context, taken, outcome);
  if (outcome.how === 'refused') {
    context.log.warn({ mail: taken.mail.id, kind: taken.mail.kind }, 'a mail was given up');
  }
  return outcome.how === 'later' && outcome.everything ? 'server-in-trouble' : 'settled';
}

/** A mail that cannot be written is given up; it must not come back every few minutes for ever. */
function writtenOrNull(context: AppContext, taken: TakenMail): Dispatch | null {
  try {
    return dispatchOf(context, taken);
  } catch (error) {
    const name = error instanceof Error ? error.name : 'unknown';
    context.log.error({ mail: taken.mail.id, kind: taken.mail.kind, name }, 'a mail cannot be written');
    return null;
  }
}

function dispatchOf(context: AppContext, { mail, messageId }: TakenMail): Dispatch {
  const { db, settings } = context;
  const reader = db.select({ name: users.name }).from(users).where(eq(users.id, mail.personId)).get();
  return {
    ...writeLetter(context, mail),
    id: mail.id,
    messageId,
    from: settings.mail.from,
    to: { name: reader?.name ?? '', address: mail.address },
    writtenAt: new Date(mail.createdAt),
    switchOff: isAboutAccount(mail.kind) ? null : switchesUrl(settings.publicUrl),
  };
}

/**
 * Sends what is queued until it is told to stop.
 *
 * @returns stops: takes no further mail and waits for the one being sent, but no longer than the bound given
 */
export function startSending(
  context: AppContext,
  delivery: Delivery = deliveryOf(context),
  { idleMs, troubleMs } = pace,
): (boundMs: number) => Promise<void> {
  let stopped = false;
  let wake: () => void = () => undefined;
  const rest = (ms: number) =>
    new Promise<void>((resolve) => {
      const timer = setTimeout(resolve, ms);
      wake = () => {
        clearTimeout(timer);
        resolve();
      };
    });
  const look = async (): Promise<Step> => {
    try {
      grantPasswordWishes(context);
      await forgetOldMails(context);
      return await sendNext(context, delivery);
    } catch (error) {
      // Once stopped, the database may be closed under a mail that took too long; its lease brings it back.
      if (!stopped) {
        context.log.error({ name: error instanceof Error ? error.name : 'unknown' }, 'sending a mail failed');
      }
      return 'server-in-trouble';
    }
  };
  const run = async (): Promise<void> => {
    while (!stopped) {
      const step = await look();
      if (stopped) break;
      if (step !== 'settled') await rest(step === 'nothing-due' ? idleMs : troubleMs);
    }
  };
  const running = run();
  return async (boundMs) => {
    stopped = true;
    wake();
    let timer: NodeJS.Timeout | undefined;
    const bound = new Promise<void>((resolve) => (timer = setTimeout(resolve, boundMs)));
    await Promise.race([running, bound]);
    clearTimeout(timer);
  };
}
