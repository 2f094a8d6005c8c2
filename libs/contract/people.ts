import * as z from 'zod';
import { endpoint } from './endpoint';
import { emailSchema, idParams, idSchema, instantSchema, nameSchema, pageOf, pageQuery } from './fields';
import { roleSchema } from './roles';

/** Somebody with an account in the club. */
export const personSchema = z.strictObject({
  id: idSchema,
  name: z.string(),
  email: z.string(),
  role: roleSchema,
  squadIds: z.array(idSchema).describe('Squads that a coach coaches; the own squad of an athlete'),
  athleteId: idSchema.nullable(),
  status: z.enum(['invited', 'active', 'deactivated']),
  createdAt: instantSchema,
});
export type Person = z.infer<typeof personSchema>;

export const listPeople = endpoint({
  method: 'get',
  path: '/api/people',
  access: ['admin'],
  summary: 'Accounts of the club',
  query: z.strictObject({
    ...pageQuery,
    search: z.string().trim().max(120).optional(),
    role: roleSchema.optional(),
    sort: z.enum(['name', 'role', 'status']).default('name'),
    direction: z.enum(['asc', 'desc']).default('asc'),
  }),
  answer: pageOf(personSchema),
});

/** The link is in this answer and nowhere else: only a hash of it is stored. */
const invitedSchema = z.strictObject({
  person: personSchema,
  invitation: z.strictObject({
    url: z.string(),
    expiresAt: instantSchema,
    mailed: z.boolean().describe('Whether a mail with the link is on its way to the person'),
  }),
});

export const invitePerson = endpoint({
  method: 'post',
  path: '/api/people',
  access: ['admin'],
  summary: 'Create an account without a password and the invitation link that sets it',
  status: 201,
  body: z.strictObject({
    name: nameSchema,
    email: emailSchema,
    role: roleSchema,
    squadIds: z.array(idSchema).max(100).default([]).describe('Squads to coach (coach)'),
    athleteId: idSchema.optional().describe('The athlete that this account is (athlete)'),
  }),
  answer: invitedSchema,
});

export const updatePerson = endpoint({
  method: 'patch',
  path: '/api/people/:id',
  access: ['admin'],
  summary: 'Rename, change squads coached, deactivate or take back in',
  params: idParams,
  body: z
    .strictObject({
      name: nameSchema.optional(),
      squadIds: z.array(idSchema).max(100).optional(),
      deactivated: z.boolean().optional(),
    })
    .refine((body) => Object.keys(body).length > 0, 'Say at least one thing to change.'),
  answer: personSchema,
});

export const reinvitePerson = endpoint({
  method: 'post',
  path: '/api/people/:id/invitation',
  access: ['admin'],
  summary: 'A fresh invitation link; earlier links stop working',
  status: 201,
  params: idParams,
  answer: invitedSchema,
});
