import * as z from 'zod';
import { pointSchema } from './clip-facts';
import { endpoint } from './endpoint';
import { idParams } from './fields';

/** The plane in which metres hold: that of the swimmer, or one of the pool's. */
export const scalePlaneSchema = z.enum(['swimmer', 'wall', 'floor']);
export type ScalePlane = z.infer<typeof scalePlaneSchema>;

const metresSchema = z
  .number()
  .positive('Give a length above 0 metres.')
  .max(200, 'Give a length of at most 200 metres.');
const uncertaintySchema = z.number().min(0).max(200);

/** A second known length that is held against the scale; its difference is the only residual there is. */
export const knownLengthSchema = z.strictObject({ from: pointSchema, to: pointSchema, metres: metresSchema });
export type KnownLength = z.infer<typeof knownLengthSchema>;

export const scaleSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('length'),
    plane: scalePlaneSchema,
    from: pointSchema,
    to: pointSchema,
    metres: metresSchema,
    /** Standard uncertainty of the known length, metres. */
    uncertaintyM: uncertaintySchema,
    check: knownLengthSchema.nullable(),
  }),
  z.strictObject({
    kind: z.literal('rectangle'),
    plane: scalePlaneSchema,
    /** Walked round: first to second is a side of `widthM`, second to third one of `heightM`. */
    corners: z.tuple([pointSchema, pointSchema, pointSchema, pointSchema]),
    widthM: metresSchema,
    heightM: metresSchema,
    uncertaintyM: uncertaintySchema,
    check: knownLengthSchema.nullable(),
  }),
]);
export type Scale = z.infer<typeof scaleSchema>;

/** The scale of a clip; null where there is none, with version 0. */
export const clipScaleSchema = z.strictObject({ scale: scaleSchema.nullable(), version: z.int().min(0) });
export type ClipScale = z.infer<typeof clipScaleSchema>;

export const getScale = endpoint({
  method: 'get',
  path: '/api/clips/:id/scale',
  access: ['admin', 'coach', 'athlete'],
  summary: 'The scale of a clip, null where there is none',
  params: idParams,
  answer: clipScaleSchema,
});

export const putScale = endpoint({
  method: 'put',
  path: '/api/clips/:id/scale',
  access: ['admin', 'coach'],
  summary: 'Set the scale of a clip: a known length or a rectangle with known sides',
  params: idParams,
  /** `version`: the version this change was made on, 0 for "there was none"; left out, the change is made whatever is there. */
  body: z.strictObject({ scale: scaleSchema, version: z.int().min(0).optional() }),
  answer: clipScaleSchema,
});

export const deleteScale = endpoint({
  method: 'delete',
  path: '/api/clips/:id/scale',
  access: ['admin', 'coach'],
  summary: 'Take the scale of a clip away',
  status: 204,
  params: idParams,
  query: z.strictObject({ version: z.coerce.number().int().min(1).optional() }),
  answerKind: 'none',
});
