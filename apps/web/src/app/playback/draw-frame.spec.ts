import { describe, expect, it } from 'vitest';
import { drawFrame, type PictureShape } from './draw-frame';

/** A stored picture of 4 × 2 fields of 10 pixels whose brightness counts up row by row. */
function stored(): OffscreenCanvas {
  const canvas = new OffscreenCanvas(40, 20);
  const context = canvas.getContext('2d');
  for (let field = 0; field < 8; field += 1) {
    const light = field * 30;
    if (context === null) continue;
    context.fillStyle = `rgb(${light} ${light} ${light})`;
    context.fillRect((field % 4) * 10, Math.floor(field / 4) * 10, 10, 10);
  }
  return canvas;
}

/** The fields as drawn, row by row. */
function drawn(shape: PictureShape, columns: number, rows: number): number[][] {
  const canvas = new OffscreenCanvas(shape.width, shape.height);
  const context = canvas.getContext('2d');
  if (context === null) throw new Error('No drawing here.');
  drawFrame(context, stored(), shape);
  return Array.from({ length: rows }, (_, row) =>
    Array.from({ length: columns }, (_, column) => {
      const x = Math.floor(((column + 0.5) * shape.width) / columns);
      const y = Math.floor(((row + 0.5) * shape.height) / rows);
      return Math.round((context.getImageData(x, y, 1, 1).data[0] ?? 0) / 30);
    }),
  );
}

const upright = { rotation: 0, mirrored: false } as const;

describe('drawFrame', () => {
  it('draws an upright picture as it is', () => {
    expect(drawn({ width: 40, height: 20, ...upright }, 4, 2)).toEqual([
      [0, 1, 2, 3],
      [4, 5, 6, 7],
    ]);
  });

  it('stretches to the size as shown', () => {
    expect(drawn({ width: 80, height: 20, ...upright }, 4, 2)).toEqual([
      [0, 1, 2, 3],
      [4, 5, 6, 7],
    ]);
  });

  it('turns clockwise', () => {
    const turned = { width: 20, height: 40, mirrored: false } as const;
    const clockwise = [
      [4, 0],
      [5, 1],
      [6, 2],
      [7, 3],
    ];
    expect(drawn({ ...turned, rotation: 90 }, 2, 4)).toEqual(clockwise);
    expect(drawn({ ...turned, rotation: 270 }, 2, 4)).toEqual(
      clockwise.map((row) => [...row].reverse()).reverse(),
    );
    expect(drawn({ width: 40, height: 20, rotation: 180, mirrored: false }, 4, 2)).toEqual([
      [7, 6, 5, 4],
      [3, 2, 1, 0],
    ]);
  });

  it('flips left to right after the turn', () => {
    expect(drawn({ width: 20, height: 40, rotation: 90, mirrored: true }, 2, 4)).toEqual([
      [0, 4],
      [1, 5],
      [2, 6],
      [3, 7],
    ]);
  });
});
