import type { SendMailOptions } from 'nodemailer';
import type { Dispatch } from './delivery';

/** The message in the words of the mail library. It may read no file and fetch no address. */
export function messageOf(mail: Dispatch): SendMailOptions {
  const { id: _id, switchOff, to, from, messageId, subject, text, html, writtenAt } = mail;
  return {
    from: { name: 'Stillstroke', address: from },
    to,
    envelope: { from, to: [to.address] },
    messageId,
    date: writtenAt,
    subject,
    text,
    html,
    headers: { 'Auto-Submitted': 'auto-generated' },
    ...(switchOff !== null && { list: { unsubscribe: { url: switchOff, comment: 'Switch off' } } }),
    disableFileAccess: true,
    disableUrlAccess: true,
  };
}
