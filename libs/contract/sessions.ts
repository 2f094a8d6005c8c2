import * as z from 'zod';
import { clipSchema } from './clip-facts';
import { endpoint } from './endpoint';
import { dateSchema, idParams, idSchema, instantSchema, noteSchema, pageOf, pageQuery } from './fields';

/** One visit to the pool, with its clips. */
export const sessionSchema = z.strictObject({
  id: idSchema,
  athleteId: idSchema,
  athleteName: z.string(),
  squadId: idSchema,
  squadName: z.string(),
  date: dateSchema,
  place: z.string().nullable(),
  note: z.string().nullable(),
  clips: z.array(clipSchema),
  /** What was measured, in short: strokes an arm, and mean share of the pull at vertical (0–1). */
  summary: z.strictObject({
    strokes: z.strictObject({ left: z.int(), right: z.int() }),
    verticalAt: z.strictObject({ left: z.number().nullable(), right: z.number().nullable() }),
  }),
  deletedAt: instantSchema.nullable(),
});
export type Session = z.infer<typeof sessionSchema>;

const placeSchema = z.string().trim().max(200);

export const listSessions = endpoint({
  method: 'get',
  path: '/api/athletes/:id/sessions',
  access: ['admin', 'coach', 'athlete'],
  summary: 'Sessions of an athlete, newest first',
  params: idParams,
  query: z.strictObject(pageQuery),
  answer: pageOf(sessionSchema),
});

export const createSession = endpoint({
  method: 'post',
  path: '/api/athletes/:id/sessions',
  access: ['admin', 'coach', 'athlete'],
  summary: 'Open a session',
  status: 201,
  params: idParams,
  body: z.strictObject({ date: dateSchema, place: placeSchema.optional(), note: noteSchema.optional() }),
  answer: sessionSchema,
});

export const getSession = endpoint({
  method: 'get',
  path: '/api/sessions/:id',
  access: ['admin', 'coach', 'athlete'],
  summary: 'One session',
  params: idParams,
  answer: sessionSchema,
});

export const updateSession = endpoint({
  method: 'patch',
  path: '/api/sessions/:id',
  access: ['admin', 'coach'],
  summary: 'Change date, place or note',
  params: idParams,
  body: z
    .strictObject({
      date: dateSchema.optional(),
      place: placeSchema.nullable().optional(),
      note: noteSchema.nullable().optional(),
    })
    .refine((body) => Object.keys(body).length > 0, 'Say at least one thing to change.'),
  answer: sessionSchema,
});

const undoAnswer = z.strictObject({ undoUntil: instantSchema });

export const deleteSession = endpoint({
  method: 'delete',
  path: '/api/sessions/:id',
  access: ['admin', 'coach'],
  summary: 'Delete a session with its clips and marks; can be undone until the instant answered',
  params: idParams,
  answer: undoAnswer,
});

export const restoreSession = endpoint({
  method: 'post',
  path: '/api/sessions/:id/restore',
  access: ['admin', 'coach'],
  summary: 'Undo the deletion of a session',
  params: idParams,
  answer: sessionSchema,
});
