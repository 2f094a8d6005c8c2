import { createHash } from 'node:crypto';
import { existsSync } from 'node:fs';
import { copyFile, open, readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { dropFolder, filmPath as placeOfFilm, openIncoming, posterPath } from '../media/clip-store';
import type { RecognisedFilm } from '../media/add-film';
import { makePoster, recogniseFilm } from '../media/recognise';
import type { AppContext } from '../platform/context';
import { filmPath, readFilmTruth, type FilmName, type FilmTruth } from './film-truth';
import type { DemoClip } from './season';

type Context = Pick<AppContext, 'settings'>;
type Known = Pick<RecognisedFilm, 'index' | 'hasPoster'>;

/** A film of the demo, recognised once however many sessions show it. */
export interface DemoFilm extends Known {
  readonly bytes: Buffer;
  readonly poster: Buffer | null;
  readonly truth: FilmTruth;
}

/** The demo is ours: limits that an operator sets for uploads are not meant for it. */
const unlimited = { clipBytes: Infinity, clipMinutes: Infinity, pictureSide: Infinity };

/** Recognises a film of the demo as an upload would be; null when it is not there. */
export async function recogniseDemoFilm(
  context: Context,
  media: string,
  name: FilmName,
): Promise<DemoFilm | null> {
  const film = filmPath(media, name);
  if (!existsSync(film)) return null;
  const folder = openIncoming(context.settings);
  try {
    await copyFile(film, placeOfFilm(folder));
    const index = await recogniseFilm(folder, unlimited);
    const hasPoster = await makePoster(folder, index);
    return {
      index,
      hasPoster,
      bytes: await readFile(film),
      poster: hasPoster ? await readFile(posterPath(folder)) : null,
      truth: readFilmTruth(media, name),
    };
  } finally {
    await dropFolder(folder);
  }
}

/** A clip of the demo whose film waits in a folder of its own to be kept. */
export interface WaitingClip {
  readonly incoming: string;
  readonly film: RecognisedFilm;
  readonly truth: FilmTruth;
}

/**
 * Lays out the film of one clip. Several sessions show the same film: each gets a closing `free` box (ISO/IEC 14496-12,
 * §8.1.2) of its own, so that they are different files of the same pictures, as films of different days are.
 */
export async function layOutClip(
  context: Context,
  { bytes, poster, truth, index, hasPoster }: DemoFilm,
  clip: DemoClip,
): Promise<WaitingClip> {
  const incoming = openIncoming(context.settings);
  const content = Buffer.concat([bytes, freeBox(clip.name)]);
  await writeDurably(placeOfFilm(incoming), content);
  if (poster) await writeDurably(posterPath(incoming), poster);
  return {
    incoming,
    truth,
    film: {
      name: clip.name,
      fields: { view: truth.view, travel: truth.travel, stroke: clip.stroke, captureRateFactor: 1 },
      sizeBytes: content.length,
      sha256: createHash('sha256').update(content).digest('hex'),
      index,
      hasPoster,
    },
  };
}

function freeBox(content: string): Buffer {
  const text = Buffer.from(content, 'utf8');
  const head = Buffer.alloc(8);
  head.writeUInt32BE(8 + text.length, 0);
  head.write('free', 4, 'latin1');
  return Buffer.concat([head, text]);
}

async function writeDurably(path: string, content: Buffer): Promise<void> {
  const file = await open(path, 'wx');
  try {
    await file.writeFile(content);
    await file.sync();
  } finally {
    await file.close();
  }
}

/** The folder of the demo's films, beside the source or seen from the bundle. */
export function demoMediaFolder(): string {
  const places = [
    join(import.meta.dirname, '../../demo-media'),
    join(import.meta.dirname, '../../apps/api/demo-media'),
  ];
  return places.find((place) => existsSync(place)) ?? join(process.cwd(), 'apps/api/demo-media');
}
