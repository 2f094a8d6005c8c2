import * as z from 'zod';
import { pointSchema } from './clip-facts';
import { endpoint } from './endpoint';
import { frameSchema, idParams, idSchema, instantSchema } from './fields';

/** One frame that a still is made of. */
export const stillPartSchema = z.strictObject({ clipId: idSchema, frame: frameSchema });
export type StillPart = z.infer<typeof stillPartSchema>;

/** One frame, or two beside each other and what sets them apart. */
export const stillLayoutSchema = z.enum(['single', 'left-right', 'then-now', 'breathing-other']);
export type StillLayout = z.infer<typeof stillLayoutSchema>;

const colour = z.enum(['white', 'yellow', 'green']);
export type DrawingColour = z.infer<typeof colour>;

/** What is drawn on a still by hand; points in pixels of the still, origin at its outer top-left corner. */
export const drawingSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('arrow'), colour, from: pointSchema, to: pointSchema }),
  z.strictObject({ kind: z.literal('line'), colour, from: pointSchema, to: pointSchema }),
  z.strictObject({
    kind: z.literal('angle'),
    colour,
    corner: pointSchema,
    from: pointSchema,
    to: pointSchema,
  }),
  z.strictObject({
    kind: z.literal('words'),
    colour,
    at: pointSchema,
    words: z.string().trim().min(1).max(120),
  }),
]);
export type Drawing = z.infer<typeof drawingSchema>;

/** In words what a still shows, for those who do not see it and under the picture. */
const stillWords = z.string().trim().max(300, 'Keep the words under a picture to 300 characters.');

/** What is said about a picture that is sent along, as JSON in the field `about`. */
export const aboutStillSchema = z
  .strictObject({
    layout: stillLayoutSchema,
    parts: z.array(stillPartSchema).min(1).max(2),
    overlays: z.boolean(),
    drawings: z.array(drawingSchema).max(60, 'That is more than sixty drawn things; take some away.'),
    words: stillWords,
    /** When replacing: the version that is replaced. */
    version: z.int().min(1).optional(),
  })
  .refine(({ layout, parts }) => parts.length === (layout === 'single' ? 1 : 2), {
    path: ['parts'],
    message: 'A single picture has one frame, a pair two.',
  });
export type AboutStill = z.infer<typeof aboutStillSchema>;

export const stillSchema = z.strictObject({
  id: idSchema,
  findingId: idSchema,
  layout: stillLayoutSchema,
  parts: z.array(stillPartSchema),
  overlays: z.boolean(),
  drawings: z.array(drawingSchema),
  words: z.string(),
  /** Pixels. */
  width: z.int(),
  height: z.int(),
  /** Set when the picture was taken out of a review that had been sent. */
  removedAt: instantSchema.nullable(),
  /** Changes with every new picture, so that an address made with it is never answered by an old one. */
  version: z.int(),
});
export type Still = z.infer<typeof stillSchema>;

export const addStill = endpoint({
  method: 'post',
  path: '/api/findings/:id/stills',
  access: ['admin', 'coach'],
  summary: 'Add a still: multipart, PNG or JPEG in field `picture`, JSON in field `about`',
  status: 201,
  params: idParams,
  bodyKind: 'multipart',
  answer: stillSchema,
});

export const replaceStill = endpoint({
  method: 'put',
  path: '/api/stills/:id',
  access: ['admin', 'coach'],
  summary: 'Put another picture in the place of a still, with the version that is replaced in `about`',
  params: idParams,
  bodyKind: 'multipart',
  answer: stillSchema,
});

export const updateStill = endpoint({
  method: 'patch',
  path: '/api/stills/:id',
  access: ['admin', 'coach'],
  summary: 'Change the words under a still',
  params: idParams,
  body: z.strictObject({ version: z.int(), words: stillWords }),
  answer: stillSchema,
});

/** Of a draft the still goes; of a sent review only the picture does, for good, and the review says so. */
export const deleteStill = endpoint({
  method: 'delete',
  path: '/api/stills/:id',
  access: ['admin', 'coach'],
  summary: 'Take a still out of a draft, or its picture out of a review that was sent',
  status: 204,
  params: idParams,
  query: z.strictObject({ version: z.coerce.number().int().min(1) }),
  answerKind: 'none',
});

export const getStillPicture = endpoint({
  method: 'get',
  path: '/api/stills/:id/picture',
  access: ['admin', 'coach', 'athlete'],
  summary: 'The picture itself, a JPEG without metadata',
  params: idParams,
  /** `version` only makes the address another one when the picture is. */
  query: z.strictObject({ version: z.coerce.number().int().optional() }),
  answerKind: 'bytes',
});
