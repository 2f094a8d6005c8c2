import { createHmac } from 'node:crypto';
import { keyFor, serverSecret } from '../platform/server-secret';
import type { Settings } from '../platform/settings';

/** The key from which links in mails are made; it lies beside the database, not in it. */
export const linkKey = ({ dataFolder }: Pick<Settings, 'dataFolder'>): string =>
  keyFor(serverSecret(dataFolder), 'links in mails');

/**
 * The secret part of a link, made from the id of what it opens. It can be made again when the mail is written, so
 * neither it nor the mail's text has to be kept: a copied database opens no account.
 */
export function linkToken(key: string, purpose: 'invitation' | 'password reset', id: string): string {
  return createHmac('sha256', key).update(`${purpose} ${id}`).digest('base64url');
}
