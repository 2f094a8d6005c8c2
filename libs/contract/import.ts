import * as z from 'zod';
import { endpoint, type AnswerOf } from './endpoint';
import { exportFileSchema } from './export';
import { dateSchema, idParams, idSchema } from './fields';

/** Largest body of an import, bytes: an athlete with a season of measured clips stays below. */
export const IMPORT_BYTES = 24 * 1024 * 1024;

/**
 * - `add`: only what is not there yet; what differs stays as it is here
 * - `take`: what differs becomes as it is in the file; what is only here stays
 * - `match`: the clip becomes as it is in the file; what is only here goes
 */
export const importChoiceSchema = z.enum(['add', 'take', 'match']);
export type ImportChoice = z.infer<typeof importChoiceSchema>;

const importFields = {
  file: exportFileSchema,
  /** Which clip of the file goes onto which of ours; null leaves one out. Those not named go by the film they are of. */
  pairs: z
    .array(z.strictObject({ from: idSchema, to: idSchema.nullable() }))
    .max(1_000)
    .default([]),
};

const countsSchema = z.strictObject({
  /** In the file and not here; in both and different; in both and the same; only here. */
  new: z.int(),
  changed: z.int(),
  same: z.int(),
  onlyHere: z.int(),
});
export type ImportCounts = z.infer<typeof countsSchema>;

export const importClipSchema = z.strictObject({
  from: z.strictObject({ id: idSchema, name: z.string(), date: dateSchema }),
  /** The clip of ours it goes onto; null where it is left out. */
  to: z.strictObject({ id: idSchema, name: z.string() }).nullable(),
  foundBy: z.enum(['film', 'choice']).nullable(),
  /** Why it does not fit the clip of ours, as a sentence that says what to do. */
  refusal: z.string().nullable(),
  /** Names of the set-up fields that differ, e.g. plumb, travel. */
  setUp: z.array(z.string()),
  strokes: countsSchema,
  marks: countsSchema,
  /** Of the file's figures, how many come out the same here once the clip is as in the file, and how many do not. */
  figures: z.strictObject({ same: z.int(), different: z.int() }),
});
export type ImportClip = z.infer<typeof importClipSchema>;

const importAnswer = z.strictObject({
  /** What was on the clips of this session; send it back, so that nobody's change is overwritten unseen. */
  basis: z.string(),
  clips: z.array(importClipSchema),
  /** Clips of ours that a clip of the file can be put onto. */
  ours: z.array(z.strictObject({ id: idSchema, name: z.string() })),
});

export const previewImport = endpoint({
  method: 'post',
  path: '/api/sessions/:id/import/preview',
  access: ['admin', 'coach'],
  summary: 'What an exported JSON file would change on the clips of a session; changes nothing',
  params: idParams,
  body: z.strictObject(importFields),
  bodyBytes: IMPORT_BYTES,
  answer: importAnswer,
});
export type ImportPreview = AnswerOf<typeof previewImport>;

export const importFile = endpoint({
  method: 'post',
  path: '/api/sessions/:id/import',
  access: ['admin', 'coach'],
  summary: 'Put set-up, strokes and marks of an exported JSON file onto clips of a session, all or nothing',
  params: idParams,
  body: z.strictObject({ ...importFields, choice: importChoiceSchema, basis: z.string().max(100) }),
  bodyBytes: IMPORT_BYTES,
  answer: importAnswer,
});
