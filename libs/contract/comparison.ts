import * as z from 'zod';
import { endpoint, type AnswerOf } from './endpoint';
import { frameSchema, idParams, idSchema } from './fields';
import { curvePointSchema, measureSchema, unitSchema } from './measures';
import { armSchema } from './strokes';

export const verdictSchema = z.enum(['left-larger', 'right-larger', 'not-distinguishable', 'too-few']);
export type Verdict = z.infer<typeof verdictSchema>;

/** One stroke's value of a measure, with the way back to its frame. */
export const sampleSchema = z.strictObject({
  clipId: idSchema,
  strokeId: idSchema,
  breath: z.boolean(),
  value: z.number(),
  uncertainty: z.number(),
  frame: frameSchema,
});
export type Sample = z.infer<typeof sampleSchema>;

/** Mean of the strokes of one arm with a 95 % interval (null with fewer than two strokes). */
export const armSummarySchema = z.strictObject({
  count: z.int(),
  mean: z.number().nullable(),
  interval: z.strictObject({ low: z.number(), high: z.number() }).nullable(),
  samples: z.array(sampleSchema),
});

export const measureComparisonSchema = z.strictObject({
  measure: measureSchema,
  unit: unitSchema,
  left: armSummarySchema,
  right: armSummarySchema,
  /** right − left, in the unit of the measure. */
  difference: z.number().nullable(),
  interval: z.strictObject({ low: z.number(), high: z.number() }).nullable(),
  verdict: verdictSchema,
  /** About how many more strokes a side would settle a difference of this size; null where it is settled or cannot be said. */
  moreStrokes: z.int().nullable(),
});
export type MeasureComparison = z.infer<typeof measureComparisonSchema>;

export const breathSplitSchema = z.enum(['all', 'breathing', 'not-breathing']);
export type BreathSplit = z.infer<typeof breathSplitSchema>;

export const getComparison = endpoint({
  method: 'get',
  path: '/api/sessions/:id/comparison',
  access: ['admin', 'coach', 'athlete'],
  summary: 'Left against right for every measure, all strokes and split by breath',
  params: idParams,
  answer: z.strictObject({
    sessionId: idSchema,
    splits: z.strictObject({
      all: z.array(measureComparisonSchema),
      breathing: z.array(measureComparisonSchema),
      notBreathing: z.array(measureComparisonSchema),
    }),
    /** Forearm over the pull of every stroke, and its events, for the stills and the curve. */
    strokes: z.array(
      z.strictObject({
        clipId: idSchema,
        strokeId: idSchema,
        arm: armSchema,
        breath: z.boolean(),
        catch: frameSchema,
        exit: frameSchema,
        forearmCurve: z.array(curvePointSchema),
      }),
    ),
    plumbAssumed: z.boolean(),
    verticalToleranceDeg: z.number(),
    leftOut: z.array(
      z.strictObject({ clipId: idSchema, reason: z.enum(['other-view', 'drill', 'no-strokes']) }),
    ),
  }),
});
export type Comparison = AnswerOf<typeof getComparison>;
