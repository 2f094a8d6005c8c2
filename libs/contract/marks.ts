import * as z from 'zod';
import { pointSchema } from './clip-facts';
import { endpoint } from './endpoint';
import { frameSchema, idParams, idSchema, instantSchema } from './fields';
import { armSchema } from './strokes';

/** Degrees; signs as in the geometry library: + ahead, + dropped, elbow 0–180. */
export const armAnglesSchema = z.strictObject({
  forearmDeg: z.number(),
  upperArmDeg: z.number(),
  elbowDeg: z.number(),
  elbowDropDeg: z.number(),
});
export type ArmAnglesDeg = z.infer<typeof armAnglesSchema>;

export const markSchema = z.strictObject({
  arm: armSchema,
  frame: frameSchema,
  shoulder: pointSchema,
  elbow: pointSchema,
  wrist: pointSchema,
  angles: armAnglesSchema,
  /** Standard uncertainties, degrees. */
  uncertaintyDeg: armAnglesSchema,
  plumbAssumed: z.boolean(),
  version: z.int(),
  updatedAt: instantSchema,
});
export type Mark = z.infer<typeof markSchema>;

/** A mark as saved, with the spread that all marks of its clip are read with now: a mark may change whose that is. */
export const savedMarkSchema = markSchema.extend({
  jointUncertaintyPx: z.strictObject({ shoulder: z.number(), elbow: z.number(), wrist: z.number() }),
});
export type SavedMark = z.infer<typeof savedMarkSchema>;

const markParams = z.strictObject({
  id: idSchema,
  arm: armSchema,
  frame: z.coerce.number().pipe(frameSchema),
});

export const listMarks = endpoint({
  method: 'get',
  path: '/api/clips/:id/marks',
  access: ['admin', 'coach', 'athlete'],
  summary: 'All marks of a clip with their angles, by frame',
  params: idParams,
  answer: z.strictObject({ items: z.array(markSchema), nextCursor: z.null() }),
});

export const putMark = endpoint({
  method: 'put',
  path: '/api/clips/:id/marks/:arm/:frame',
  access: ['admin', 'coach'],
  summary: 'Set the mark of one arm on one frame; answers it with its angles',
  params: markParams,
  /** `version`: the version this change was made on, 0 for "there was none"; left out, the change is made whatever is there. */
  body: z.strictObject({
    shoulder: pointSchema,
    elbow: pointSchema,
    wrist: pointSchema,
    version: z.int().min(0).optional(),
  }),
  answer: savedMarkSchema,
});

export const deleteMark = endpoint({
  method: 'delete',
  path: '/api/clips/:id/marks/:arm/:frame',
  access: ['admin', 'coach'],
  summary: 'Take a mark away',
  status: 204,
  params: markParams,
  query: z.strictObject({ version: z.coerce.number().int().min(1).optional() }),
  answerKind: 'none',
});
