import * as z from 'zod';
import { endpoint, type AnswerOf } from './endpoint';
import { dateSchema, frameSchema, idParams, idSchema } from './fields';
import { measureSchema, unitSchema } from './measures';
import { armSchema } from './strokes';

/** `not-more-than-strokes-vary`: more than marking could produce, yet within what the strokes of a session differ among themselves. */
export const changeVerdictSchema = z.enum([
  'changed',
  'not-more-than-marking',
  'not-more-than-strokes-vary',
  'too-few',
]);
export type ChangeVerdict = z.infer<typeof changeVerdictSchema>;

/** One arm in one session: the mean of its strokes, its standard uncertainty, and where to look. */
export const trendPointSchema = z.strictObject({
  sessionId: idSchema,
  date: dateSchema,
  arm: armSchema,
  mean: z.number(),
  uncertainty: z.number(),
  count: z.int(),
  frames: z.array(z.strictObject({ clipId: idSchema, frame: frameSchema })),
});
export type TrendPoint = z.infer<typeof trendPointSchema>;

export const armTrendSchema = z.strictObject({
  arm: armSchema,
  points: z.array(trendPointSchema),
  /** Last minus first session. */
  change: z.number().nullable(),
  /** Smallest change that marking could not produce (95 %). */
  detectable: z.number().nullable(),
  verdict: changeVerdictSchema,
  /** Per 30 days, only from four sessions on. */
  slope: z
    .strictObject({ value: z.number(), low: z.number(), high: z.number(), robust: z.number() })
    .nullable(),
});

export const getTrend = endpoint({
  method: 'get',
  path: '/api/athletes/:id/trend',
  access: ['admin', 'coach', 'athlete'],
  summary: 'One measure over the sessions, each arm',
  params: idParams,
  query: z.strictObject({ measure: measureSchema.default('verticalAt') }),
  answer: z.strictObject({
    athleteId: idSchema,
    measure: measureSchema,
    unit: unitSchema,
    view: z.string(),
    arms: z.array(armTrendSchema),
    leftOut: z.array(
      z.strictObject({
        sessionId: idSchema,
        date: dateSchema,
        reason: z.enum(['other-view', 'drill', 'not-measured']),
      }),
    ),
  }),
});
export type Trend = AnswerOf<typeof getTrend>;
