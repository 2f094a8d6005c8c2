/**
 * Readings that follow a dragged joint, with many strokes marked, against measuring the dragged stroke alone and against
 * measuring all of them. `node scripts/bench/readings.mjs`
 */
import { pathToFileURL } from 'node:url';
import { signal } from '@angular/core';
import { register } from 'tsx/esm/api';
import { median, ms, p95, table, times } from './figures.mjs';

const STROKES = 60;
const MARKS_EACH = 12;
const STROKE_FRAMES = 80;
const DRAGS = 400;
/** Between two pictures of a screen at 60 a second. */
const FRAME_MS = 1000 / 60;

/** Runs the bench and prints its table. Answers the median and p95 of one drag step, ms. */
export async function benchReadings() {
  // One namespace for all: signals of another copy of Angular would not be followed.
  const stop = register();
  const { DeskReadings } = await import('../../apps/web/src/app/desk/state/desk-readings.ts');
  const { strokeMeasures } = await import('../../libs/geometry/measures/stroke-measures.ts');
  await stop();
  const clip = clipOf();
  const strokes = Array.from({ length: STROKES }, (_, n) => strokeOf(n));
  const timesUs = Array.from({ length: STROKES * STROKE_FRAMES + 200 }, (_, n) => Math.round((n * 1e6) / 60));
  const marks = signal(
    new Map(strokes.flatMap((stroke) => marksOf(stroke)).map((mark) => [keyOf(mark), mark])),
  );
  const readings = new DeskReadings({
    clip: signal(clip),
    timesUs: signal(timesUs),
    marks,
    strokes: signal(strokes),
  });
  readings.measures();
  const dragged = [];
  const alone = [];
  const all = [];
  for (let step = 0; step < DRAGS; step++) {
    const stroke = strokes[(step * 7) % STROKES];
    const frame = stroke.catch + 3 * (step % MARKS_EACH);
    const there = marks().get(`${stroke.arm} ${frame}`);
    const moved = { ...there, wrist: { x: there.wrist.x + 0.3, y: there.wrist.y - 0.2 } };
    const before = readings.measures().get(stroke.id);
    dragged.push(
      timed(() => {
        marks.set(new Map(marks()).set(keyOf(moved), moved));
        readings.read(moved);
        if (readings.measures().get(stroke.id) === before) throw new Error('nothing was measured');
      }),
    );
    const own = readings
      .completeMarks()
      [stroke.arm].filter((mark) => mark.frame >= stroke.catch && mark.frame <= stroke.exit);
    alone.push(timed(() => strokeMeasures(stroke, own, timesUs, readings.context())));
    if (step === 0 && !before.verticalAt.ok) throw new Error(before.verticalAt.reason);
    if (step % 20 === 0)
      all.push(
        timed(() => {
          for (const each of strokes)
            strokeMeasures(each, readings.completeMarks()[each.arm], timesUs, readings.context());
        }),
      );
  }
  const row = (name, values) => [
    name,
    ms(median(values)),
    ms(p95(values)),
    times(median(values) / median(alone)),
    `${((100 * p95(values)) / FRAME_MS).toFixed(0)} %`,
  ];
  console.log(`\nReadings following a dragged joint: ${STROKES} strokes with ${MARKS_EACH} marks each`);
  console.log(
    table(
      ['', 'median', 'p95', 'against one stroke', 'p95 of a frame (16.7 ms)'],
      [row('one step of a drag', dragged), row('that stroke alone', alone), row('all strokes', all)],
    ),
  );
  return { median: median(dragged), p95: p95(dragged) };
}

function timed(work) {
  const begun = performance.now();
  work();
  return performance.now() - begun;
}

const keyOf = ({ arm, frame }) => `${arm} ${frame}`;

function strokeOf(n) {
  const entry = 10 + Math.floor(n / 2) * STROKE_FRAMES + (n % 2) * 40;
  return {
    id: `stroke-${n}`,
    arm: n % 2 === 0 ? 'left' : 'right',
    entry,
    catch: entry + 20,
    exit: entry + 60,
    nextEntry: entry + STROKE_FRAMES,
    breath: n % 4 === 0,
    version: 1,
  };
}

function marksOf(stroke) {
  return Array.from({ length: MARKS_EACH }, (_, n) => {
    const share = (3 * n) / 40;
    const [upper, fore] = [90 - 140 * share, 75 - 115 * share].map((deg) => (deg * Math.PI) / 180);
    const shoulder = { x: 900, y: 300 };
    const elbow = { x: 900 + 110 * Math.sin(upper), y: 300 + 110 * Math.cos(upper) };
    const wrist = { x: elbow.x + 100 * Math.sin(fore), y: elbow.y + 100 * Math.cos(fore) };
    return { arm: stroke.arm, frame: stroke.catch + 3 * n, shoulder, elbow, wrist, version: 1 };
  });
}

function clipOf() {
  const plumb = { top: { x: 80, y: 100 }, bottom: { x: 84, y: 700 } };
  const jointUncertaintyPx = { shoulder: 3, elbow: 2, wrist: 2 };
  return { travel: 'right', plumb, width: 1920, height: 1080, captureRateFactor: 1, jointUncertaintyPx };
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) await benchReadings();
