/**
 * Steps, seeks and opening of the frame source against `<video>` and raw decoding, in one browser and run.
 * `node scripts/bench/frames.mjs [part of a clip's file name]`
 */
import { fileURLToPath } from 'node:url';
import { chromium } from '@playwright/test';
import { tsImport } from 'tsx/esm/api';
import { clips, prepareClips } from './clips.mjs';
import { median, ms, p95, pairedRatio, table, times } from './figures.mjs';

/** Memory for decoded pictures, as the Desk asks for on a machine of 8 GB. */
const BUDGET = 384 * 2 ** 20;

/** Runs the bench and prints its tables. Answers the figures by clip. */
export async function benchFrames({ only = '' } = {}) {
  const wanted = clips.filter((clip) => clip.file.includes(only));
  const fileOf = await prepareClips(wanted);
  const { MediaServer } = await tsImport('../../test/browser/media-server.ts', import.meta.url);
  const { bundlePage } = await tsImport('../../test/browser/bundle.ts', import.meta.url);
  const page = fileURLToPath(new URL('./frames-page.ts', import.meta.url));
  const server = await MediaServer.start(await bundlePage(page), fileOf);
  const browser = await chromium.launch({
    executablePath: process.env.CHROME_BIN ?? '/usr/bin/chromium',
    args: ['--no-sandbox', '--headless', '--disable-gpu', '--disable-background-networking'],
  });
  try {
    const results = {};
    for (const clip of wanted) {
      const durations = await measure(browser, server.origin, clip);
      results[clip.file] = report(clip, durations);
    }
    return results;
  } finally {
    await browser.close();
    await server.stop();
  }
}

async function measure(browser, origin, clip) {
  const page = await browser.newPage();
  await page.goto(origin);
  await page.addScriptTag({ url: '/page.js', type: 'module' });
  await page.waitForFunction(() => 'bench' in window);
  const durations = await page.evaluate(
    ([url, samples, budget]) => window.bench(url, samples, budget),
    [`/media/${clip.file}`, clip.samples, BUDGET],
  );
  await page.close();
  return durations;
}

function report(clip, d) {
  const row = (name, values) => [name, ms(median(values)), ms(p95(values)), String(values.length)];
  const rows = [
    row(`open ${clip.shape.frames} frames`, d.open),
    row('step forward, frame ready', d.forwardReady),
    row('step forward, painted', d.forwardPainted),
    row('step back, frame ready', d.backReady),
    row('step back, painted', d.backPainted),
    row('drawing alone', d.drawing),
    row('cold random seek', d.seek),
    row('raw decoding from the key frame', d.rawSeek),
    row('<video> one frame back, arrived', d.videoBack),
    row('<video> one frame back, painted', d.videoBackPainted),
  ];
  const cold = pairedRatio(d.seek, d.rawSeek);
  const ready = median(d.videoBack) / median(d.backReady);
  const back = median(d.videoBackPainted) / median(d.backPainted);
  const drawingBack = d.drawing.slice(d.forwardPainted.length);
  const above = p95(d.backPainted.map((painted, n) => painted - drawingBack[n]));
  console.log(`\n${clip.name}\n${table(['', 'median', 'p95', 'n'], rows)}`);
  console.log(
    `cold random seek against raw decoding: median ${times(cold.median)}, p95 ${times(cold.p95)} (goal ≤ 1.25×)`,
  );
  console.log(
    `step back against <video>: ready ${times(ready)}, painted ${times(back)} as fast (goal ≥ 20×)`,
  );
  console.log(
    `step back, painted, above drawing the same frame again: p95 ${ms(above)} (goal ≤ one display frame, 16.7 ms)`,
  );
  return { cold, ready, back, above, durations: d };
}

if (process.argv[1] === fileURLToPath(import.meta.url)) await benchFrames({ only: process.argv[2] ?? '' });
