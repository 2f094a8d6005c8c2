import * as z from 'zod';
import { strokeKindSchema } from './clip-facts';
import { endpoint, type AnswerOf } from './endpoint';
import { uncertaintyPartSchema } from './explanation';
import { dateSchema, frameSchema, idParams, idSchema } from './fields';
import { measureSchema, unitSchema } from './measures';
import { armSchema } from './strokes';
import { cautionSummarySchema } from './view-cautions';

/** Views in which the arm's angles mean what their definitions say. */
export const sideViewSchema = z.enum(['side-underwater', 'side-above']);

/** `not-more-than-strokes-vary`: more than marking could produce, yet within what the strokes of a session differ among themselves. */
export const changeVerdictSchema = z.enum([
  'changed',
  'not-more-than-marking',
  'not-more-than-strokes-vary',
  'too-few',
]);
export type ChangeVerdict = z.infer<typeof changeVerdictSchema>;

/** What can be followed over the sessions: every measure of a stroke, and the index of coordination of both arms. */
export const trendMeasureSchema = z.enum([...measureSchema.options, 'coordination']);
export type TrendMeasure = z.infer<typeof trendMeasureSchema>;
/** `both`: a measure of both arms together has one line. */
export const trendArmSchema = z.enum([...armSchema.options, 'both']);

/** One arm in one session: the mean of its strokes, its standard uncertainty, and where to look. */
export const trendPointSchema = z.strictObject({
  sessionId: idSchema,
  date: dateSchema,
  arm: trendArmSchema,
  mean: z.number(),
  uncertainty: z.number(),
  count: z.int(),
  /** Between the strokes, divisor n − 1; null for one stroke. */
  sd: z.number().nullable(),
  /** The part of the uncertainty that marking and set-up alone would leave. */
  marking: z.number(),
  /** The part that all strokes of the session share (the camera's lean). */
  setUp: z.number(),
  frames: z.array(z.strictObject({ clipId: idSchema, frame: frameSchema })),
});
export type TrendPoint = z.infer<typeof trendPointSchema>;

export const armTrendSchema = z.strictObject({
  arm: trendArmSchema,
  points: z.array(trendPointSchema),
  /** Last minus first session. */
  change: z.number().nullable(),
  /** 95 % interval of the change; null below three strokes in either session. */
  interval: z.strictObject({ low: z.number(), high: z.number() }).nullable(),
  /** Welch's standard error and quantile behind the interval; null without one, or where all strokes are equal. */
  welch: z
    .strictObject({
      standardError: z.number(),
      degreesOfFreedom: z.number(),
      quantile: z.number(),
      /** What the standard error is made of, largest first. */
      parts: z.array(uncertaintyPartSchema),
    })
    .nullable(),
  /** Smallest change that marking could not produce (95 %). */
  detectable: z.number().nullable(),
  verdict: changeVerdictSchema,
  /** Per 30 days, only from four sessions on. */
  slope: z
    .strictObject({
      value: z.number(),
      low: z.number(),
      high: z.number(),
      robust: z.number(),
      /** Standard error from the scatter about the line, and what the sessions' own uncertainties would leave. */
      scatter: z.number(),
      known: z.number().nullable(),
    })
    .nullable(),
});

export const getTrend = endpoint({
  method: 'get',
  path: '/api/athletes/:id/trend',
  access: ['admin', 'coach', 'athlete'],
  summary: 'One measure over the sessions, each arm',
  params: idParams,
  /** Without `view` the one under water where there is one. Only one view and stroke kind at a time: they are never mixed. */
  query: z.strictObject({
    measure: trendMeasureSchema.default('verticalAt'),
    view: sideViewSchema.optional(),
    stroke: strokeKindSchema.default('full'),
  }),
  answer: z.strictObject({
    athleteId: idSchema,
    measure: trendMeasureSchema,
    unit: unitSchema,
    /** Measures of which some session of the athlete has figures. */
    measured: z.array(trendMeasureSchema),
    view: sideViewSchema,
    stroke: strokeKindSchema,
    /** Every view and stroke kind with this measure, with the number of its sessions: what can be chosen. */
    series: z.array(z.strictObject({ view: sideViewSchema, stroke: strokeKindSchema, sessions: z.int() })),
    arms: z.array(armTrendSchema),
    cautions: z.array(cautionSummarySchema).describe('What of the view the strokes have to be read with'),
    leftOut: z.array(
      z.strictObject({
        sessionId: idSchema,
        date: dateSchema,
        reason: z.enum(['other-view', 'drill', 'full-stroke', 'not-measured']),
      }),
    ),
  }),
});
export type Trend = AnswerOf<typeof getTrend>;
