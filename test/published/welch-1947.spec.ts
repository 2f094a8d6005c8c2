import { compareArms } from '@stillstroke/geometry/statistics/compare-arms';
import { hedgesG } from '@stillstroke/geometry/statistics/effect-size';
import { welch } from '@stillstroke/geometry/statistics/welch';
import { valueOf } from '@stillstroke/geometry/testing/arms';
import { expect, it } from 'vitest';

/**
 * Three examples of the encyclopaedia article "Welch's t-test": data [SEEN in public test files]; printed t, ν, p
 * −2.46/25.0/.021, −1.57/9.9/.149, −2.22/24.5/.036 [MEM]; exact [CALC].
 */
const A1 = [27.5, 21, 19, 23.6, 17, 17.9, 16.9, 20.1, 21.9, 22.6, 23.1, 19.6, 19, 21.7, 21.4];
const A2 = [27.1, 22, 20.8, 23.4, 23.4, 23.5, 25.8, 22, 24.8, 20.2, 21.9, 22.1, 22.9, 20.5, 24.4];
const B1 = [17.2, 20.9, 22.6, 18.1, 21.7, 21.4, 23.5, 24.2, 14.7, 21.8];
const B2 = [
  21.5, 22.8, 21, 23, 21.6, 23.6, 22.5, 20.7, 23.4, 21.8, 20.7, 21.7, 21.5, 22.5, 23.6, 21.5, 22.5, 23.5,
  21.5, 21.8,
];
const C1 = [19.8, 20.4, 19.6, 17.8, 18.5, 18.9, 18.3, 18.9, 19.5, 22];
const C2 = [
  28.2, 26.6, 20.1, 23.3, 25.2, 22.1, 17.7, 27.6, 20.6, 13.7, 23.2, 17.5, 20.6, 18, 23.9, 21.6, 24.3, 20.4,
  24, 13.2,
];

it.each([
  ['A', A1, A2, -2.4553564, 24.98852929, 0.021378, -3.98409627, -0.34923707, 'right-larger'],
  ['B', B1, B2, -1.56543352, 9.90474125, 0.1488417, -3.69842133, 0.64842133, 'not-distinguishable'],
  ['C', C1, C2, -2.21924092, 24.49622312, 0.03597227, -4.28239354, -0.15760646, 'right-larger'],
])('example %s [CALC]', (_, first, second, t, df, p, low, high, verdict) => {
  const read = valueOf(welch(first, second));
  expect(read.t).toBeCloseTo(t, 7);
  expect(read.degreesOfFreedom).toBeCloseTo(df, 6);
  expect(read.p).toBeCloseTo(p, 7);
  expect(read.interval.low).toBeCloseTo(low, 6);
  expect(read.interval.high).toBeCloseTo(high, 6);
  const arms = valueOf(compareArms(first, second));
  expect(arms.verdict).toBe(verdict);
  expect(arms.interval?.low).toBeCloseTo(low, 6);
});

it('left and right arm [CALC]', () => {
  const left = [112.4, 109, 115.8, 111.1];
  const right = [104.2, 108.9, 101.5, 106.3, 110.1];
  const read = valueOf(welch(right, left));
  expect(read.difference).toBeCloseTo(-5.875, 10);
  expect(read.t).toBeCloseTo(-2.7811787, 7);
  expect(read.degreesOfFreedom).toBeCloseTo(6.97943071, 7);
  expect(read.p).toBeCloseTo(0.02733309, 7);
  expect(read.interval.low).toBeCloseTo(-10.87305046, 6);
  expect(read.interval.high).toBeCloseTo(-0.87694954, 6);
  expect(valueOf(hedgesG(right, left))).toBeCloseTo(-1.61726104, 7);
  expect(valueOf(compareArms(left, right))).toMatchObject({ verdict: 'left-larger', moreStrokes: 0 });
});
