import * as z from 'zod';
import { captureRateFactorSchema, clipSchema, fieldOfViewSchema } from './clip-facts';
import { endpoint } from './endpoint';
import { dateSchema, frameSchema, idParams, idSchema, instantSchema } from './fields';
import { markSchema } from './marks';
import { strokeSchema } from './strokes';

/**
 * The file in which marks, events, readings and statistics leave the product and come back. What a person put there
 * (set-up, strokes, marks) is read strictly; what is computed from it is carried along for other programs and computed
 * again when the file is brought back.
 */

export const EXPORT_FORMAT = 'stillstroke-export';
/** Counts up when a file of before could no longer be read the same way. */
export const EXPORT_VERSION = 1;

const notOurs =
  'This is not a file that Stillstroke exported. Choose a JSON file saved with “Take it along”.';

const formatSchema = z.strictObject(
  {
    name: z.literal(EXPORT_FORMAT, { error: notOurs }),
    version: z.literal(EXPORT_VERSION, {
      error: `The file has another version of the format than ${EXPORT_VERSION}, the one read here. Export it again from a Stillstroke of the same version.`,
    }),
  },
  { error: notOurs },
);

/** A figure of a stroke; `reason` says why there is none. Measures by name, so that files from before a measure can be read. */
export const exportFigureSchema = z.strictObject({
  value: z.number().nullable(),
  uncertainty: z.number().nullable(),
  frame: frameSchema.nullable(),
  reason: z.string().max(80).nullable(),
});
export type ExportFigure = z.infer<typeof exportFigureSchema>;

export const exportStrokeSchema = strokeSchema
  .omit({ clipId: true, version: true })
  .extend({ figures: z.record(z.string().max(60), exportFigureSchema) });
export type ExportStroke = z.infer<typeof exportStrokeSchema>;

export const exportMarkSchema = markSchema.omit({ version: true, updatedAt: true });
export type ExportMark = z.infer<typeof exportMarkSchema>;

/** A clip's facts without the film: enough to know it again and to compute its figures. */
export const exportClipSchema = clipSchema
  .omit({
    sessionId: true,
    athleteId: true,
    status: true,
    hasPoster: true,
    markedFrames: true,
    strokeCount: true,
    deletedAt: true,
  })
  .extend({
    name: z.string().max(200),
    captureRateFactor: captureRateFactorSchema,
    fieldOfView: fieldOfViewSchema.nullable().default(null),
    jointUncertaintyPx: z.strictObject({ shoulder: z.number(), elbow: z.number(), wrist: z.number() }),
    timesUs: z.array(z.int()).max(2_000_000),
    strokes: z.array(exportStrokeSchema).max(5_000),
    marks: z.array(exportMarkSchema).max(50_000),
  });
export type ExportClip = z.infer<typeof exportClipSchema>;

const armMeanSchema = z.strictObject({
  count: z.int(),
  mean: z.number().nullable(),
  low: z.number().nullable(),
  high: z.number().nullable(),
});

export const exportComparisonSchema = z.strictObject({
  split: z.string().max(40),
  measure: z.string().max(60),
  unit: z.string().max(40),
  left: armMeanSchema,
  right: armMeanSchema,
  difference: z.number().nullable(),
  low: z.number().nullable(),
  high: z.number().nullable(),
  verdict: z.string().max(60),
  moreStrokes: z.int().nullable(),
});
export type ExportComparison = z.infer<typeof exportComparisonSchema>;

export const exportBreathSchema = z.strictObject({
  arm: z.string().max(20),
  measure: z.string().max(60),
  unit: z.string().max(40),
  breathing: armMeanSchema,
  others: armMeanSchema,
  difference: z.number().nullable(),
  low: z.number().nullable(),
  high: z.number().nullable(),
  verdict: z.string().max(60),
  moreStrokes: z.int().nullable(),
});
export type ExportBreath = z.infer<typeof exportBreathSchema>;

export const exportTrendSchema = z.strictObject({
  measure: z.string().max(60),
  unit: z.string().max(40),
  view: z.string().max(40),
  arm: z.string().max(10),
  points: z
    .array(
      z.strictObject({
        sessionId: idSchema,
        date: dateSchema,
        mean: z.number(),
        uncertainty: z.number(),
        count: z.int(),
      }),
    )
    .max(10_000),
  change: z.number().nullable(),
  low: z.number().nullable(),
  high: z.number().nullable(),
  detectable: z.number().nullable(),
  verdict: z.string().max(60),
  slope: z
    .strictObject({ value: z.number(), low: z.number(), high: z.number(), robust: z.number() })
    .nullable(),
});
export type ExportTrend = z.infer<typeof exportTrendSchema>;

export const exportSessionSchema = z.strictObject({
  id: idSchema,
  date: dateSchema,
  place: z.string().max(200).nullable(),
  note: z.string().max(2000).nullable(),
  clips: z.array(exportClipSchema).max(1_000),
  comparison: z.array(exportComparisonSchema).max(1_000),
  breath: z.array(exportBreathSchema).max(1_000),
});
export type ExportSession = z.infer<typeof exportSessionSchema>;

export const exportScopeSchema = z.enum(['clip', 'session', 'athlete']);
export type ExportScope = z.infer<typeof exportScopeSchema>;

export const exportFileSchema = z.strictObject(
  {
    format: formatSchema,
    exportedAt: instantSchema,
    scope: z.strictObject({ kind: exportScopeSchema, id: idSchema }),
    athlete: z.strictObject({ id: idSchema, name: z.string().max(200) }),
    sessions: z.array(exportSessionSchema).max(5_000),
    trend: z.array(exportTrendSchema).max(1_000),
  },
  {
    error: (issue) =>
      issue.code === 'unrecognized_keys'
        ? `Unknown in this format: ${(issue as unknown as { keys: string[] }).keys.join(', ')}.`
        : notOurs,
  },
);
export type ExportFile = z.infer<typeof exportFileSchema>;

const exportQuery = z.strictObject({ format: z.enum(['json', 'csv']).default('json') });

const exportOf = (of: 'clips' | 'sessions' | 'athletes', words: string) =>
  endpoint({
    method: 'get',
    path: `/api/${of}/:id/export`,
    access: ['admin', 'coach', 'athlete'],
    summary: `Marks, events, readings and statistics of ${words}: JSON, or CSV tables in a zip. No film in it`,
    params: idParams,
    query: exportQuery,
    answerKind: 'bytes',
  });
export const exportClip = exportOf('clips', 'a clip');
export const exportSession = exportOf('sessions', 'a session');
export const exportAthlete = exportOf('athletes', 'an athlete');
