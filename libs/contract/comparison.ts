import * as z from 'zod';
import { viewSchema } from './clip-facts';
import { coordinationSchema } from './coordination';
import { endpoint, type AnswerOf } from './endpoint';
import { uncertaintyPartSchema } from './explanation';
import { frameSchema, idParams, idSchema } from './fields';
import { curvePointSchema, measureSchema, unitSchema } from './measures';
import { armSchema } from './strokes';
import { cautionSummarySchema } from './view-cautions';

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

const intervalSchema = z.strictObject({ low: z.number(), high: z.number() });

const groupFields = {
  count: z.int(),
  mean: z.number().nullable(),
  interval: intervalSchema.nullable(),
  /** Between the strokes, divisor n − 1; null with fewer than two strokes. */
  sd: z.number().nullable(),
  /** Standard uncertainty of the mean from marking and what all strokes share, without the strokes' own spread. */
  marking: z.number().nullable(),
};

/** Mean of the strokes of one arm with a 95 % interval (null with fewer than two strokes). */
export const armSummarySchema = z.strictObject({ ...groupFields, samples: z.array(sampleSchema) });

/** What stands behind a difference and its verdict; null below three strokes a side. */
export const differenceTestSchema = z.strictObject({
  /** Welch's standard error, t, degrees of freedom and the t quantile of the interval; null where all strokes are equal. */
  welch: z
    .strictObject({
      standardError: z.number(),
      t: z.number(),
      degreesOfFreedom: z.number(),
      quantile: z.number(),
      /** What the standard error is made of, largest first. */
      parts: z.array(uncertaintyPartSchema),
    })
    .nullable(),
  /** Standard uncertainty of the difference from marking alone: the interval is never narrower than 1.96 times this. */
  marking: z.number(),
  /** Two-sided, of this measure looked at alone, and after Holm's correction for all measures looked at together. */
  p: z.number(),
  pTogether: z.number(),
  /** How many measures were judged together. */
  measuresTogether: z.int(),
});
export type DifferenceTest = z.infer<typeof differenceTestSchema>;

export const measureComparisonSchema = z.strictObject({
  measure: measureSchema,
  unit: unitSchema,
  left: armSummarySchema,
  right: armSummarySchema,
  /** right − left, in the unit of the measure. */
  difference: z.number().nullable(),
  interval: intervalSchema.nullable(),
  verdict: verdictSchema,
  /** About how many more strokes a side would settle a difference of this size; null where it is settled or cannot be said. */
  moreStrokes: z.int().nullable(),
  test: differenceTestSchema.nullable(),
});
export type MeasureComparison = z.infer<typeof measureComparisonSchema>;

export const breathVerdictSchema = z.enum([
  'breathing-larger',
  'others-larger',
  'not-distinguishable',
  'too-few',
]);

/** Breathing strokes against the others of the same arm, or of both arms with each arm compared with itself. */
export const breathComparisonSchema = z.strictObject({
  measure: measureSchema,
  unit: unitSchema,
  breathing: z.strictObject(groupFields),
  others: z.strictObject(groupFields),
  /** breathing − others, in the unit of the measure; of both arms: the mean of the arms' own differences. */
  difference: z.number().nullable(),
  interval: intervalSchema.nullable(),
  verdict: breathVerdictSchema,
  moreStrokes: z.int().nullable(),
  test: differenceTestSchema.nullable(),
});
export type BreathComparison = z.infer<typeof breathComparisonSchema>;

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
    /** What both arms do together: no difference of arms, so it stands beside the measures. */
    coordination: z.strictObject({
      all: coordinationSchema,
      breathing: coordinationSchema,
      notBreathing: coordinationSchema,
    }),
    /** Breathing strokes against the others, on the same footing as left against right. */
    breath: z.strictObject({
      left: z.array(breathComparisonSchema),
      right: z.array(breathComparisonSchema),
      together: z.array(breathComparisonSchema),
    }),
    view: viewSchema.nullable(),
    /** Forearm and elbow drop over the pull of every stroke, and its events, for the stills and the curve. */
    strokes: z.array(
      z.strictObject({
        clipId: idSchema,
        strokeId: idSchema,
        arm: armSchema,
        breath: z.boolean(),
        catch: frameSchema,
        exit: frameSchema,
        forearmCurve: z.array(curvePointSchema),
        dropCurve: z.array(curvePointSchema),
      }),
    ),
    plumbAssumed: z.boolean(),
    cautions: z.array(cautionSummarySchema).describe('What of the view the strokes have to be read with'),
    verticalToleranceDeg: z.number(),
    leftOut: z.array(
      z.strictObject({ clipId: idSchema, reason: z.enum(['other-view', 'drill', 'no-strokes']) }),
    ),
  }),
});
export type Comparison = AnswerOf<typeof getComparison>;
