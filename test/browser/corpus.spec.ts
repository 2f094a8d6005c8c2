import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { expect, test, type Page } from '@playwright/test';
import { FilePathSource, Input } from 'mediabunny';
import { readClipIndex, type ClipIndex } from '../../libs/clip-index/frame-index';
import { CLIP_FORMATS } from '../../libs/clip-index/packet-table';
import { bundlePage } from './bundle';
import type { Seen } from './corpus-page';
import { MediaServer } from './media-server';

interface CorpusClip {
  file: string;
  note: string;
  frames: number;
  firstNumber: number;
  damaged: number[];
  unsupported?: boolean;
}

const FOLDER = fileURLToPath(new URL('../nasty-media/', import.meta.url));
const manifest = JSON.parse(readFileSync(`${FOLDER}manifest.json`, 'utf8')) as {
  clips: CorpusClip[];
  refused: { file: string; code: string }[];
};
/** Room for some thirteen of the small pictures, so that every clip has to be let go and decoded again. */
const BUDGET = 400_000;
const table: string[] = [];
const PAGE = fileURLToPath(new URL('corpus-page.ts', import.meta.url));
let server: MediaServer;

test.beforeAll(async () => {
  server = await MediaServer.start(await bundlePage(PAGE), (name) => `${FOLDER}${name}`);
});

test.afterAll(async () => {
  await server.stop();
  console.log(['', '| file | frames | index | random | forward | back |', ...table, ''].join('\n'));
});

test.beforeEach(async ({ page }) => {
  await page.goto(server.origin);
  await page.addScriptTag({ url: '/page.js', type: 'module' });
  await page.waitForFunction(() => 'corpus' in window);
});

async function serverIndex(file: string): Promise<ClipIndex> {
  const input = new Input({ source: new FilePathSource(`${FOLDER}${file}`), formats: CLIP_FORMATS });
  const index = await readClipIndex(input);
  input.dispose();
  return index;
}

/** All frames in an order that is random and the same on every run. */
function shuffled(count: number): number[] {
  const order = Array.from({ length: count }, (_, n) => n);
  let seed = 7;
  for (let n = count - 1; n > 0; n -= 1) {
    seed = (Math.imul(seed, 1664525) + 1013904223) >>> 0;
    const other = Math.floor((seed / 2 ** 32) * (n + 1));
    [order[n], order[other]] = [order[other] ?? 0, order[n] ?? 0];
  }
  return order;
}

const look = (page: Page, name: string, frames: number[]): Promise<Seen[]> =>
  page.evaluate(([clip, order]) => window.corpus.look(clip, order), [name, frames] as const);

/** What each frame of a clip must show. */
const expected = (clip: CorpusClip, frames: number[]): Seen[] =>
  frames.map((n) => (clip.damaged.includes(n) ? 'corrupt-frame' : clip.firstNumber + n));

for (const clip of manifest.clips) {
  test(`${clip.file}: ${clip.note}`, async ({ page }) => {
    const known = await serverIndex(clip.file);
    const url = `/media/${clip.file}`;
    if (clip.unsupported === true) {
      expect(await page.evaluate((media) => window.corpus.refusal(media), url)).toBe('unsupported-codec');
      table.push(`| ${clip.file} | ${clip.frames} | equal | refused: unsupported-codec | | |`);
      return;
    }
    const index = await page.evaluate(([media, budget]) => window.corpus.open('clip', media, budget), [
      url,
      BUDGET,
    ] as const);
    const forward = Array.from({ length: clip.frames }, (_, n) => n);
    const results: Record<string, [Seen[], Seen[]]> = {};
    for (const [way, order] of [
      ['random', shuffled(clip.frames)],
      ['forward', forward],
      ['back', [...forward].reverse()],
    ] as const) {
      results[way] = [await look(page, 'clip', [...order]), expected(clip, [...order])];
    }
    const right = Object.values(results).map(
      ([seen, wanted]) => `${seen.filter((one, n) => one === wanted[n]).length}/${wanted.length}`,
    );
    const same = JSON.stringify(index) === JSON.stringify(known);
    table.push(`| ${clip.file} | ${clip.frames} | ${same ? 'equal' : 'DIFFERS'} | ${right.join(' | ')} |`);
    expect(index).toEqual(known);
    for (const [way, [seen, wanted]] of Object.entries(results)) expect(seen, way).toEqual(wanted);

    const settled = await page.evaluate(() => window.corpus.settled('clip'));
    expect(settled.lentFrames).toBe(0);
    expect(settled.openInWorker).toBe(settled.cachedFrames);
    expect(settled.cachedBytes).toBeLessThanOrEqual(BUDGET);
    const closed = await page.evaluate(() => window.corpus.close('clip'));
    expect(closed).toMatchObject({ cachedFrames: 0, cachedBytes: 0, openInWorker: 0, lentFrames: 0 });
  });
}

for (const { file } of manifest.refused) {
  test(`${file} is refused`, async ({ page }) => {
    const code = await page.evaluate((media) => window.corpus.refusal(media), `/media/${file}`);
    expect(code).toBe('unreadable');
  });
}
