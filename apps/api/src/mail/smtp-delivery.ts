import { createTransport } from 'nodemailer';
import type { SmtpServer } from '../platform/smtp-server';
import type { Delivery, Outcome } from './delivery';
import { messageOf } from './message';

export interface Patience {
  /** How long the server may take to connect, to greet, and to answer each line. */
  readonly answerMs: number;
  /** How long one mail may take in all; the lease on it must be longer. */
  readonly mailMs: number;
}

const patience: Patience = { answerMs: 20_000, mailMs: 120_000 };

/** Hands mails to a mail server, each over a connection of its own: they are few, and none waits for another. */
export function smtpDelivery(server: SmtpServer, { answerMs, mailMs } = patience): Delivery {
  const { host, port, secure, auth, here } = server;
  const transport = createTransport({
    host,
    port,
    secure,
    ...(auth && { auth: { user: auth.user, pass: auth.pass } }),
    // A password crosses a network only under TLS, whatever somebody in between makes the server offer.
    requireTLS: auth !== null && !here,
    tls: { rejectUnauthorized: !here, minVersion: 'TLSv1.2' },
    connectionTimeout: answerMs,
    greetingTimeout: answerMs,
    socketTimeout: answerMs,
    dnsTimeout: answerMs,
    logger: false,
  });
  return {
    send: async (mail) => {
      const late = new AbortController();
      const timer = setTimeout(() => late.abort(), mailMs);
      try {
        await transport.sendMail({ ...messageOf(mail), signal: late.signal });
        return { how: 'sent' };
      } catch (error) {
        return outcomeOf(error, server);
      } finally {
        clearTimeout(timer);
      }
    },
  };
}

/** What the mail library puts on its errors. */
interface Failure {
  readonly code?: string;
  /** The SMTP command that failed; `API` before anything was sent. */
  readonly command?: string;
  readonly responseCode?: number;
  readonly response?: string;
}

function outcomeOf(error: unknown, server: SmtpServer): Outcome {
  const { code, command, responseCode = 0, response = '' } = error as Failure;
  const ofThisMail = command === 'RCPT TO' || command === 'DATA' || command === 'API';
  if (code === 'EAUTH') return notNow('The mail server did not accept the name and password in SMTP_URL.');
  if (ofThisMail && responseCode >= 500) {
    const what = command === 'RCPT TO' ? 'the address' : 'the mail';
    return { how: 'refused', reason: `The mail server refused ${what}: ${said(response, server)}` };
  }
  if (command === 'API' && code === 'EENVELOPE') {
    return { how: 'refused', reason: 'The address cannot be written on an envelope.' };
  }
  if (ofThisMail && responseCode >= 400) {
    const reason = `The mail server asked to try later: ${said(response, server)}`;
    return { how: 'later', reason, everything: false };
  }
  if (command === 'MAIL FROM' && responseCode >= 500) {
    return notNow('The mail server does not let us send from the address in STILLSTROKE_MAIL_FROM.');
  }
  switch (code) {
    case 'ETIMEDOUT':
    case 'EABORT':
      return notNow('The mail server did not answer in time.');
    case 'ECONNECTION':
    case 'ESOCKET':
    case 'EDNS':
      return notNow('The mail server cannot be reached, or it broke off.');
    case 'ETLS':
      return notNow('No safe connection to the mail server could be made.');
    default:
      return notNow('The mail server and we did not understand each other.');
  }
}

const notNow = (reason: string): Outcome => ({ how: 'later', reason, everything: true });

/** The server's own words, short, on one line, without the name and password in case it repeats them. */
function said(response: string, { auth }: SmtpServer): string {
  const line = response.replace(/\s+/g, ' ').trim();
  const secrets = auth ? [auth.pass, auth.user] : [];
  const clean = secrets.reduce((text, secret) => text.replaceAll(secret, '…'), line);
  return clean.length > 160 ? `${clean.slice(0, 159)}…` : clean;
}
