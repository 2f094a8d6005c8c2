import * as z from 'zod';
import { frameSchema, idSchema, instantSchema } from './fields';

export const viewSchema = z.enum([
  'side-underwater',
  'front-underwater',
  'side-above',
  'front-above',
  'deck',
]);
export type View = z.infer<typeof viewSchema>;
/** Direction in which the swimmer travels in the picture as shown. */
export const travelSchema = z.enum(['left', 'right']);
export type Travel = z.infer<typeof travelSchema>;
export const strokeKindSchema = z.enum(['full', 'drill']);
export type StrokeKind = z.infer<typeof strokeKindSchema>;
/** World seconds per file second: 1 for ordinary film, 0.25 for 240 fps film stored at 60. */
export const captureRateFactorSchema = z.number().finite().min(0.01).max(10);

/** Angle between the left and the right edge of the picture, degrees, measured in water or in air. */
export const fieldOfViewSchema = z
  .strictObject({ deg: z.number().min(5).max(170), medium: z.enum(['water', 'air']) })
  .refine(
    ({ deg, medium }) => medium === 'air' || deg <= 96,
    'In water a camera behind a flat port sees at most 96° across.',
  );
export type FieldOfView = z.infer<typeof fieldOfViewSchema>;

/** Pixels of the picture as shown; origin at its outer top-left corner, x right, y down. */
export const pointSchema = z.strictObject({
  x: z.number().finite().min(-20_000).max(20_000),
  y: z.number().finite().min(-20_000).max(20_000),
});
export type Point = z.infer<typeof pointSchema>;
export const plumbSchema = z.strictObject({ top: pointSchema, bottom: pointSchema });
export type Plumb = z.infer<typeof plumbSchema>;

/** How far the swimmer travelled between two frames of the clip, e.g. from one marking of the lane to another. */
export const knownDistanceSchema = z
  .strictObject({
    metres: z.number().finite().positive('A distance is more than 0 metres.').max(1000),
    uncertaintyM: z
      .number()
      .finite()
      .min(0, 'An uncertainty is 0 or more metres.')
      .max(500)
      .describe('Standard uncertainty of the metres'),
    fromFrame: frameSchema,
    toFrame: frameSchema,
  })
  .refine(({ metres, uncertaintyM }) => uncertaintyM < metres, {
    path: ['uncertaintyM'],
    message: 'The uncertainty has to be smaller than the distance itself.',
  })
  .refine(({ fromFrame, toFrame }) => fromFrame < toFrame, {
    path: ['toFrame'],
    message: 'The second frame has to come after the first.',
  });
export type KnownDistance = z.infer<typeof knownDistanceSchema>;

export const clipStatusSchema = z.enum(['ready', 'converting', 'failed']);

export const clipSchema = z.strictObject({
  id: idSchema,
  sessionId: idSchema,
  athleteId: idSchema,
  name: z.string().describe('File name it came with'),
  view: viewSchema,
  travel: travelSchema,
  stroke: strokeKindSchema,
  captureRateFactor: z.number(),
  fieldOfView: fieldOfViewSchema.nullable().describe('Null while nobody has said it'),
  plumb: plumbSchema.nullable(),
  /** Standard uncertainty of a placed joint, per coordinate, pixels of the picture as shown. */
  jointUncertaintyPx: z.strictObject({ shoulder: z.number(), elbow: z.number(), wrist: z.number() }),
  jointUncertaintyOwn: z
    .boolean()
    .describe(
      'True: found by marking again, by whoever placed most of the marks; false: the default for the size',
    ),
  distance: knownDistanceSchema.nullable(),
  status: clipStatusSchema,
  width: z.int().describe('Pixels as shown, after rotation and pixel aspect'),
  height: z.int(),
  frameCount: z.int(),
  durationUs: z.int(),
  frameRate: z.number().nullable().describe('Frames per file second; null when variable'),
  codec: z.string(),
  container: z.string(),
  sizeBytes: z.int(),
  sha256: z.string(),
  cutOff: z.boolean().describe('The file ends in the middle; its readable frames are kept'),
  hasPoster: z.boolean(),
  markedFrames: z.int(),
  strokeCount: z.int(),
  createdAt: instantSchema,
  deletedAt: instantSchema.nullable(),
});
export type Clip = z.infer<typeof clipSchema>;
