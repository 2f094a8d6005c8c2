import * as z from 'zod';
import { plumbSchema, pointSchema, travelSchema } from './clip-facts';
import { endpoint, type AnswerOf } from './endpoint';
import { frameSchema, idParams, idSchema } from './fields';
import { figureSchema, measureSchema, unitSchema } from './measures';
import { armSchema } from './strokes';

/** One contribution to a standard uncertainty, in the unit of the measure; `share` is its share of the variance, 0–1. */
export const uncertaintyPartSchema = z.strictObject({
  source: z.string().describe('Stable code, e.g. wrist-mark, roll, catch-frame'),
  alone: z.number().describe('Standard uncertainty that this source would leave on its own'),
  share: z.number(),
});
export type ExplainedPart = z.infer<typeof uncertaintyPartSchema>;

/** How one figure of one stroke came about: the result with its parts, and everything that went in. */
export const strokeExplanationSchema = z.strictObject({
  strokeId: idSchema,
  clipId: idSchema,
  arm: armSchema,
  breath: z.boolean(),
  measure: measureSchema,
  unit: unitSchema,
  figure: figureSchema,
  /** 95 % interval of this one stroke's figure; not always symmetric. */
  interval: z.strictObject({ low: z.number(), high: z.number() }).nullable(),
  /** Largest first. */
  parts: z.array(uncertaintyPartSchema),
  /** The stroke's events in order, with their file times in microseconds. */
  events: z.array(
    z.strictObject({
      event: z.enum(['entry', 'catch', 'exit', 'nextEntry']),
      frame: frameSchema,
      timeUs: z.number().nullable(),
    }),
  ),
  /** The marks among the figure's frames, as placed, in pixels of the picture as shown. */
  marks: z.array(
    z.strictObject({ frame: frameSchema, shoulder: pointSchema, elbow: pointSchema, wrist: pointSchema }),
  ),
  plumb: plumbSchema.nullable(),
  travel: travelSchema,
  captureRateFactor: z.number(),
  verticalToleranceDeg: z.number(),
  /** Standard uncertainty of a placed joint per coordinate, pixels. */
  jointUncertaintyPx: z.strictObject({ shoulder: z.number(), elbow: z.number(), wrist: z.number() }),
  jointUncertaintyOwn: z.boolean().describe('Found by marking again, not the default for the size'),
  eventErrorFrames: z.number().describe('Half-width in frames within which a chosen event is taken to lie'),
});

export const getStrokeExplanation = endpoint({
  method: 'get',
  path: '/api/strokes/:id/explanation',
  access: ['admin', 'coach', 'athlete'],
  summary:
    'How one figure of a stroke was computed: inputs, frames, and the parts of its uncertainty, largest first',
  params: idParams,
  query: z.strictObject({ measure: measureSchema }),
  answer: strokeExplanationSchema,
});
export type StrokeExplanation = AnswerOf<typeof getStrokeExplanation>;
