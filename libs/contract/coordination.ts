import * as z from 'zod';
import { frameSchema, idSchema } from './fields';

/** `undetermined`: the 95 % interval holds 0, so that a gap and an overlap cannot be told apart. */
export const coordinationModeSchema = z.enum(['catch-up', 'opposition', 'superposition', 'undetermined']);
export type CoordinationMode = z.infer<typeof coordinationModeSchema>;

/** One passage arm – other arm – arm, with the way to the exit that it begins with. */
export const passageSchema = z.strictObject({
  clipId: idSchema,
  strokeId: idSchema.describe('The stroke it begins with'),
  breath: z.boolean(),
  value: z.number().describe('Share of the mean cycle; negative: gap, positive: overlap'),
  uncertainty: z.number(),
  frame: frameSchema,
});
export type Passage = z.infer<typeof passageSchema>;

/** Index of coordination over some passages: the mean with its standard uncertainty and 95 % interval; null without any. */
export const coordinationSchema = z.strictObject({
  value: z.number().nullable(),
  uncertainty: z.number().nullable(),
  interval: z.strictObject({ low: z.number(), high: z.number() }).nullable(),
  mode: coordinationModeSchema.nullable(),
  passages: z.array(passageSchema),
});
export type Coordination = z.infer<typeof coordinationSchema>;
