import * as z from 'zod';
import { endpoint } from './endpoint';
import { idParams, idSchema, nameSchema } from './fields';

export const squadSchema = z.strictObject({
  id: idSchema,
  name: z.string(),
  coaches: z.array(z.strictObject({ id: idSchema, name: z.string() })),
  athleteCount: z.int(),
  deactivated: z.boolean(),
});
export type Squad = z.infer<typeof squadSchema>;

/** A coach gets the squads they coach, an admin all of the club; not paged, a club has few. */
export const listSquads = endpoint({
  method: 'get',
  path: '/api/squads',
  access: ['admin', 'coach'],
  summary: 'Squads the caller may see',
  answer: z.strictObject({ items: z.array(squadSchema), nextCursor: z.null() }),
});

export const createSquad = endpoint({
  method: 'post',
  path: '/api/squads',
  access: ['admin'],
  summary: 'Create a squad',
  status: 201,
  body: z.strictObject({ name: nameSchema, coachIds: z.array(idSchema).max(50).default([]) }),
  answer: squadSchema,
});

export const updateSquad = endpoint({
  method: 'patch',
  path: '/api/squads/:id',
  access: ['admin'],
  summary: 'Rename, set its coaches, deactivate or take back in',
  params: idParams,
  body: z
    .strictObject({
      name: nameSchema.optional(),
      coachIds: z.array(idSchema).max(50).optional(),
      deactivated: z.boolean().optional(),
    })
    .refine((body) => Object.keys(body).length > 0, 'Say at least one thing to change.'),
  answer: squadSchema,
});
