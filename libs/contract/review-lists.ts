import * as z from 'zod';
import { endpoint } from './endpoint';
import { idParams, idSchema } from './fields';

/** What writers of reviews keep at hand: the club's list of observations, and each coach's own texts. */

export const observationSchema = z.strictObject({
  id: idSchema,
  name: z.string(),
  /** No longer offered; findings that have it keep it. */
  retired: z.boolean(),
  version: z.int(),
});
export type Observation = z.infer<typeof observationSchema>;
const observationName = z
  .string()
  .trim()
  .min(1, 'Give the observation a name.')
  .max(120, 'Keep the name under 120 characters.');

export const listObservations = endpoint({
  method: 'get',
  path: '/api/observations',
  access: ['admin', 'coach'],
  summary: 'What the club looks for beside angles, by name',
  answer: z.strictObject({ items: z.array(observationSchema), nextCursor: z.null() }),
});

export const addObservation = endpoint({
  method: 'post',
  path: '/api/observations',
  access: ['admin', 'coach'],
  summary: 'Add to the club’s list of observations',
  status: 201,
  body: z.strictObject({ name: observationName }),
  answer: observationSchema,
});

export const updateObservation = endpoint({
  method: 'patch',
  path: '/api/observations/:id',
  access: ['admin', 'coach'],
  summary: 'Rename an observation, or offer it no longer',
  params: idParams,
  body: z
    .strictObject({ version: z.int(), name: observationName.optional(), retired: z.boolean().optional() })
    .refine(
      ({ name, retired }) => name !== undefined || retired !== undefined,
      'Say at least one thing to change.',
    ),
  answer: observationSchema,
});

export const snippetSchema = z.strictObject({ id: idSchema, words: z.string(), version: z.int() });
export type Snippet = z.infer<typeof snippetSchema>;
const snippetWords = z
  .string()
  .trim()
  .min(1, 'There is no text to keep.')
  .max(2000, 'Keep a text under 2000 characters.');

export const listSnippets = endpoint({
  method: 'get',
  path: '/api/snippets',
  access: ['admin', 'coach'],
  summary: 'Texts that the caller uses often, oldest first',
  answer: z.strictObject({ items: z.array(snippetSchema), nextCursor: z.null() }),
});

export const addSnippet = endpoint({
  method: 'post',
  path: '/api/snippets',
  access: ['admin', 'coach'],
  summary: 'Keep a text',
  status: 201,
  body: z.strictObject({ words: snippetWords }),
  answer: snippetSchema,
});

export const updateSnippet = endpoint({
  method: 'patch',
  path: '/api/snippets/:id',
  access: ['admin', 'coach'],
  summary: 'Change a kept text',
  params: idParams,
  body: z.strictObject({ version: z.int(), words: snippetWords }),
  answer: snippetSchema,
});

export const deleteSnippet = endpoint({
  method: 'delete',
  path: '/api/snippets/:id',
  access: ['admin', 'coach'],
  summary: 'Keep a text no longer',
  status: 204,
  params: idParams,
  query: z.strictObject({ version: z.coerce.number().int().min(1) }),
  answerKind: 'none',
});
