import { readFileSync, statSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { registerMediabunnyServer } from '@mediabunny/server';
import { CLIP_FORMATS } from '@stillstroke/clip-index/packet-table';
import { readClipIndex } from '@stillstroke/clip-index/frame-index';
import { FilePathSource, Input, VideoSampleSink } from 'mediabunny';
import { beforeAll, describe, expect, it } from 'vitest';
import { CAST, type Film } from './cast';
import type { FilmTruth } from './model/truth';
import { trueFilm } from './true-film';

const FOLDERS = {
  demo: fileURLToPath(new URL('../../apps/api/demo-media/', import.meta.url)),
  proof: fileURLToPath(new URL('./clips/', import.meta.url)),
};
const films = CAST.map((film) => [film.name, film] as const);
const fileOf = (film: Film, ending: string): string => `${FOLDERS[film.folder]}${film.name}.${ending}`;
const keptTruth = (film: Film): FilmTruth =>
  JSON.parse(readFileSync(fileOf(film, 'truth.json'), 'utf8')) as FilmTruth;
const opened = (film: Film): Input =>
  new Input({ formats: CLIP_FORMATS, source: new FilePathSource(fileOf(film, 'mp4')) });

describe('the films in the repository', () => {
  it.each(films)('%s: the true values kept beside it are those of the model', (_, film) => {
    expect(keptTruth(film)).toEqual(JSON.parse(JSON.stringify(trueFilm(film))));
  });

  it.each(films)('%s: as many frames, as large and as fast as its true values say', async (_, film) => {
    const truth = keptTruth(film);
    const index = await readClipIndex(opened(film));
    expect(index).toMatchObject({
      width: truth.width,
      height: truth.height,
      frameRate: truth.framesPerSecond,
      codec: 'avc',
      truncated: false,
    });
    expect(index.timestampsUs).toHaveLength(truth.frameCount);
    index.timestampsUs.forEach((timeUs, frame) => {
      expect(Math.abs(timeUs - (frame * 1e6) / truth.framesPerSecond)).toBeLessThanOrEqual(1);
    });
    expect(index.keyFrames[0]).toBe(0);
    expect(index.keyFrames.length).toBeLessThan(truth.frameCount / 20);
  });

  it('of the demo are small enough to live in a repository', () => {
    const bytes = CAST.map((film) => statSync(fileOf(film, 'mp4')).size);
    expect(bytes.reduce((sum, size) => sum + size, 0)).toBeLessThan(13e6);
  });
});

/** Red and blue of a decoded frame, read at continuous picture coordinates. */
interface Picture {
  readonly warmth: (x: number, y: number) => number;
}

async function picturesOf(film: Film, frames: readonly number[]): Promise<Picture[]> {
  const track = await opened(film).getPrimaryVideoTrack();
  if (!track) throw new Error('no track');
  const sink = new VideoSampleSink(track);
  const pictures: Picture[] = [];
  for (const frame of frames) {
    const sample = await sink.getSample((frame + 0.5) / film.framesPerSecond);
    if (!sample) throw new Error(`no frame ${frame}`);
    const pixels = new Uint8Array(sample.allocationSize({ format: 'RGBA' }));
    await sample.copyTo(pixels, { format: 'RGBA' });
    const width = sample.displayWidth;
    sample.close();
    pictures.push({
      warmth: (x, y) => {
        const at = (Math.floor(y) * width + Math.floor(x)) * 4;
        return (pixels[at] ?? 0) - (pixels[at + 2] ?? 0);
      },
    });
  }
  return pictures;
}

/** Mean offset (pixels, across the forearm) of warm skin from the true line elbow to wrist. */
function offLine(picture: Picture, row: readonly number[]): number {
  const [, , ex = 0, ey = 0, wx = 0, wy = 0] = row;
  const length = Math.hypot(wx - ex, wy - ey);
  const across = { x: -(wy - ey) / length, y: (wx - ex) / length };
  let weight = 0;
  let moment = 0;
  for (let along = 0.35; along <= 0.9; along += 0.05) {
    for (let off = -24; off <= 24; off += 1) {
      const warmth = picture.warmth(
        ex + along * (wx - ex) + off * across.x,
        ey + along * (wy - ey) + off * across.y,
      );
      const skin = Math.max(0, warmth + 20);
      weight += skin;
      moment += skin * off;
    }
  }
  return weight === 0 ? Infinity : moment / weight;
}

describe('frame n of a film', () => {
  beforeAll(() => registerMediabunnyServer());

  // A film for each view and direction, with the arm that is nearer to the camera.
  it.each([
    ['lane-four', 'right'],
    ['ines-november', 'right'],
    ['tomas-autumn', 'left'],
  ] as const)(
    '%s: shows the forearm where its true values for n have it, not where they have it a frame off',
    async (name, arm) => {
      const film = CAST.find((one) => one.name === name);
      if (!film) throw new Error(`no film ${name}`);
      const truth = keptTruth(film);
      // Frames in mid-pull, where the hand is fast and clear of the trunk.
      const frames = truth.strokes
        .filter((stroke) => stroke.arm === arm && stroke.midPullUs !== null)
        .map(({ midPullUs }) => Math.round(((midPullUs ?? 0) * truth.framesPerSecond) / 1e6));
      expect(frames.length).toBeGreaterThanOrEqual(3);
      const pictures = await picturesOf(film, frames);
      pictures.forEach((picture, at) => {
        const frame = frames[at] ?? 0;
        const off = (shift: number): number =>
          Math.abs(offLine(picture, truth.frames[arm][frame + shift] ?? []));
        expect(off(0)).toBeLessThan(1.5);
        expect(off(1)).toBeGreaterThan(2 * off(0) + 1);
        expect(off(-1)).toBeGreaterThan(2 * off(0) + 1);
      });
    },
  );
});
