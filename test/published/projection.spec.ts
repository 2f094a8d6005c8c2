import {
  apparentScale,
  elbowInSpace,
  largestDirectionError,
  lengthError,
} from '@stillstroke/geometry/calibration/projection';
import { armAngles } from '@stillstroke/geometry/angles/arm-angles';
import { valueOf } from '@stillstroke/geometry/testing/arms';
import { describe, expect, it } from 'vitest';

/** Perspective scale and orthographic projection: plain geometry, no printed source. All [CALC]. */
describe('out of the picture’s plane', () => {
  it.each([
    [5, -0.3805, 0.1092],
    [10, -1.5192, 0.4386],
    [15, -3.4074, 0.9931],
    [20, -6.0307, 1.7817],
    [30, -13.3975, 4.1172],
    [45, -29.2893, 9.8793],
    [60, -50.0, 19.4712],
  ])('tilt %d°: length %f %%, direction up to %f°', (tilt, length, direction) => {
    expect(100 * lengthError(tilt)).toBeCloseTo(length, 4);
    expect(largestDirectionError(tilt)).toBeCloseTo(direction, 4);
  });

  it.each([
    // apparent angle, elevations of upper arm and forearm, angle in space
    [120, 20, 0, 118.02432067],
    [120, 20, 20, 108.93730447],
    // Recomputed; the note of 123.95135279 was a slip in the sixth decimal.
    [120, 20, -20, 123.95135865],
    [100, -15, 30, 105.94229294],
    [150, 10, -35, 142.96136353],
    [180, 0, 30, 150],
  ])('an elbow of %d° with elevations %d° and %d° is %f°', (projected, upper, fore, space) => {
    expect(elbowInSpace(projected, upper, fore)).toBeCloseTo(space, 7);
  });

  it.each([
    // true angle; apparent one with the arm's plane turned about the upper arm by 20, 30, 45°
    [60, 58.433, 56.31, 50.768],
    [120, 121.567, 123.69, 129.232],
    [150, 151.519, 153.435, 157.792],
    [180, 180, 180, 180],
  ])('a true elbow of %d° appears as %f, %f, %f° under tilt, and back', (truth, ...apparent) => {
    for (const [at, tilt] of [20, 30, 45].entries()) {
      const [c, s] = [Math.cos((tilt * Math.PI) / 180), Math.sin((tilt * Math.PI) / 180)];
      // Upper arm along the tilt axis; the forearm's other component is shortened by cos(tilt).
      const along = Math.cos((truth * Math.PI) / 180);
      const across = Math.sin((truth * Math.PI) / 180);
      const elbow = { x: 0, y: 0 };
      const mark = {
        shoulder: { x: 100, y: 0 },
        elbow,
        wrist: { x: 100 * along, y: 100 * across * c + 1e-9 },
      };
      const read = valueOf(armAngles(mark, { travel: 'right', plumb: null })).elbowDeg;
      expect(read).toBeCloseTo(apparent[at] ?? NaN, 3);
      const out = (Math.asin(across * s) * 180) / Math.PI;
      expect(elbowInSpace(read, 0, out)).toBeCloseTo(truth, 4);
    }
  });
});

it.each([
  [3, -0.5, 0.85714],
  [3, 0.5, 1.2],
  [5, -0.3, 0.9434],
  [5, 0.2, 1.04167],
  [8, 0.3, 1.03896],
  [10, 0.5, 1.05263],
])('%f m away, %f m nearer: scale %f', (distance, nearer, scale) => {
  expect(apparentScale(distance, nearer)).toBeCloseTo(scale, 5);
});
