import * as z from 'zod';
import { breathSplitSchema } from './comparison';
import { dateSchema, frameSchema, idSchema } from './fields';
import { measureSchema, unitSchema } from './measures';
import { armSchema } from './strokes';
import { changeVerdictSchema } from './trend';

/** The angle of a mark that a reading is of. */
export const markAngleSchema = z.enum(['forearmDeg', 'upperArmDeg', 'elbowDeg', 'elbowDropDeg']);
export type MarkAngle = z.infer<typeof markAngleSchema>;

/**
 * What a finding rests on: a measure of one arm over a session's strokes, a measure of one stroke, or an angle of one
 * frame.
 */
export const readingSourceSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('session'),
    sessionId: idSchema,
    arm: armSchema,
    measure: measureSchema,
    split: breathSplitSchema,
  }),
  z.strictObject({ kind: z.literal('stroke'), clipId: idSchema, strokeId: idSchema, measure: measureSchema }),
  z.strictObject({
    kind: z.literal('frame'),
    clipId: idSchema,
    arm: armSchema,
    frame: frameSchema,
    angle: markAngleSchema,
  }),
]);
export type ReadingSource = z.infer<typeof readingSourceSchema>;

/** How the values behind a reading spread, as far as telling a change from chance needs it; in the unit of the value. */
export const readingSpreadSchema = z.strictObject({
  count: z.int(),
  /** Between strokes; null for one. */
  sd: z.number().nullable(),
  /** Standard uncertainty of the mean from marking and set-up alone. */
  marking: z.number(),
  /** The part that all strokes of the session share. */
  setUp: z.number(),
});

/** The same measure of the same arm in the review that was sent before. */
export const earlierReadingSchema = z.strictObject({
  reviewId: idSchema,
  date: dateSchema,
  value: z.number(),
  uncertainty: z.number(),
  /** Later minus earlier. */
  change: z.number(),
  verdict: changeVerdictSchema,
});
export type EarlierReading = z.infer<typeof earlierReadingSchema>;

/** What a reading says: as it is now in a draft, as it was at sending in a sent review. */
export const readingStandSchema = z.strictObject({
  value: z.number().nullable(),
  /** Standard uncertainty in the unit of the value. */
  uncertainty: z.number().nullable(),
  unit: unitSchema,
  /** Stable code why there is no value; `gone` when the film or the stroke is no longer there. */
  reason: z.string().nullable(),
  /** What it is of: `Vertical at, right arm, mean of 6 strokes`. */
  words: z.string(),
  arm: armSchema.nullable(),
  measure: measureSchema.nullable(),
  angle: markAngleSchema.nullable(),
  split: breathSplitSchema.nullable(),
  /** The target that the coach had set for it, in words. */
  target: z.string().nullable(),
  /** Where to look at it. */
  clipId: idSchema.nullable(),
  frame: frameSchema.nullable(),
  /** Of the session. */
  date: dateSchema.nullable(),
  view: z.string().nullable(),
  spread: readingSpreadSchema.nullable(),
  earlier: earlierReadingSchema.nullable(),
});
export type ReadingStand = z.infer<typeof readingStandSchema>;

export const reviewReadingSchema = z.strictObject({
  source: readingSourceSchema,
  stand: readingStandSchema,
});
export type ReviewReading = z.infer<typeof reviewReadingSchema>;
