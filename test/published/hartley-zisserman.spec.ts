import {
  homography,
  localScale,
  mapPoint,
  type PointPair,
} from '@stillstroke/geometry/calibration/homography';
import { reasonOf, valueOf } from '@stillstroke/geometry/testing/arms';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

/**
 * Planar homography (2-D DLT). Abdel-Aziz YI, Karara HM (1971) [MEM]; Hartley R, Zisserman A, Multiple View Geometry,
 * ch. 4 [MEM]; closed form unit square → quad: Heckbert PS (1989) [MEM]. All figures [CALC].
 */
function pairsOf(rows: readonly (readonly [number, number, number, number])[]): PointPair[] {
  return rows.map(([x, y, X, Y]) => ({ picture: { x, y }, plane: { x: X, y: Y } }));
}

function expectMatrix(actual: readonly number[], expected: readonly number[], digits: number): void {
  expect(actual).toHaveLength(9);
  for (const [at, value] of expected.entries()) expect(actual[at], `entry ${at}`).toBeCloseTo(value, digits);
}

describe('example 1, exact rationals', () => {
  const known = valueOf(
    homography(
      pairsOf([
        [100, 520, 0, 0],
        [9000 / 11, 5400 / 11, 2, 0],
        [23000 / 27, 4000 / 27, 2, 1],
        [6000 / 49, 1000 / 7, 0, 1],
      ]),
    ),
  );

  it('recovers the matrix both ways', () => {
    expectMatrix(known.toPicture, [400, 20, 100, 10, -380, 520, 0.05, -0.02, 1], 8);
    const back = [
      0.002428383706, 0.000144546649, -0.318002628121, -0.000105124836, -0.002595269382, 1.360052562418,
      -0.000123521682, -0.00005913272, 1,
    ];
    expectMatrix(known.toPlane, back, 11);
  });

  it.each([
    [1, 0.5, 6375 / 13, 4250 / 13],
    [0.5, 0.25, 15250 / 51, 21500 / 51],
    [1.5, 0.75, 35750 / 53, 12500 / 53],
  ])('maps (%f, %f) m', (X, Y, x, y) => {
    const seen = mapPoint(known.toPicture, { x: X, y: Y });
    expect(seen?.x).toBeCloseTo(x, 8);
    expect(seen?.y).toBeCloseTo(y, 8);
  });

  it('says nothing about accuracy with four points', () => {
    expect(known.rmsM).toBeNull();
    expect(Math.max(...known.residualsM)).toBeLessThan(1e-9);
  });
});

describe('example 2', () => {
  const known = valueOf(
    homography(
      pairsOf([
        [100, 500, 0, 0],
        [900, 540, 2, 0],
        [860, 140, 2, 1],
        [140, 160, 0, 1],
      ]),
    ),
  );

  it('both matrices', () => {
    const toPlane = [
      0.003547618851, 0.000417366924, -0.563445346845, 0.000159920743, -0.003198414867, 1.583215359015,
      0.000258770804, 0.000360187324, 1,
    ];
    expectMatrix(known.toPlane, toPlane, 11);
    const toPicture = [
      330.193905817, 54.349030471, 100, -21.88365651, -323.601108033, 500, -0.077562327, 0.102493075, 1,
    ];
    expectMatrix(known.toPicture, toPicture, 8);
  });

  it.each([
    [500, 330, 1.079990520061, 0.486841721281],
    [300, 300, 0.528006256197, 0.566479073859],
    [700, 400, 1.574714606405, 0.313755950472],
  ])('(%d, %d) px', (x, y, X, Y) => {
    const seen = mapPoint(known.toPlane, { x, y });
    expect(seen?.x).toBeCloseTo(X, 10);
    expect(seen?.y).toBeCloseTo(Y, 10);
  });

  it('the middle of the rectangle is where the diagonals cross in the picture', () => {
    const middle = mapPoint(known.toPicture, { x: 1, y: 0.5 });
    expect(middle?.x).toBeCloseTo(469.72972973, 8);
    expect(middle?.y).toBeCloseTo(324.864864865, 8);
    const onDiagonal = (ax: number, ay: number, bx: number, by: number) =>
      (bx - ax) * ((middle?.y ?? NaN) - ay) - (by - ay) * ((middle?.x ?? NaN) - ax);
    expect(onDiagonal(100, 500, 860, 140) / 1e5).toBeCloseTo(0, 9);
    expect(onDiagonal(900, 540, 140, 160) / 1e5).toBeCloseTo(0, 9);
  });

  it('scale differs from place to place', () => {
    const scale = localScale(known.toPlane, { x: 500, y: 330 });
    for (const [at, value] of [0.00261819036, 0.00002272629, 0.000027190383, -0.002702805207].entries()) {
      expect(scale[at]).toBeCloseTo(value, 10);
    }
    const area = (x: number, y: number) => {
      const [a, b, c, d] = localScale(known.toPlane, { x, y });
      return 1 / Math.sqrt(Math.abs(a * d - b * c));
    };
    expect(area(500, 330)).toBeCloseTo(375.9006, 4);
    expect(area(300, 300)).toBeCloseTo(347.9986, 4);
    expect(area(700, 400)).toBeCloseTo(411.1984, 4);
    expect(1000 * 2 * Math.hypot(scale[0], scale[1])).toBeCloseTo(5.2366, 4);
    expect(1000 * 2 * Math.hypot(scale[2], scale[3])).toBeCloseTo(5.4059, 4);
  });
});

it('six points by least squares: the residual of about 1.41 mm', () => {
  const read = valueOf(
    homography(
      pairsOf([
        [100.5, 519.5, 0, 0],
        [475.69, 505.262, 1, 0],
        [818.682, 491.409, 2, 0],
        [121.949, 142.357, 0, 1],
        [505.354, 145.131, 1, 1],
        [851.352, 148.648, 2, 1],
      ]),
    ),
  );
  // The oracle solves in raw coordinates with the last entry fixed at 1, ours in centred ones: the weights differ a little.
  expect(Math.abs(1000 * (read.rmsM ?? NaN) - 1.41184)).toBeLessThan(0.02);
  const raw = [
    0.002428603795, 0.000142230803, -0.31719341296, -0.000101477759, -0.002592868099, 1.357592827422,
    -0.000123373534, -0.000058903102, 1,
  ];
  for (const [at, value] of raw.entries())
    expect(Math.abs((read.toPlane[at] ?? NaN) / value - 1)).toBeLessThan(0.02);
});

describe('there and back', () => {
  const offset = fc.double({ min: -60, max: 60, noNaN: true });
  const corner = fc.tuple(offset, offset);

  it('for any picture of a rectangle', () => {
    fc.assert(
      fc.property(
        corner,
        corner,
        corner,
        corner,
        fc.tuple(fc.nat(100), fc.nat(100)),
        (a, b, c, d, [u, v]) => {
          const known = valueOf(
            homography(
              pairsOf([
                [200 + a[0], 800 + a[1], 0, 0],
                [1500 + b[0], 800 + b[1], 3, 0],
                [1500 + c[0], 200 + c[1], 3, 1.5],
                [200 + d[0], 200 + d[1], 0, 1.5],
              ]),
            ),
          );
          const plane = { x: (3 * u) / 100, y: (1.5 * v) / 100 };
          const seen = mapPoint(known.toPicture, plane);
          const back = seen && mapPoint(known.toPlane, seen);
          expect(back?.x).toBeCloseTo(plane.x, 8);
          expect(back?.y).toBeCloseTo(plane.y, 8);
        },
      ),
    );
  });

  it('refuses points that fix no plane', () => {
    const line = [0, 1, 2, 3].map((i): [number, number, number, number] => [i * 100, i * 50, i, i / 2]);
    expect(reasonOf(homography(pairsOf(line)))).toBe('points-in-line');
    expect(reasonOf(homography(pairsOf(line.slice(0, 3))))).toBe('too-few-points');
    expect(
      reasonOf(
        homography(
          pairsOf([
            [1, 1, 1, 1],
            [1, 1, 1, 1],
            [1, 1, 1, 1],
            [1, 1, 1, 1],
          ]),
        ),
      ),
    ).toBe('points-in-line');
    expect(reasonOf(homography(pairsOf([[1, 1, 1, NaN], ...line.slice(0, 3)])))).toBe('not-finite');
    const three: [number, number, number, number][] = [
      [0, 0, 0, 0],
      [100, 0, 1, 0],
      [200, 0, 2, 0],
      [100, 100, 1, 1],
    ];
    expect(reasonOf(homography(pairsOf(three)))).toBe('points-in-line');
  });
});
