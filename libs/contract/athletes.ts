import * as z from 'zod';
import { endpoint } from './endpoint';
import { dateSchema, idParams, idSchema, nameSchema, pageOf, pageQuery } from './fields';

/** Latest mean of the share of the pull at which the forearm comes to vertical, 0–1; null where nothing measured. */
const verticalAtGlance = z.strictObject({ left: z.number().nullable(), right: z.number().nullable() });

export const athleteSchema = z.strictObject({
  id: idSchema,
  name: z.string(),
  squadId: idSchema,
  squadName: z.string(),
  lastSession: dateSchema.nullable(),
  sessionCount: z.int(),
  /** Clips that wait for the coach: ready, and no mark on them yet. */
  clipsToMark: z.int(),
  verticalAt: verticalAtGlance,
  deactivated: z.boolean(),
});
export type Athlete = z.infer<typeof athleteSchema>;

export const listAthletes = endpoint({
  method: 'get',
  path: '/api/athletes',
  access: ['admin', 'coach', 'athlete'],
  summary: 'Athletes the caller may see: a coach those of squads coached, an athlete only themselves',
  query: z.strictObject({
    ...pageQuery,
    squadId: idSchema.optional(),
    search: z.string().trim().max(120).optional(),
    sort: z.enum(['name', 'lastSession', 'clipsToMark']).default('name'),
    direction: z.enum(['asc', 'desc']).default('asc'),
    includeDeactivated: z.enum(['true', 'false']).default('false'),
  }),
  answer: pageOf(athleteSchema),
});

export const createAthlete = endpoint({
  method: 'post',
  path: '/api/athletes',
  access: ['admin', 'coach'],
  summary: 'Add an athlete to a squad',
  status: 201,
  body: z.strictObject({ name: nameSchema, squadId: idSchema }),
  answer: athleteSchema,
});

export const getAthlete = endpoint({
  method: 'get',
  path: '/api/athletes/:id',
  access: ['admin', 'coach', 'athlete'],
  summary: 'One athlete',
  params: idParams,
  answer: athleteSchema,
});

export const updateAthlete = endpoint({
  method: 'patch',
  path: '/api/athletes/:id',
  access: ['admin', 'coach'],
  summary: 'Rename, move to another squad, deactivate or take back in',
  params: idParams,
  body: z
    .strictObject({
      name: nameSchema.optional(),
      squadId: idSchema.optional(),
      deactivated: z.boolean().optional(),
    })
    .refine((body) => Object.keys(body).length > 0, 'Say at least one thing to change.'),
  answer: athleteSchema,
});
