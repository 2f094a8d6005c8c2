import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, test } from '@playwright/test';
import { writeBigClip } from './big-clip';
import { bundlePage } from './bundle';
import { MediaServer } from './media-server';

const FOLDER = fileURLToPath(new URL('../nasty-media/', import.meta.url));
const KEYS = '/media/every-frame-a-key.mp4';
const LONG = '/media/one-key-frame.mp4';
const PAGE = fileURLToPath(new URL('corpus-page.ts', import.meta.url));
let server: MediaServer;
let scratch: string;
let bigBytes: number;

test.beforeAll(async () => {
  scratch = mkdtempSync(join(tmpdir(), 'big-clip-'));
  bigBytes = writeBigClip(`${FOLDER}every-frame-a-key.mp4`, join(scratch, 'big.mp4'), 17 * 2 ** 20);
  server = await MediaServer.start(await bundlePage(PAGE), (name) =>
    name === 'big.mp4' ? join(scratch, name) : `${FOLDER}${name}`,
  );
});

test.afterAll(async () => {
  await server.stop();
  rmSync(scratch, { recursive: true });
});

test.beforeEach(async ({ page }) => {
  server.offline = false;
  server.status = null;
  server.bytesSent = 0;
  await page.goto(server.origin);
  await page.addScriptTag({ url: '/page.js', type: 'module' });
  await page.waitForFunction(() => 'corpus' in window);
});

test('a clip of 500 MB opens and shows frames without being fetched whole', async ({ page }) => {
  expect(bigBytes).toBeGreaterThan(500e6);
  await page.evaluate(() => window.corpus.open('big', '/media/big.mp4', 4e6));
  const atOpening = server.bytesSent;
  expect(await page.evaluate(() => window.corpus.look('big', [28, 3]))).toEqual([28, 3]);
  const stats = await page.evaluate(() => window.corpus.settled('big'));
  console.log(
    `opening a clip of ${bigBytes} bytes: ${atOpening} sent; after two frames: ${server.bytesSent}`,
  );
  // What the sockets held already is counted as sent; how much that is depends on the machine.
  expect(atOpening).toBeLessThan(bigBytes / 10);
  expect(stats.bytesFetched).toBeLessThan(bigBytes / 10);
});

test('a lost connection is said, and the frame comes once it is back', async ({ page }) => {
  await page.evaluate(() => window.corpus.open('big', '/media/big.mp4', 4e6));
  // After a jump a few frames are fetched ahead, up to the eighteenth; the twenty-fifth is not among them.
  expect(await page.evaluate(() => window.corpus.look('big', [12]))).toEqual([12]);
  server.goOffline();
  expect(await page.evaluate(() => window.corpus.look('big', [25, 12]))).toEqual(['network', 12]);
  server.offline = false;
  expect(await page.evaluate(() => window.corpus.look('big', [25, 24, 12, 29]))).toEqual([25, 24, 12, 29]);
  const closed = await page.evaluate(() => window.corpus.close('big'));
  expect(closed).toMatchObject({ cachedFrames: 0, openInWorker: 0, lentFrames: 0 });
});

test('a clip that cannot be fetched is refused as a matter of the network', async ({ page }) => {
  for (const status of [401, 404, 503]) {
    server.status = status;
    expect(await page.evaluate((url) => window.corpus.refusal(url), KEYS)).toBe('network');
  }
  server.status = null;
  server.goOffline();
  expect(await page.evaluate((url) => window.corpus.refusal(url), KEYS)).toBe('network');
});

test('a newer request overtakes those that wait, and a kept one is answered all the same', async ({
  page,
}) => {
  await page.evaluate((url) => window.corpus.open('long', url, 4e6), LONG);
  const seen = await page.evaluate(() => window.corpus.burst('long', [80, 60, 40, 20, 85], false));
  expect(seen).toEqual(['aborted', 'aborted', 'aborted', 'aborted', 85]);
  expect((await page.evaluate(() => window.corpus.stats('long'))).overtaken).toBe(4);
  expect(await page.evaluate(() => window.corpus.burst('long', [5, 50, 88, 30], true))).toEqual([
    5, 50, 88, 30,
  ]);
});

test('a request can be taken back', async ({ page }) => {
  await page.evaluate((url) => window.corpus.open('long', url, 4e6), LONG);
  expect(await page.evaluate(() => window.corpus.takenBack('long', 80))).toBe('aborted');
  expect(await page.evaluate(() => window.corpus.look('long', [80]))).toEqual([80]);
});

test('lent pictures are counted until they are closed, and outlive the cache', async ({ page }) => {
  await page.evaluate((url) => window.corpus.open('long', url, 100_000), LONG);
  const frames = [10, 20, 30, 40, 50, 60];
  await page.evaluate((order) => window.corpus.hold('long', order), frames);
  const holding = await page.evaluate(() => window.corpus.settled('long'));
  expect(holding.lentFrames).toBe(frames.length);
  expect(holding.cachedBytes).toBeLessThanOrEqual(100_000);
  expect(holding.openInWorker).toBe(holding.cachedFrames);
  await page.evaluate(() => {
    window.corpus.letGo();
  });
  expect((await page.evaluate(() => window.corpus.stats('long'))).lentFrames).toBe(0);
});

test('an index that differs from the server’s is refused', async ({ page }) => {
  const refused = await page.evaluate(async (url) => {
    const index = await window.corpus.open('one', url, 4e6);
    const shifted = { ...index, timestampsUs: index.timestampsUs.map((time) => time + 1) };
    return window.corpus.open('two', url, 4e6, shifted).then(
      () => 'opened',
      (error: unknown) => (error as { code: string }).code,
    );
  }, KEYS);
  expect(refused).toBe('unreadable');
});

test('without WebCodecs, or on an insecure page, opening says why', async ({ page }) => {
  const code = () => page.evaluate((url) => window.corpus.refusal(url), KEYS);
  await page.evaluate(() => Reflect.deleteProperty(globalThis, 'VideoDecoder'));
  expect(await code()).toBe('no-webcodecs');
  await page.evaluate(() => Object.defineProperty(globalThis, 'isSecureContext', { value: false }));
  expect(await code()).toBe('insecure-context');
});
