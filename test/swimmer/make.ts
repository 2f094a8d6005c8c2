/**
 * Makes the films and the files of their true values.
 *
 *   npx tsx test/swimmer/make.ts [--only NAME]... [--truth] [--dots]
 *
 * `--truth` writes the true values alone (no browser, no ffmpeg). `--dots` draws the true joints over the film and writes
 * it to the system's temporary folder instead: for looking at. Needs Debian's chromium and ffmpeg; neither is needed to
 * run or test the product.
 */
import { copyFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseArgs } from 'node:util';
import { CAST, type Film } from './cast';
import { openEncoder } from './encoder';
import { drawDots } from './dots';
import { openStudio, type Studio } from './render/studio';
import { trueFilm } from './true-film';

const FOLDERS = {
  demo: fileURLToPath(new URL('../../apps/api/demo-media/', import.meta.url)),
  proof: fileURLToPath(new URL('./clips/', import.meta.url)),
};

const { values } = parseArgs({
  options: {
    only: { type: 'string', multiple: true },
    truth: { type: 'boolean' },
    dots: { type: 'boolean' },
  },
});
const films = CAST.filter(({ name }) => !values.only || values.only.includes(name));
if (films.length === 0)
  throw new Error(`No film of that name. There are: ${CAST.map(({ name }) => name).join(', ')}.`);

for (const film of films) writeTruth(film);
if (!values.truth) {
  const studio = await openStudio();
  try {
    for (const film of films) await shoot(studio, film, values.dots ?? false);
  } finally {
    await studio.close();
  }
}

function writeTruth(film: Film): void {
  const { frames, ...rest } = trueFilm(film);
  const rows = (arm: 'left' | 'right'): string => frames[arm].map((row) => JSON.stringify(row)).join(',\n');
  const head = JSON.stringify(rest).slice(0, -1);
  writeFileSync(
    join(FOLDERS[film.folder], `${film.name}.truth.json`),
    `${head},\n"frames":{"left":[\n${rows('left')}\n],"right":[\n${rows('right')}\n]}}\n`,
  );
}

async function shoot(studio: Studio, film: Film, dots: boolean): Promise<void> {
  const { width, height } = film.camera;
  const making = join(tmpdir(), `${film.name}.mp4`);
  const encoder = openEncoder({
    width,
    height,
    framesPerSecond: film.framesPerSecond,
    quality: film.quality,
    target: making,
  });
  const truth = dots ? trueFilm(film) : null;
  const frames = Array.from({ length: film.frames }, (_, frame) => frame);
  let frame = 0;
  await studio.draw(film, frames, async (pixels) => {
    if (truth) drawDots(pixels, truth, frame);
    frame += 1;
    await encoder.take(pixels);
  });
  await encoder.finish();
  const target = dots ? making : join(FOLDERS[film.folder], `${film.name}.mp4`);
  if (!dots) {
    copyFileSync(making, target);
    rmSync(making);
  }
  console.log(`${target}: ${film.frames} frames`);
}
