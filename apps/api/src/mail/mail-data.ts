import { dateSchema, idSchema, nameSchema } from '@stillstroke/contract/fields';
import type { MailKind } from '@stillstroke/contract/mail';
import * as z from 'zod';

/** A page of ours, such as `/reviews/…`: a path that cannot lead to another host. */
const pageSchema = z
  .string()
  .max(300)
  .regex(/^\/(?![/\\])[\w\-./?=&%#]*$/);

/** What the writer of each mail must know, besides whom it goes to. Bodies may name people; subjects never do. */
export const mailDataSchemas = {
  invitation: z.strictObject({ invitationId: idSchema }),
  'password-reset': z.strictObject({ resetId: idSchema }),
  /** `from`: name of the coach whose review it is. */
  'review-sent': z.strictObject({ page: pageSchema, from: nameSchema }),
  /** `from`: name of whoever asks. */
  question: z.strictObject({ page: pageSchema, from: nameSchema }),
  /** `from`: name of whoever answers. */
  answer: z.strictObject({ page: pageSchema, from: nameSchema }),
  /** `forWhom`: name of the athlete who waits. */
  'promise-reminder': z.strictObject({ page: pageSchema, promised: dateSchema, forWhom: nameSchema }),
} as const satisfies Record<MailKind, z.ZodType>;

export type MailData<K extends MailKind> = z.output<(typeof mailDataSchemas)[K]>;
