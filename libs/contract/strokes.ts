import * as z from 'zod';
import { endpoint } from './endpoint';
import { frameSchema, idParams, idSchema } from './fields';

export const armSchema = z.enum(['left', 'right']);
export type Arm = z.infer<typeof armSchema>;

/** What an event was chosen by: the hand itself, or the wrist that stands in for it where the hand cannot be seen. */
export const eventSourceSchema = z.enum(['hand-seen', 'wrist-proxy']);
export type EventSource = z.infer<typeof eventSourceSchema>;

/** One arm's cycle by its events (frames): entry < catch < exit < next entry; mid-pull is computed, never stored. */
export const strokeSchema = z.strictObject({
  id: idSchema,
  clipId: idSchema,
  arm: armSchema,
  entry: frameSchema,
  catch: frameSchema,
  exit: frameSchema,
  nextEntry: frameSchema.nullable(),
  breath: z.boolean(),
  entrySource: eventSourceSchema,
  catchSource: eventSourceSchema,
  exitSource: eventSourceSchema,
  /** Means something only where there is a next entry. */
  nextEntrySource: eventSourceSchema,
  /** Counts changes; send it back as `version` so that nobody's change is overwritten unseen. */
  version: z.int(),
});
export type Stroke = z.infer<typeof strokeSchema>;

const eventSourceFields = {
  entrySource: eventSourceSchema.optional(),
  catchSource: eventSourceSchema.optional(),
  exitSource: eventSourceSchema.optional(),
  nextEntrySource: eventSourceSchema.optional(),
};

const strokeFields = {
  arm: armSchema,
  entry: frameSchema,
  catch: frameSchema,
  exit: frameSchema,
  nextEntry: frameSchema.nullable().optional(),
  breath: z.boolean(),
  /** Left out: the hand was seen. */
  ...eventSourceFields,
};

export const listStrokes = endpoint({
  method: 'get',
  path: '/api/clips/:id/strokes',
  access: ['admin', 'coach', 'athlete'],
  summary: 'Strokes of a clip, by arm and entry',
  params: idParams,
  answer: z.strictObject({ items: z.array(strokeSchema), nextCursor: z.null() }),
});

export const createStroke = endpoint({
  method: 'post',
  path: '/api/clips/:id/strokes',
  access: ['admin', 'coach'],
  summary: 'Add a stroke; the order of its events is checked',
  status: 201,
  params: idParams,
  /** `id` may be chosen by the client, so that a stroke sent twice over a bad line is one stroke. */
  body: z.strictObject({ ...strokeFields, id: idSchema.optional() }),
  answer: strokeSchema,
});

export const updateStroke = endpoint({
  method: 'patch',
  path: '/api/strokes/:id',
  access: ['admin', 'coach'],
  summary:
    'Change events, what they were chosen by, or breath; with `version`, refused as changed-meanwhile when it is not the newest',
  params: idParams,
  body: z
    .strictObject({
      entry: frameSchema.optional(),
      catch: frameSchema.optional(),
      exit: frameSchema.optional(),
      nextEntry: frameSchema.nullable().optional(),
      breath: z.boolean().optional(),
      ...eventSourceFields,
      version: z.int().optional(),
    })
    .refine(
      (body) => Object.keys(body).some((key) => key !== 'version'),
      'Say at least one thing to change.',
    ),
  answer: strokeSchema,
});

export const deleteStroke = endpoint({
  method: 'delete',
  path: '/api/strokes/:id',
  access: ['admin', 'coach'],
  summary: 'Take a stroke away; its marks stay',
  status: 204,
  params: idParams,
  answerKind: 'none',
});
