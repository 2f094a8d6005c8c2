import * as z from 'zod';
import {
  captureRateFactorSchema,
  clipSchema,
  fieldOfViewSchema,
  knownDistanceSchema,
  plumbSchema,
  strokeKindSchema,
  travelSchema,
  viewSchema,
} from './clip-facts';
import { endpoint } from './endpoint';
import { idParams, instantSchema } from './fields';

/** Text fields beside the file `video` of an upload; they may come before or after it. */
export const uploadFieldsSchema = z.strictObject({
  view: viewSchema.default('side-underwater'),
  travel: travelSchema.default('right'),
  stroke: strokeKindSchema.default('full'),
  captureRateFactor: z.coerce.number().pipe(captureRateFactorSchema).default(1),
});
export type UploadFields = z.infer<typeof uploadFieldsSchema>;

export const uploadClip = endpoint({
  method: 'post',
  path: '/api/sessions/:id/clips',
  access: ['admin', 'coach', 'athlete'],
  summary: 'Upload a clip: multipart, the file in field `video`',
  status: 201,
  params: idParams,
  bodyKind: 'multipart',
  body: uploadFieldsSchema,
  answer: clipSchema,
});

export const getClip = endpoint({
  method: 'get',
  path: '/api/clips/:id',
  access: ['admin', 'coach', 'athlete'],
  summary: 'One clip',
  params: idParams,
  answer: clipSchema,
});

export const updateClip = endpoint({
  method: 'patch',
  path: '/api/clips/:id',
  access: ['admin', 'coach'],
  summary: 'Change view, travel direction, stroke kind, capture rate factor or field of view',
  params: idParams,
  body: z
    .strictObject({
      view: viewSchema.optional(),
      travel: travelSchema.optional(),
      stroke: strokeKindSchema.optional(),
      captureRateFactor: captureRateFactorSchema.optional(),
      fieldOfView: fieldOfViewSchema.nullable().optional(),
    })
    .refine((body) => Object.keys(body).length > 0, 'Say at least one thing to change.'),
  answer: clipSchema,
});

export const deleteClip = endpoint({
  method: 'delete',
  path: '/api/clips/:id',
  access: ['admin', 'coach'],
  summary: 'Delete file, index and marks together; can be undone until the instant answered',
  params: idParams,
  answer: z.strictObject({ undoUntil: instantSchema }),
});

export const restoreClip = endpoint({
  method: 'post',
  path: '/api/clips/:id/restore',
  access: ['admin', 'coach'],
  summary: 'Undo the deletion of a clip',
  params: idParams,
  answer: clipSchema,
});

export const getClipMedia = endpoint({
  method: 'get',
  path: '/api/clips/:id/media',
  access: ['admin', 'coach', 'athlete'],
  summary: 'The file itself; honours Range',
  params: idParams,
  answerKind: 'bytes',
});

export const getClipPoster = endpoint({
  method: 'get',
  path: '/api/clips/:id/poster',
  access: ['admin', 'coach', 'athlete'],
  summary: 'A small JPEG of the clip',
  params: idParams,
  answerKind: 'bytes',
});

export const getClipFrames = endpoint({
  method: 'get',
  path: '/api/clips/:id/frames',
  access: ['admin', 'coach', 'athlete'],
  summary: 'Every frame in presentation order: its time in whole microseconds, and which are key frames',
  params: idParams,
  answer: z.strictObject({ timestampsUs: z.array(z.int()), keyFrames: z.array(z.int()) }),
});

/** `plumb: null` takes the plumb away: readings then say that it is assumed. */
export const putCalibration = endpoint({
  method: 'put',
  path: '/api/clips/:id/calibration',
  access: ['admin', 'coach'],
  summary: 'Set or take away the plumb of a clip',
  params: idParams,
  body: z.strictObject({ plumb: plumbSchema.nullable() }),
  answer: clipSchema,
});

/** `distance: null` takes the distance away: stroke length and index then have no value. */
export const putDistance = endpoint({
  method: 'put',
  path: '/api/clips/:id/distance',
  access: ['admin', 'coach'],
  summary: 'Set or take away how far the swimmer travelled between two frames',
  params: idParams,
  body: z.strictObject({ distance: knownDistanceSchema.nullable() }),
  answer: clipSchema,
});
