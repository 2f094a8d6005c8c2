import * as z from 'zod';
import { endpoint, type AnswerOf } from './endpoint';
import { dateSchema, idParams, idSchema, instantSchema, pageQuery } from './fields';
import { readingSourceSchema, reviewReadingSchema } from './review-readings';
import { stillSchema } from './stills';

export const findingKindSchema = z.enum(['good', 'to-work-on']);
export type FindingKind = z.infer<typeof findingKindSchema>;
export const findingArmSchema = z.enum(['left', 'right', 'both', 'none']);
export type FindingArm = z.infer<typeof findingArmSchema>;
export const findingPhaseSchema = z.enum(['entry-and-catch', 'pull', 'push', 'recovery', 'whole']);
export type FindingPhase = z.infer<typeof findingPhaseSchema>;

const readers = ['admin', 'coach', 'athlete'] as const;
const writers = ['admin', 'coach'] as const;
const versionQuery = z.strictObject({ version: z.coerce.number().int().min(1) });

/** What somebody asks or answers: text, never markup. */
const saidSchema = z
  .string()
  .trim()
  .min(1, 'Write something first.')
  .max(2000, 'Keep it under 2000 characters.');

export const answerSchema = z.strictObject({
  id: idSchema,
  words: z.string(),
  authorName: z.string(),
  createdAt: instantSchema,
  /** When the athlete opened it; null while unread. */
  readAt: instantSchema.nullable(),
});
export const questionSchema = z.strictObject({
  id: idSchema,
  words: z.string(),
  authorName: z.string(),
  createdAt: instantSchema,
  answers: z.array(answerSchema),
});
export type Question = z.infer<typeof questionSchema>;

export const findingSchema = z.strictObject({
  id: idSchema,
  reviewId: idSchema,
  kind: findingKindSchema,
  words: z.string(),
  arm: findingArmSchema,
  phase: findingPhaseSchema,
  /** What was seen beside angles, from the club's own list; the name is as it was when the review was sent. */
  observation: z.strictObject({ id: idSchema.nullable(), name: z.string() }).nullable(),
  mainFocus: z.boolean(),
  readings: z.array(reviewReadingSchema),
  stills: z.array(stillSchema),
  questions: z.array(questionSchema),
  version: z.int(),
  /** Who changed it last, and when. */
  updatedBy: z.string().nullable(),
  updatedAt: instantSchema,
});
export type Finding = z.infer<typeof findingSchema>;

export const reviewStateSchema = z.enum(['draft', 'sent']);

const reviewHead = {
  id: idSchema,
  athleteId: idSchema,
  athleteName: z.string(),
  sessionId: idSchema.nullable(),
  /** Of the session, as long as there is one. */
  sessionDate: dateSchema.nullable(),
  authorName: z.string().nullable(),
  state: reviewStateSchema,
  createdAt: instantSchema,
  updatedAt: instantSchema,
  sentAt: instantSchema.nullable(),
  /** When the athlete first opened it. */
  readAt: instantSchema.nullable(),
  /** Counts changes of the review itself: which findings, their order, the main focus, sending. */
  version: z.int(),
};

export const reviewSchema = z.strictObject({ ...reviewHead, findings: z.array(findingSchema) });
export type Review = z.infer<typeof reviewSchema>;

export const reviewSummarySchema = z.strictObject({
  ...reviewHead,
  findingCount: z.int(),
  /** Words of the main focus; null while none is chosen. */
  mainFocus: z.string().nullable(),
  /** Questions that nobody has answered. */
  openQuestions: z.int(),
  /** For the athlete: not opened yet, or with an answer that was not. */
  unread: z.boolean(),
});
export type ReviewSummary = z.infer<typeof reviewSummarySchema>;

export const listReviews = endpoint({
  method: 'get',
  path: '/api/athletes/:id/reviews',
  access: readers,
  summary: 'Reviews of an athlete, newest first; the athlete gets those that were sent',
  params: idParams,
  query: z.strictObject({ sessionId: idSchema.optional(), ...pageQuery }),
  answer: z.strictObject({
    items: z.array(reviewSummarySchema),
    nextCursor: z.string().nullable(),
    total: z.int(),
    /** Over all reviews of the athlete. */
    unread: z.int(),
  }),
});

export const createReview = endpoint({
  method: 'post',
  path: '/api/athletes/:id/reviews',
  access: writers,
  summary: 'Begin a review of a session',
  status: 201,
  params: idParams,
  body: z.strictObject({ sessionId: idSchema, id: idSchema.optional() }),
  answer: reviewSchema,
});

export const getReview = endpoint({
  method: 'get',
  path: '/api/reviews/:id',
  access: readers,
  summary: 'One review with everything in it; drafts only for those who write them',
  params: idParams,
  answer: reviewSchema,
});

export const updateReview = endpoint({
  method: 'patch',
  path: '/api/reviews/:id',
  access: writers,
  summary: 'Put the findings of a draft in another order, or choose the main focus',
  params: idParams,
  body: z
    .strictObject({
      version: z.int(),
      /** All findings, in the order in which they are told. */
      order: z.array(idSchema).max(40).optional(),
      mainFocus: idSchema.nullable().optional(),
    })
    .refine(
      ({ order, mainFocus }) => order !== undefined || mainFocus !== undefined,
      'Say at least one thing to change.',
    ),
  answer: reviewSchema,
});

export const deleteReview = endpoint({
  method: 'delete',
  path: '/api/reviews/:id',
  access: writers,
  summary: 'Throw a draft away; what was sent stays',
  status: 204,
  params: idParams,
  query: versionQuery,
  answerKind: 'none',
});

export const sendReview = endpoint({
  method: 'post',
  path: '/api/reviews/:id/send',
  access: writers,
  summary: 'Send a review: from then on it stays as it is',
  params: idParams,
  /** The versions that were looked at, so that nothing is sent that the sender has not seen. */
  body: z.strictObject({
    version: z.int(),
    findings: z.array(z.strictObject({ id: idSchema, version: z.int() })).max(40),
  }),
  answer: reviewSchema,
});

export const readReview = endpoint({
  method: 'post',
  path: '/api/reviews/:id/read',
  access: ['athlete'],
  summary: 'The athlete has opened the review and the answers in it',
  params: idParams,
  answer: reviewSchema,
});

const findingFields = {
  kind: findingKindSchema.optional(),
  words: z.string().max(4000, 'Keep a finding under 4000 characters.').optional(),
  arm: findingArmSchema.optional(),
  phase: findingPhaseSchema.optional(),
  observationId: idSchema.nullable().optional(),
  readings: z
    .array(readingSourceSchema)
    .max(12, 'Twelve readings are more than a finding needs; take some away.')
    .optional(),
};

export const addFinding = endpoint({
  method: 'post',
  path: '/api/reviews/:id/findings',
  access: writers,
  summary: 'Add a finding at the end of a draft',
  status: 201,
  params: idParams,
  /** `id` may be chosen by the client, so that a finding sent twice over a bad line is one finding. */
  body: z.strictObject({ ...findingFields, id: idSchema.optional() }),
  answer: findingSchema,
});

export const updateFinding = endpoint({
  method: 'patch',
  path: '/api/findings/:id',
  access: writers,
  summary: 'Change a finding of a draft; refused as changed-meanwhile when `version` is not the newest',
  params: idParams,
  body: z
    .strictObject({ ...findingFields, version: z.int() })
    .refine(
      (body) => Object.keys(body).some((key) => key !== 'version'),
      'Say at least one thing to change.',
    ),
  answer: findingSchema,
});

export const deleteFinding = endpoint({
  method: 'delete',
  path: '/api/findings/:id',
  access: writers,
  summary: 'Take a finding and its stills out of a draft',
  status: 204,
  params: idParams,
  query: versionQuery,
  answerKind: 'none',
});

export const askQuestion = endpoint({
  method: 'post',
  path: '/api/findings/:id/questions',
  access: ['athlete'],
  summary: 'Ask about a finding of a review that was sent',
  status: 201,
  params: idParams,
  body: z.strictObject({ words: saidSchema, id: idSchema.optional() }),
  answer: questionSchema,
});

export const answerQuestion = endpoint({
  method: 'post',
  path: '/api/questions/:id/answers',
  access: writers,
  summary: 'Answer a question',
  status: 201,
  params: idParams,
  body: z.strictObject({ words: saidSchema, id: idSchema.optional() }),
  answer: questionSchema,
});

export type ReviewList = AnswerOf<typeof listReviews>;
