import { resolve } from 'node:path';
import * as z from 'zod';
import { smtpServerSchema, type SmtpServer } from './smtp-server';

const megabyte = 1024 * 1024;

const wholeNumber = (least: number, most: number) => {
  const error = `give a whole number from ${least} to ${most}`;
  return z.coerce.number({ error }).int({ error }).min(least, { error }).max(most, { error });
};
const decimal = (least: number, most: number) => {
  const error = `give a number from ${least} to ${most}`;
  return z.coerce.number({ error }).min(least, { error }).max(most, { error });
};
const oneOf = <T extends readonly [string, ...string[]]>(...words: T) =>
  z.enum(words, { error: `give ${words.join(' or ')}` });

const publicUrlWords = 'give an address without a path, such as https://strokes.example';
/** Scheme, host and port, nothing more. */
const isOrigin = (text: string) => URL.canParse(text) && new URL(text).href === `${new URL(text).origin}/`;

/** Environment variables and their defaults; everything the operator can set is here and in the README. */
const environmentSchema = z.object({
  PORT: wholeNumber(0, 65_535).default(4300),
  STILLSTROKE_HOST: z.string().default('127.0.0.1'),
  STILLSTROKE_DATA: z.string().default('./data'),
  STILLSTROKE_DEMO: oneOf('on', 'off').default('on'),
  STILLSTROKE_PUBLIC_URL: z
    .url({ protocol: /^https?$/, error: publicUrlWords })
    .refine((text) => isOrigin(text), { error: publicUrlWords })
    .optional(),
  SMTP_URL: smtpServerSchema.optional(),
  STILLSTROKE_MAIL_FROM: z.email({ error: 'give an address such as strokes@club.example' }).optional(),
  /** Set when a reverse proxy in front ends TLS: cookies become Secure and its address header is trusted. */
  STILLSTROKE_BEHIND_TLS: oneOf('on', 'off').default('off'),
  STILLSTROKE_MAX_CLIP_MB: wholeNumber(1, 20_480).default(2048),
  STILLSTROKE_MAX_CLIP_MINUTES: decimal(0.1, 240).default(20),
  STILLSTROKE_MAX_PICTURE_SIDE: wholeNumber(16, 8192).default(4096),
  STILLSTROKE_UNDO_MINUTES: decimal(1, 43_200).default(60),
  STILLSTROKE_LOG: oneOf('silent', 'error', 'warn', 'info', 'debug').default('warn'),
});

export interface Settings {
  readonly port: number;
  readonly host: string;
  /** Absolute path of the data folder. */
  readonly dataFolder: string;
  readonly demo: boolean;
  /** Address under which people reach the product, for links; never taken from a request, whose sender may lie. */
  readonly publicUrl: string;
  readonly mail: {
    /** Null: mails are written as files into the data folder's outbox. */
    readonly server: SmtpServer | null;
    /** Address that mails come from. */
    readonly from: string;
  };
  readonly behindTls: boolean;
  readonly limits: { readonly clipBytes: number; readonly clipMinutes: number; readonly pictureSide: number };
  readonly undoMinutes: number;
  readonly logLevel: string;
}

/** A setting that cannot be used; the message names it and says what it may be. */
export class BadSettingError extends Error {}

/** Reads the settings once at start. Unknown variables are none of our business; a bad one stops the start. */
export function readSettings(environment: Record<string, string | undefined>): Settings {
  const parsed = environmentSchema.safeParse(
    // Set but empty is as good as unset.
    Object.fromEntries(Object.entries(environment).filter(([, value]) => value !== '')),
  );
  if (!parsed.success) {
    const issue = parsed.error.issues[0];
    throw new BadSettingError(
      `Setting ${issue?.path.join('.') ?? '?'} cannot be used: ${issue?.message ?? 'bad value'}.`,
    );
  }
  const env = parsed.data;
  const publicUrl = new URL(env.STILLSTROKE_PUBLIC_URL ?? `http://localhost:${env.PORT}`);
  return {
    port: env.PORT,
    host: env.STILLSTROKE_HOST,
    dataFolder: resolve(env.STILLSTROKE_DATA),
    demo: env.STILLSTROKE_DEMO === 'on',
    publicUrl: publicUrl.origin,
    mail: {
      server: env.SMTP_URL ?? null,
      from: env.STILLSTROKE_MAIL_FROM ?? `stillstroke@${publicUrl.hostname}`,
    },
    behindTls: env.STILLSTROKE_BEHIND_TLS === 'on',
    limits: {
      clipBytes: env.STILLSTROKE_MAX_CLIP_MB * megabyte,
      clipMinutes: env.STILLSTROKE_MAX_CLIP_MINUTES,
      pictureSide: env.STILLSTROKE_MAX_PICTURE_SIDE,
    },
    undoMinutes: env.STILLSTROKE_UNDO_MINUTES,
    logLevel: env.STILLSTROKE_LOG,
  };
}
