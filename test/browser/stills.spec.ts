import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, test, type Page } from '@playwright/test';
import { Jimp } from 'jimp';
import { remakePicture } from '../../apps/api/src/media/remake-picture';
import { readNumber } from '../nasty-media/number-code.mjs';
import { bundlePage } from './bundle';
import { MediaServer } from './media-server';
import type { StillWish } from './stills-page';

const FOLDER = fileURLToPath(new URL('../nasty-media/', import.meta.url));
interface CorpusClip {
  file: string;
  note: string;
  frames: number;
  firstNumber: number;
  damaged: number[];
  unsupported?: boolean;
}
const { clips } = JSON.parse(readFileSync(`${FOLDER}manifest.json`, 'utf8')) as { clips: CorpusClip[] };
let server: MediaServer;
let folder: string;

test.beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'stillstroke-stills-'));
  const page = fileURLToPath(new URL('stills-page.ts', import.meta.url));
  server = await MediaServer.start(await bundlePage(page), (name) => `${FOLDER}${name}`);
});
test.afterAll(async () => {
  await server.stop();
  rmSync(folder, { recursive: true, force: true });
});
test.beforeEach(async ({ page }) => {
  await page.goto(server.origin);
  await page.addScriptTag({ url: '/page.js', type: 'module' });
  await page.waitForFunction(() => 'stills' in window);
});

/** A still as it is kept: made in the browser, and made anew by the server. */
async function kept(page: Page, file: string, wish: StillWish) {
  const made = await page.evaluate(([url, what]) => window.stills.make(url, what), [
    `/media/${file}`,
    wish,
  ] as const);
  const [came, done] = [join(folder, 'came'), join(folder, 'done')];
  writeFileSync(came, Buffer.from(made, 'base64'));
  const size = await remakePicture(came, done);
  const { bitmap } = await Jimp.read(done);
  expect(size).toEqual({ width: bitmap.width, height: bitmap.height });
  return bitmap;
}
type Bitmap = Awaited<ReturnType<typeof kept>>;

/** The number that a part of a still shows. */
function numberIn({ data, width }: Bitmap, left: number, partWidth: number, height: number): number | null {
  return readNumber(partWidth, height, (x, y) => data[(y * width + left + x) * 4 + 1] ?? 0);
}

for (const { file, note, frames, firstNumber, damaged, unsupported } of clips) {
  if (unsupported === true) continue;
  test(`a still of ${file} (${note}) is the frame that it claims to be`, async ({ page }) => {
    const sound = Array.from({ length: frames }, (_, n) => n).filter((n) => !damaged.includes(n));
    const at = (share: number) => sound[Math.floor(share * (sound.length - 1))] ?? 0;
    for (const frame of [at(0), at(0.37), at(0.71), at(1)]) {
      const still = await kept(page, file, { frames: [frame] });
      expect(numberIn(still, 0, still.width, still.height), `frame ${frame}`).toBe(firstNumber + frame);
    }
    const pair = [at(0.62), at(0.2)];
    const still = await kept(page, file, { frames: pair });
    const gap = Math.round(still.height * 0.012);
    const part = (still.width - gap) / 2;
    expect([numberIn(still, 0, part, still.height), numberIn(still, part + gap, part, still.height)]).toEqual(
      pair.map((frame) => firstNumber + frame),
    );
  });
}

test('marked arms are drawn on their joints, within a pixel, also after the server has made the picture anew', async ({
  page,
}) => {
  const [clip] = clips;
  if (!clip) throw new Error('the corpus is empty');
  const joints = { shoulder: { x: 40, y: 30 }, elbow: { x: 80, y: 50 }, wrist: { x: 104, y: 84 } };
  const angles = { forearmDeg: 35, upperArmDeg: 63, elbowDeg: 152, elbowDropDeg: 3 };
  const mark = {
    arm: 'right',
    frame: 9,
    ...joints,
    angles,
    uncertaintyDeg: angles,
    plumbAssumed: false,
    version: 1,
    updatedAt: '2026-11-28T10:00:00.000Z',
  } as const;
  const still = await kept(page, clip.file, { frames: [9], marks: [mark] });
  const bare = await kept(page, clip.file, { frames: [9] });
  // The wrist is a disc of the arm's colour, six pixels in radius and one for half its rim, in a dark casing.
  const length = Math.hypot(joints.wrist.x - joints.elbow.x, joints.wrist.y - joints.elbow.y);
  const along = {
    x: (joints.wrist.x - joints.elbow.x) / length,
    y: (joints.wrist.y - joints.elbow.y) / length,
  };
  const isBlue = ({ data, width }: Bitmap, x: number, y: number) => {
    const [red, , blue] = data.subarray((y * width + x) * 4);
    return (blue ?? 0) - (red ?? 0) > 75;
  };
  const reach = (direction: { x: number; y: number }, bitmap: Bitmap) => {
    const seen: number[] = [0];
    for (let y = 70; y < 100; y += 1)
      for (let x = 90; x < 118; x += 1)
        if (isBlue(bitmap, x, y))
          seen.push((x + 0.5 - joints.wrist.x) * direction.x + (y + 0.5 - joints.wrist.y) * direction.y);
    return Math.max(...seen);
  };
  expect(reach(along, bare)).toBe(0);
  expect(Math.abs(reach(along, still) - 7)).toBeLessThan(1);
  const across = { x: along.y, y: -along.x };
  const back = { x: -along.y, y: along.x };
  expect(Math.abs(reach(across, still) - reach(back, still))).toBeLessThan(2);
});
