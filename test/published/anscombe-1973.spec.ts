import { robustSlope } from '@stillstroke/geometry/trend/robust-slope';
import { slopeOf } from '@stillstroke/geometry/trend/slope';
import { valueOf } from '@stillstroke/geometry/testing/arms';
import { expect, it } from 'vitest';

/** Anscombe's first quartet, R's datasets::anscombe: data [MEM], values [CALC]. */
const X = [10, 8, 13, 9, 11, 14, 6, 4, 12, 7, 5];
const Y = [8.04, 6.95, 7.58, 8.81, 8.33, 9.96, 7.24, 4.26, 10.84, 4.82, 5.68];

it('slope, intercept, explained share, robust slope [CALC]', () => {
  const points = X.map((x, i) => ({ x, y: Y[i] ?? NaN }));
  const line = valueOf(slopeOf(points));
  expect(line.slope).toBeCloseTo(0.50009091, 8);
  expect(line.scatter).toBeCloseTo(0.1179055, 8);
  expect(line.intercept).toBeCloseTo(3.00009091, 8);
  expect(line.explained).toBeCloseTo(0.66654246, 8);
  expect(valueOf(robustSlope(points)).slope).toBeCloseTo(0.50166667, 8);
});
