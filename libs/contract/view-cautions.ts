import * as z from 'zod';
import { frameSchema } from './fields';
import { armSchema } from './strokes';

/** Why what the camera shows may differ from what the arm did. */
export const cautionCodeSchema = z.enum([
  'foreshortened',
  'far-arm',
  'plumb-assumed',
  'plumb-short',
  'camera-leans',
  'flat-port',
]);
export type CautionCode = z.infer<typeof cautionCodeSchema>;

export const affectedReadingSchema = z.enum([
  'forearm',
  'upperArm',
  'elbow',
  'elbowDrop',
  'verticalAt',
  'peakDrop',
  'elbowAtMidPull',
]);
export type AffectedReading = z.infer<typeof affectedReadingSchema>;

/** A caution is no part of any uncertainty: it does not shrink with more marks or strokes. */
export const viewCautionSchema = z.strictObject({
  code: cautionCodeSchema,
  arm: armSchema.nullable().describe('Null where it is about the whole clip'),
  sizeDeg: z.number().describe('The largest of the sizes below'),
  causeDeg: z
    .number()
    .nullable()
    .describe('What it comes from: out of plane, lean of the camera, off the axis'),
  assumed: z.boolean().describe('Rests on something that nobody has said of this clip'),
  frames: z.array(frameSchema).describe('Empty for the whole clip'),
  affects: z
    .array(z.strictObject({ reading: affectedReadingSchema, sizeDeg: z.number() }))
    .describe('By how much each reading, or the angle behind it, may be off'),
});
export type ViewCaution = z.infer<typeof viewCautionSchema>;

/** Cautions over many strokes in short, for one measure. */
export const cautionSummarySchema = z.strictObject({
  code: cautionCodeSchema,
  measure: z.enum(['verticalAt', 'peakDrop', 'elbowAtMidPull']),
  arm: armSchema.nullable(),
  /** The largest over the strokes. */
  sizeDeg: z.number(),
  assumed: z.boolean(),
  strokes: z.int().describe('How many strokes it is about'),
});
export type CautionSummary = z.infer<typeof cautionSummarySchema>;
