import { accountMails, type MailKind } from '@stillstroke/contract/mail';
import type { Db } from '@stillstroke/db/open';
import { clubs, users } from '@stillstroke/db/schema/club';
import { mailsSwitchedOff, passwordResets, type mails } from '@stillstroke/db/schema/mail';
import { invitations } from '@stillstroke/db/schema/sign-in';
import { and, eq } from 'drizzle-orm';
import type { AppContext } from '../platform/context';
import { writeOut, type WrittenLetter } from './letter';
import { linkKey, linkToken } from './link-token';
import { mailDataSchemas, type MailData } from './mail-data';
import { subjects, templates, type Occasion } from './templates';

type Context = Pick<AppContext, 'db' | 'now' | 'settings'>;
export type MailRow = typeof mails.$inferSelect;

/** Where people switch mails on and off. */
const switchesPage = '/mail';

export const isAboutAccount = (kind: MailKind): boolean =>
  (accountMails as readonly MailKind[]).includes(kind);
export const switchesUrl = (publicUrl: string): string => new URL(switchesPage, publicUrl).href;

/** Why a mail must not go out now, in words for the admin; null when it may. */
export function reasonToWithhold({ db, now }: Context, mail: MailRow): string | null {
  const person = readerOf(db, mail.personId);
  if (!person || person.deactivatedAt !== null) return 'The account has been deactivated.';
  if (isAboutAccount(mail.kind)) {
    const found = accountRow(db, mail);
    const open = found && found.usedAt === null && found.expiresAt > now().toISOString();
    return open ? null : 'Its link has been used, replaced or has run out.';
  }
  const off = db
    .select({ since: mailsSwitchedOff.since })
    .from(mailsSwitchedOff)
    .where(and(eq(mailsSwitchedOff.personId, mail.personId), eq(mailsSwitchedOff.kind, mail.kind)))
    .get();
  return off ? 'The reader has switched mails of this kind off.' : null;
}

/** Writes a mail from what is known now. Links begin with the address in the settings. */
export function writeLetter(context: Context, mail: MailRow): WrittenLetter {
  return written(context, mail, mail.kind);
}

function written<K extends MailKind>({ db, settings }: Context, mail: MailRow, kind: K): WrittenLetter {
  const reader = readerOf(db, mail.personId);
  if (!reader) throw new Error('the reader of a mail is gone');
  const occasion: Occasion<K> = {
    // Checked when it was queued; checked again since an update may lie between.
    data: mailDataSchemas[kind].parse(mail.data) as MailData<K>,
    reader,
    pageUrl: (path) => new URL(path, settings.publicUrl).href,
    accountLink: accountLink(db, settings, mail),
  };
  return writeOut({
    subject: subjects[kind],
    reader: reader.name,
    ...templates[kind](occasion),
    switchOff: isAboutAccount(kind) ? null : switchesUrl(settings.publicUrl),
  });
}

function readerOf(db: Db, personId: string) {
  return db
    .select({ name: users.name, clubName: clubs.name, deactivatedAt: users.deactivatedAt })
    .from(users)
    .innerJoin(clubs, eq(clubs.id, users.clubId))
    .where(eq(users.id, personId))
    .get();
}

/** The invitation or the wish for a new password that a mail about an account carries the link of. */
function accountRow(db: Db, { kind, data }: Pick<MailRow, 'kind' | 'data'>) {
  if (kind === 'invitation') {
    const { invitationId } = mailDataSchemas.invitation.parse(data);
    return db.select().from(invitations).where(eq(invitations.id, invitationId)).get();
  }
  if (kind === 'password-reset') {
    const { resetId } = mailDataSchemas['password-reset'].parse(data);
    return db.select().from(passwordResets).where(eq(passwordResets.id, resetId)).get();
  }
  return undefined;
}

function accountLink(
  db: Db,
  settings: Context['settings'],
  mail: MailRow,
): Occasion<MailKind>['accountLink'] {
  const row = accountRow(db, mail);
  if (!row) return null;
  const [page, purpose] =
    mail.kind === 'invitation'
      ? (['invitation', 'invitation'] as const)
      : (['new-password', 'password reset'] as const);
  const token = linkToken(linkKey(settings), purpose, row.id);
  return { url: new URL(`/${page}/${token}`, settings.publicUrl).href, until: row.expiresAt };
}
