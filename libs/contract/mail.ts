import * as z from 'zod';
import { newPasswordSchema, tokenParams, userAnswer } from './auth';
import { endpoint } from './endpoint';
import { emailSchema, idParams, idSchema, instantSchema, pageOf, pageQuery } from './fields';

/** Mails about somebody's work, which their reader may switch off. */
export const switchableMails = ['review-sent', 'question', 'answer', 'promise-reminder'] as const;
/** Mails about the account, which always come. */
export const accountMails = ['invitation', 'password-reset'] as const;

export const switchableMailSchema = z.enum(switchableMails);
export type SwitchableMail = z.infer<typeof switchableMailSchema>;
export const mailKindSchema = z.enum([...accountMails, ...switchableMails]);
export type MailKind = z.infer<typeof mailKindSchema>;

const wishesSchema = z.strictObject({
  address: z.string().describe('Where the mails go'),
  kinds: z.array(z.strictObject({ kind: switchableMailSchema, on: z.boolean() })),
});

export const getMailWishes = endpoint({
  method: 'get',
  path: '/api/mail-wishes',
  access: 'signed-in',
  summary: 'Which mails the caller wants; those about the account are not listed, they always come',
  answer: wishesSchema,
});

export const setMailWish = endpoint({
  method: 'put',
  path: '/api/mail-wishes/:kind',
  access: 'signed-in',
  summary: 'Switch one kind of mail on or off for oneself',
  params: z.strictObject({ kind: switchableMailSchema }),
  body: z.strictObject({ on: z.boolean() }),
  answer: wishesSchema,
});

export const mailStatusSchema = z.enum(['waiting', 'sending', 'sent', 'given-up', 'withheld']);
export type MailStatus = z.infer<typeof mailStatusSchema>;

export const outboxMailSchema = z.strictObject({
  id: idSchema,
  kind: mailKindSchema,
  to: z.strictObject({ name: z.string(), address: z.string() }),
  status: mailStatusSchema,
  attempts: z.int(),
  nextAttemptAt: instantSchema.nullable().describe('Null unless it waits'),
  reason: z.string().nullable().describe('Why the last attempt failed, or why it was withheld'),
  createdAt: instantSchema,
  finishedAt: instantSchema.nullable(),
});
export type OutboxMail = z.infer<typeof outboxMailSchema>;

/** Where mails go: through a mail server, or as files into the data folder while none is set. */
export const deliverySchema = z.strictObject({
  by: z.enum(['server', 'file']),
  linksTo: z.string().describe('Address that the links in mails begin with'),
});

export const listOutbox = endpoint({
  method: 'get',
  path: '/api/outbox',
  access: ['admin'],
  summary: 'Mails to people of the club, newest first',
  query: z.strictObject({ ...pageQuery, status: mailStatusSchema.optional() }),
  answer: pageOf(outboxMailSchema).extend({ delivery: deliverySchema }),
});

export const getOutboxMail = endpoint({
  method: 'get',
  path: '/api/outbox/:id',
  access: ['admin'],
  summary: 'One mail; its text only where it was written to a file because no mail server is set',
  params: idParams,
  answer: outboxMailSchema.extend({
    written: z
      .strictObject({ subject: z.string(), text: z.string(), html: z.string(), file: z.string() })
      .nullable(),
  }),
});

export const retryMail = endpoint({
  method: 'post',
  path: '/api/outbox/:id/retry',
  access: ['admin'],
  summary: 'Try a mail again that was given up; 409 when it was not',
  params: idParams,
  answer: outboxMailSchema,
});

export const askForPassword = endpoint({
  method: 'post',
  path: '/api/auth/password-wish',
  access: 'public',
  summary:
    'A mail with a link that sets a new password; the answer is the same whether there is an account or not',
  status: 204,
  answerKind: 'none',
  body: z.strictObject({ email: emailSchema }),
});

export const getPasswordReset = endpoint({
  method: 'get',
  path: '/api/password-resets/:token',
  access: 'public',
  summary: 'Whose password a link sets; 404 when spent or expired',
  params: tokenParams,
  answer: z.strictObject({ name: z.string(), email: z.string() }),
});

export const resetPassword = endpoint({
  method: 'post',
  path: '/api/password-resets/:token',
  access: 'public',
  summary: 'Set the new password and sign in here; every other sign-in of the account ends',
  params: tokenParams,
  body: z.strictObject({ password: newPasswordSchema }),
  answer: userAnswer,
});
