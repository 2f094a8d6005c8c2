import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { pointSchema, travelSchema } from '@stillstroke/contract/clip-facts';
import { armSchema } from '@stillstroke/contract/strokes';
import { z } from 'zod';

/** The films of the demo: each is `<name>.mp4` with `<name>.truth.json` beside it. */
export const FILM_NAMES = [
  'ines-july',
  'ines-october',
  'ines-november',
  'ines-november-back',
  'tomas-autumn',
  'rhona-june',
  'rhona-august',
  'rhona-november',
  'jakub-autumn',
  'mina-front',
  'wren-autumn',
  'petra-autumn',
] as const;
export type FilmName = (typeof FILM_NAMES)[number];

const COLUMNS = [
  'shoulderX',
  'shoulderY',
  'elbowX',
  'elbowY',
  'wristX',
  'wristY',
  'forearmDeg',
  'upperArmDeg',
  'elbowDeg',
  'elbowDropDeg',
] as const;

const trueStrokeSchema = z.strictObject({
  arm: armSchema,
  /** Exact times, whole microseconds of the film. */
  entryUs: z.int(),
  catchUs: z.int(),
  exitUs: z.int(),
  nextEntryUs: z.int().nullable(),
  breath: z.boolean(),
  /** Null in a front view, like the two that follow. */
  midPullUs: z.int().nullable(),
  verticalAtShare: z.number().nullable(),
  peakDrop: z.strictObject({ deg: z.number(), atUs: z.int() }).nullable(),
});
export type TrueStroke = z.infer<typeof trueStrokeSchema>;

const frameRowsSchema = z.array(z.array(z.number()).length(COLUMNS.length));

/**
 * What is true of a rendered film: joints in pixels of the picture as shown and angles (degrees, signs as everywhere in
 * the product) of both arms on every frame, exact event times, and a plumb line that hangs in the picture.
 */
export const filmTruthSchema = z.strictObject({
  version: z.literal(1),
  file: z.string(),
  width: z.int(),
  height: z.int(),
  frameCount: z.int(),
  framesPerSecond: z.number(),
  view: z.enum(['side-underwater', 'front-underwater']),
  travel: travelSchema,
  rollDeg: z.number(),
  plumb: z.strictObject({ top: pointSchema, bottom: pointSchema }),
  strokes: z.array(trueStrokeSchema),
  columns: z.tuple(COLUMNS.map((name) => z.literal(name)) as [z.ZodLiteral, ...z.ZodLiteral[]]),
  frames: z.strictObject({ left: frameRowsSchema, right: frameRowsSchema }),
});
export type FilmTruth = z.infer<typeof filmTruthSchema>;

/** Reads the true values of a film from the folder of the demo's media; throws when the file is missing or not as described. */
export function readFilmTruth(folder: string, name: FilmName): FilmTruth {
  const text = readFileSync(join(folder, `${name}.truth.json`), 'utf8');
  return filmTruthSchema.parse(JSON.parse(text));
}

/** Where the film itself lies. */
export function filmPath(folder: string, name: FilmName): string {
  return join(folder, `${name}.mp4`);
}
