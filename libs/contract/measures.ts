import * as z from 'zod';
import { coordinationSchema } from './coordination';
import { endpoint } from './endpoint';
import { frameSchema, idParams, idSchema } from './fields';
import { scalePlaneSchema } from './scale';
import { armSchema } from './strokes';
import { viewCautionSchema } from './view-cautions';

/** Every measure that Compare and Trend know. Shares are 0–1, angles degrees, rates cycles per minute, lengths metres, stroke index m²/s. */
export const measureSchema = z.enum([
  'verticalAt',
  'peakDrop',
  'elbowAtMidPull',
  'entryAndCatch',
  'pull',
  'push',
  'recovery',
  'strokeRate',
  'strokeLength',
  'strokeIndex',
]);
export type Measure = z.infer<typeof measureSchema>;
export const unitSchema = z.enum(['share', 'deg', 'perMinute', 'm', 'm2PerS']);
export type Unit = z.infer<typeof unitSchema>;

/** A computed figure, or the reason why there is none (`value` null). `frame` is where to look at it on the Desk. */
export const figureSchema = z.strictObject({
  value: z.number().nullable(),
  /** Standard uncertainty in the unit of the value; null where there is no value. */
  uncertainty: z.number().nullable(),
  reason: z
    .string()
    .nullable()
    .describe('Stable code why there is no value, e.g. not-reached, too-few-marks'),
  frame: frameSchema.nullable(),
  frames: z.array(frameSchema).describe('All frames it was computed from'),
});
export type Figure = z.infer<typeof figureSchema>;

export const curvePointSchema = z.strictObject({
  frame: frameSchema,
  /** Share of catch→exit by time, 0–1; outside for marks before the catch or after the exit. */
  share: z.number(),
  deg: z.number(),
  uncertaintyDeg: z.number(),
});
export type CurvePoint = z.infer<typeof curvePointSchema>;

/** Design names first: phases, `verticalAtShare`, peak elbow drop, elbow at mid-pull. */
export const strokeMeasuresSchema = z.strictObject({
  strokeId: idSchema,
  arm: armSchema,
  breath: z.boolean(),
  phases: z.strictObject({
    entryAndCatch: figureSchema,
    pull: figureSchema,
    push: figureSchema,
    recovery: figureSchema,
  }),
  verticalAtShare: figureSchema,
  peakElbowDrop: figureSchema,
  elbowAtMidPull: figureSchema,
  midPull: figureSchema.describe('Value: share of catch→exit; frame: the computed event'),
  strokeRate: figureSchema,
  strokeLength: figureSchema.describe('Metres per cycle; needs a known distance'),
  strokeIndex: figureSchema.describe('Speed × length, m²/s'),
  forearmCurve: z.array(curvePointSchema),
  dropCurve: z.array(curvePointSchema),
  cautions: z.array(viewCautionSchema).describe('What of the view these measures have to be read with'),
  inMetres: z
    .strictObject({ reachAtEntry: figureSchema, handDepth: figureSchema })
    .nullable()
    .describe('Metres, from the clip’s scale; null where there is none'),
});
export type StrokeMeasures = z.infer<typeof strokeMeasuresSchema>;

export const getMeasures = endpoint({
  method: 'get',
  path: '/api/clips/:id/measures',
  access: ['admin', 'coach', 'athlete'],
  summary:
    'Per stroke: phases, vertical at, peak elbow drop, elbow at mid-pull, each with frame and uncertainty',
  params: idParams,
  answer: z.strictObject({
    items: z.array(strokeMeasuresSchema),
    nextCursor: z.null(),
    coordination: coordinationSchema,
    plumbAssumed: z.boolean(),
    cautions: z.array(viewCautionSchema).describe('What holds for the whole clip'),
    scalePlane: scalePlaneSchema.nullable(),
    verticalToleranceDeg: z.number(),
  }),
});
