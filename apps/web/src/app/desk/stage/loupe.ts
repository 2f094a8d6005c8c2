import { type Size, type StagePoint, stagePoint } from './spaces';
import type { PointerKind } from '../tools/tool-port';

/** Diameter, CSS pixels. */
export const LOUPE_SIDE = 148;
const PAD = 14;
/** From the pointer to the loupe's edge for a mouse. */
const BESIDE = 34;

/**
 * CSS pixels per picture pixel in the loupe, 4 to 8; null where the stage itself shows as much.
 *
 * @param scale CSS pixels per picture pixel on the stage
 */
export function loupeScale(scale: number): number | null {
  if (scale >= 8) return null;
  return Math.min(8, Math.max(4, Math.round(scale * 4)));
}

/**
 * Top left corner of the loupe on the stage. Beside a mouse pointer, on the side where there is room; away from a finger
 * in the upper corner that is farther from it, since a hand hides what is below it.
 */
export function loupePlace(pointer: StagePoint, kind: PointerKind, stage: Size): StagePoint {
  if (kind !== 'mouse') {
    const atLeft = pointer.x > stage.width / 2;
    return stagePoint(atLeft ? PAD : stage.width - LOUPE_SIDE - PAD, PAD);
  }
  const right = pointer.x + BESIDE;
  const left = right + LOUPE_SIDE + PAD <= stage.width ? right : pointer.x - BESIDE - LOUPE_SIDE;
  const above = pointer.y - BESIDE - LOUPE_SIDE;
  const top = above >= PAD ? above : pointer.y + BESIDE;
  return stagePoint(Math.max(0, left), Math.max(0, Math.min(top, stage.height - LOUPE_SIDE)));
}

/** Draws the crosshair over the loupe's pixels, the joint's point in the middle; `ratio` device pixels per CSS pixel. */
export function drawLoupeCross(
  context: CanvasRenderingContext2D,
  colour: string,
  casing: string,
  ratio: number,
): void {
  const side = LOUPE_SIDE * ratio;
  const middle = side / 2;
  const gap = 7 * ratio;
  context.setTransform(1, 0, 0, 1, 0, 0);
  for (const [stroke, width] of [
    [casing, 3],
    ['#ffffff', 1],
  ] as const) {
    context.beginPath();
    for (const turn of [-1, 1]) {
      context.moveTo(middle + turn * gap, middle);
      context.lineTo(middle + turn * middle * 0.8, middle);
      context.moveTo(middle, middle + turn * gap);
      context.lineTo(middle, middle + turn * middle * 0.8);
    }
    context.strokeStyle = stroke;
    context.globalAlpha = stroke === casing ? 0.5 : 0.9;
    context.lineWidth = width * ratio;
    context.stroke();
  }
  context.globalAlpha = 1;
  context.fillStyle = colour;
  context.fillRect(middle - ratio, middle - ratio, 2 * ratio, 2 * ratio);
}
