import { normalAt, normalBelow, Z95 } from '@stillstroke/geometry/statistics/normal';
import { studentAt, studentBelow, t95 } from '@stillstroke/geometry/statistics/distributions';
import { expect, it } from 'vitest';

/** Quantiles of Student's t and the normal distribution [CALC]. */
it.each([
  [1, 12.7062],
  [2, 4.3027],
  [3, 3.1824],
  [4, 2.7764],
  [5, 2.5706],
  [6, 2.4469],
  [7, 2.3646],
  [8, 2.306],
  [9, 2.2622],
  [10, 2.2281],
  [12, 2.1788],
  [15, 2.1314],
  [16, 2.1199],
  [19, 2.093],
  [20, 2.086],
  [30, 2.0423],
  [60, 2.0003],
  [120, 1.9799],
])('t.975 with %d degrees of freedom is %f [CALC]', (freedom, t) => {
  expect(Number(t95(freedom).toFixed(4))).toBe(t);
  expect(studentBelow(studentAt(0.975, freedom), freedom)).toBeCloseTo(0.975, 12);
});

it('t.975(16) and the normal ones [CALC]', () => {
  expect(t95(16)).toBeCloseTo(2.119905299221254, 12);
  expect(Z95).toBeCloseTo(1.95996398, 8);
  expect(normalAt(0.95)).toBeCloseTo(1.64485363, 8);
  expect(normalBelow(Z95)).toBeCloseTo(0.975, 14);
});

it('t becomes normal with many degrees of freedom, without a step', () => {
  for (const freedom of [1e6, 1e8, 1e10, 9e11, 1e13, Infinity]) {
    expect(t95(freedom), `${freedom}`).toBeCloseTo(Z95, 5);
    expect(studentBelow(-1.5, freedom), `${freedom}`).toBeCloseTo(normalBelow(-1.5), 6);
  }
});
