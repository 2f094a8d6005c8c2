import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { reasonOf, valueOf } from '../testing/arms';
import { measuredDistance, scaleCheck } from './measured-distance';
import { checkKnown, checkScale, fitScale, type PictureScale } from './picture-scale';
import { planeVector } from './plane-vector';
import { checkQuad, type Quad } from './quad';

const picture = { width: 1000, height: 600 };
const length: PictureScale = {
  kind: 'length',
  plane: 'swimmer',
  from: { x: 100, y: 300 },
  to: { x: 500, y: 300 },
  metres: 2,
  uncertaintyM: 0,
};
/** Example 2 of the homography's published check: 2 m by 1 m. */
const rectangle: PictureScale = {
  kind: 'rectangle',
  plane: 'wall',
  corners: [
    { x: 100, y: 500 },
    { x: 900, y: 540 },
    { x: 860, y: 140 },
    { x: 140, y: 160 },
  ],
  widthM: 2,
  heightM: 1,
  uncertaintyM: 0,
};
const placing = { from: 1, to: 1 };
const fitted = (scale: PictureScale, px = 1) => valueOf(fitScale(scale, px));

describe('a known length', () => {
  it('gives metres with the uncertainty of both its ends and of the places measured', () => {
    const read = valueOf(measuredDistance(fitted(length), { x: 200, y: 100 }, { x: 400, y: 100 }, placing));
    expect(read.metres).toBeCloseTo(1, 12);
    // Scale: √2/400 of it; places: √2/200 of it.
    expect(read.uncertaintyM).toBeCloseTo(Math.hypot(Math.SQRT2 / 400, Math.SQRT2 / 200), 6);
    const loose = valueOf(
      measuredDistance(
        fitted({ ...length, uncertaintyM: 0.1 }),
        { x: 200, y: 100 },
        { x: 400, y: 100 },
        placing,
      ),
    );
    expect(loose.uncertaintyM).toBeCloseTo(Math.hypot(read.uncertaintyM, 0.05), 5);
  });

  it('is refused by name where it is none', () => {
    const of = (more: object) => reasonOf(checkScale({ ...length, ...more }, picture));
    expect(of({ metres: 0 })).toBe('not-positive');
    expect(of({ metres: -1 })).toBe('not-positive');
    expect(of({ metres: 201 })).toBe('too-long');
    expect(of({ metres: Infinity })).toBe('not-finite');
    expect(of({ uncertaintyM: -0.1 })).toBe('not-positive');
    expect(of({ to: { x: 104, y: 303 } })).toBe('too-short');
    expect(of({ to: { x: NaN, y: 303 } })).toBe('not-finite');
    expect(of({ to: { x: 1600, y: 303 } })).toBe('outside-picture');
    expect(checkScale({ ...length, to: { x: 1400, y: 303 } }, picture).ok).toBe(true);
    expect(reasonOf(checkKnown({ from: length.from, to: length.from, metres: 1 }, picture))).toBe(
      'too-short',
    );
  });
});

describe('a rectangle', () => {
  it('measures its own sides and diagonals exactly, which says nothing about accuracy', () => {
    const [a, b, c] = rectangle.corners;
    expect(valueOf(measuredDistance(fitted(rectangle), a, b, placing)).metres).toBeCloseTo(2, 9);
    expect(valueOf(measuredDistance(fitted(rectangle), b, c, placing)).metres).toBeCloseTo(1, 9);
    expect(valueOf(measuredDistance(fitted(rectangle), a, c, placing)).metres).toBeCloseTo(Math.sqrt(5), 9);
  });

  it('measures between the points of the published example', () => {
    const [X1, Y1, X2, Y2] = [0.528006256197, 0.566479073859, 1.574714606405, 0.313755950472];
    const read = valueOf(
      measuredDistance(fitted(rectangle), { x: 300, y: 300 }, { x: 700, y: 400 }, placing),
    );
    expect(read.metres).toBeCloseTo(Math.hypot(X2 - X1, Y2 - Y1), 9);
    expect(read.uncertaintyM).toBeGreaterThan(0);
  });

  it('a place of one pixel alone: the published metres for two pixels, halved', () => {
    const at = { x: 500, y: 330 };
    const none = { from: 0, to: 1 };
    const read = valueOf(measuredDistance(fitted(rectangle, 0), { x: 400, y: 330 }, at, none));
    // u_X = 5.2366 mm for 2 px; the line runs along X almost exactly.
    expect(read.uncertaintyM * 1000).toBeCloseTo(5.2366 / 2, 1);
  });

  it.each<[string, Quad]>([
    [
      'corners-cross',
      [
        { x: 100, y: 100 },
        { x: 400, y: 400 },
        { x: 400, y: 100 },
        { x: 100, y: 400 },
      ],
    ],
    [
      'corners-not-convex',
      [
        { x: 100, y: 100 },
        { x: 400, y: 100 },
        { x: 200, y: 200 },
        { x: 100, y: 400 },
      ],
    ],
    [
      'corners-in-line',
      [
        { x: 100, y: 100 },
        { x: 250, y: 100 },
        { x: 400, y: 100 },
        { x: 250, y: 400 },
      ],
    ],
    [
      'corners-too-close',
      [
        { x: 100, y: 100 },
        { x: 105, y: 100 },
        { x: 400, y: 400 },
        { x: 100, y: 400 },
      ],
    ],
    [
      'corners-too-close',
      [
        { x: 100, y: 100 },
        { x: 400, y: 100 },
        { x: 100, y: 100 },
        { x: 100, y: 400 },
      ],
    ],
  ])('is refused as %s', (reason, corners) => {
    expect(reasonOf(checkQuad(corners))).toBe(reason);
    expect(reasonOf(checkScale({ ...rectangle, corners }, picture))).toBe(reason);
  });

  it('is the same walked round the other way, ahead and down included', () => {
    const [a, b, c, d] = rectangle.corners;
    const other: PictureScale = { ...rectangle, corners: [d, c, b, a] };
    const points = [
      { x: 300, y: 300 },
      { x: 500, y: 420 },
    ] as const;
    const [one, two] = [rectangle, other].map((scale) =>
      valueOf(planeVector(fitted(scale).toPlane, points[0], points)),
    );
    expect(one?.along).toBeCloseTo(two?.along ?? NaN, 9);
    expect(one?.across).toBeCloseTo(two?.across ?? NaN, 9);
    expect(one?.along).toBeGreaterThan(0);
    expect(one?.across).toBeGreaterThan(0);
  });

  it('refuses places where the plane does not reach', () => {
    const slanted: PictureScale = {
      ...rectangle,
      corners: [
        { x: 200, y: 550 },
        { x: 800, y: 550 },
        { x: 550, y: 350 },
        { x: 450, y: 350 },
      ],
    };
    // The sides meet at y = 310: the floor's horizon.
    expect(reasonOf(measuredDistance(fitted(slanted), { x: 500, y: 500 }, { x: 500, y: 300 }, placing))).toBe(
      'beyond-the-plane',
    );
    expect(measuredDistance(fitted(slanted), { x: 500, y: 500 }, { x: 500, y: 330 }, placing).ok).toBe(true);
  });

  it('is there and back: distances of any seen rectangle keep their shares', () => {
    const near = fc.double({ min: -60, max: 60, noNaN: true });
    const corner = fc.record({ x: near, y: near });
    fc.assert(
      fc.property(corner, corner, corner, corner, (a, b, c, d) => {
        const moved: Quad = [
          { x: 200 + a.x, y: 500 + a.y },
          { x: 800 + b.x, y: 500 + b.y },
          { x: 800 + c.x, y: 100 + c.y },
          { x: 200 + d.x, y: 100 + d.y },
        ];
        const scale: PictureScale = { ...rectangle, corners: moved, widthM: 3, heightM: 2 };
        expect(checkScale(scale, picture).ok).toBe(true);
        const diagonal = valueOf(measuredDistance(fitted(scale), moved[0], moved[2], placing));
        expect(diagonal.metres).toBeCloseTo(Math.sqrt(13), 8);
        expect(Number.isFinite(diagonal.uncertaintyM) && diagonal.uncertaintyM > 0).toBe(true);
      }),
    );
  });
});

describe('a second known length', () => {
  it('agrees within what placing may produce, else shows by how much it is off in metres and pixels', () => {
    const known = { from: { x: 100, y: 100 }, to: { x: 300, y: 100 }, metres: 1 };
    const fits = valueOf(scaleCheck(fitted(length), known, 1));
    expect(fits.differenceM).toBeCloseTo(0, 12);
    expect(fits.agrees).toBe(true);
    const off = valueOf(scaleCheck(fitted(length), { ...known, metres: 0.9 }, 1));
    expect(off.differenceM).toBeCloseTo(0.1, 12);
    expect(off.differencePx).toBeCloseTo(20, 9);
    expect(off.agrees).toBe(false);
  });
});
