import * as z from 'zod';
import { endpoint } from './endpoint';
import { idParams, idSchema, instantSchema } from './fields';
import { measureSchema, type Measure, type unitSchema } from './measures';

/** A target may hold for one arm only; where there is one for both and one for an arm, the arm's own counts. */
export const targetArmSchema = z.enum(['both', 'left', 'right']);
export type TargetArm = z.infer<typeof targetArmSchema>;

const wordsSchema = z
  .string()
  .trim()
  .min(1, 'Say in your own words what it is for.')
  .max(200, 'Keep the words under 200 characters.');
/** An end of the band in the unit of the measure; null = open on that side. */
const endSchema = z.number('Give a number, or leave this side open.').nullable();

/** A band that a coach set for a measure of an athlete. */
export const targetSchema = z.strictObject({
  id: idSchema,
  athleteId: idSchema,
  measure: measureSchema,
  arm: targetArmSchema,
  low: z.number().nullable(),
  high: z.number().nullable(),
  words: z.string(),
  /** Name of who set it last; null when the account is gone. */
  setBy: z.string().nullable(),
  setAt: instantSchema,
  /** Counts changes; sent back with a change so that nobody's is overwritten unseen. */
  version: z.int(),
});
export type Target = z.infer<typeof targetSchema>;

interface Range {
  readonly low: number;
  readonly high: number;
}

const rangeOfUnit: Readonly<Record<string, Range>> = {
  share: { low: 0, high: 1 },
  deg: { low: -180, high: 180 },
  perMinute: { low: 0, high: 200 },
};
/** Measures that reach less far than their unit. */
const rangeOfMeasure: Partial<Record<Measure, Range>> = { elbowAtMidPull: { low: 0, high: 180 } };
const wide: Range = { low: -1000, high: 1000 };

/** Between which values a target's ends may lie, both included, in the unit of the measure. */
export function targetRange(measure: Measure, unit: z.infer<typeof unitSchema>): Range {
  return rangeOfMeasure[measure] ?? rangeOfUnit[unit] ?? wide;
}

export const listTargets = endpoint({
  method: 'get',
  path: '/api/athletes/:id/targets',
  access: ['admin', 'coach', 'athlete'],
  summary: 'Bands that a coach set for measures of this athlete',
  params: idParams,
  answer: z.strictObject({ items: z.array(targetSchema), nextCursor: z.null() }),
});

export const createTarget = endpoint({
  method: 'post',
  path: '/api/athletes/:id/targets',
  access: ['admin', 'coach'],
  summary: 'Set a band for a measure; one at a time for a measure and arm',
  status: 201,
  params: idParams,
  body: z.strictObject({
    measure: measureSchema,
    arm: targetArmSchema,
    low: endSchema,
    high: endSchema,
    words: wordsSchema,
  }),
  answer: targetSchema,
});

export const updateTarget = endpoint({
  method: 'patch',
  path: '/api/targets/:id',
  access: ['admin', 'coach'],
  summary: 'Change the ends or the words; refused as changed-meanwhile when `version` is not the newest',
  params: idParams,
  body: z
    .strictObject({
      low: endSchema.optional(),
      high: endSchema.optional(),
      words: wordsSchema.optional(),
      version: z.int(),
    })
    .refine(
      (body) => Object.keys(body).some((key) => key !== 'version'),
      'Say at least one thing to change.',
    ),
  answer: targetSchema,
});

export const deleteTarget = endpoint({
  method: 'delete',
  path: '/api/targets/:id',
  access: ['admin', 'coach'],
  summary: 'Take a target away; can be undone until the instant answered',
  params: idParams,
  answer: z.strictObject({ undoUntil: instantSchema }),
});

export const restoreTarget = endpoint({
  method: 'post',
  path: '/api/targets/:id/restore',
  access: ['admin', 'coach'],
  summary: 'Undo the deletion of a target',
  params: idParams,
  answer: targetSchema,
});
