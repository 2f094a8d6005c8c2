import type { FilmTruth } from './model/truth';

const COLOURS = { left: [255, 183, 51], right: [75, 163, 219] } as const;

/** Draws the true joints of a frame as small squares into its pixels (RGBA, lowest row first). */
export function drawDots(pixels: Buffer, truth: FilmTruth, frame: number): void {
  for (const arm of ['left', 'right'] as const) {
    const row = truth.frames[arm][frame] ?? [];
    for (const joint of [0, 2, 4]) {
      const centreX = Math.floor(row[joint] ?? 0);
      const centreY = Math.floor(row[joint + 1] ?? 0);
      for (let y = centreY - 2; y <= centreY + 2; y += 1) {
        for (let x = centreX - 2; x <= centreX + 2; x += 1) paint(pixels, truth, x, y, COLOURS[arm]);
      }
    }
  }
}

function paint(
  pixels: Buffer,
  { width, height }: FilmTruth,
  x: number,
  y: number,
  colour: readonly [number, number, number],
): void {
  if (x < 0 || y < 0 || x >= width || y >= height) return;
  pixels.set(colour, ((height - 1 - y) * width + x) * 4);
}
