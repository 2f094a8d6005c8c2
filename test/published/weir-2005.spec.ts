import { intraclass } from '@stillstroke/geometry/statistics/intraclass';
import { testRetest } from '@stillstroke/geometry/statistics/repeatability';
import { valueOf } from '@stillstroke/geometry/testing/arms';
import { minimalChange } from '@stillstroke/geometry/trend/minimal-change';
import { describe, expect, it } from 'vitest';

/**
 * Weir JP (2005). Quantifying test–retest reliability using the intraclass correlation coefficient and the SEM.
 * J Strength Cond Res 19(1):231–240 [SEEN abstract]. Set A and the printed SEM 7.6 [SEEN SimplyAgree package tests];
 * set B [MEM].
 */
const A1 = [146, 148, 170, 90, 157, 156, 176, 205];
const A2 = [140, 152, 152, 99, 145, 153, 167, 218];
const B1 = [166, 168, 160, 150, 147, 146, 156, 155];
const B2 = [160, 172, 142, 159, 135, 143, 147, 168];
const pairs = (a: number[], b: number[]) => a.map((value, i) => [value, b[i] ?? NaN]);

describe('set A', () => {
  const icc = valueOf(intraclass(pairs(A1, A2)));

  it('mean squares and correlations [CALC]', () => {
    expect(icc.meanSquares.between).toBeCloseTo(2098.53571429, 7);
    expect(icc.meanSquares.within).toBeCloseTo(53.75, 8);
    expect(icc.meanSquares.readers).toBeCloseTo(30.25, 8);
    expect(icc.meanSquares.error).toBeCloseTo(57.10714286, 8);
    expect(icc.icc11).toBeCloseTo(0.9500531, 8);
    expect(icc.icc21).toBeCloseTo(0.94997507, 8);
    expect(icc.icc31).toBeCloseTo(0.94701614, 8);
    expect(icc.icc3k).toBeCloseTo(0.97278715, 8);
  });

  it('SEM: printed 7.6 [SEEN], exact [CALC]; minimal detectable change [CALC]', () => {
    expect(Number(icc.semConsistency.toFixed(1))).toBe(7.6);
    expect(icc.semConsistency).toBeCloseTo(7.55692681, 8);
    const retest = valueOf(testRetest(A1, A2));
    expect(retest.typicalError).toBeCloseTo(icc.semConsistency, 10);
    // Oracle with 1.96 itself; ours with 1.95996…
    expect(retest.minimalChange).toBeCloseTo(20.94673244, 3);
  });
});

it('set B: the same SEM with very different correlations [MEM data, CALC]', () => {
  const icc = valueOf(intraclass(pairs(B1, B2)));
  expect(icc.semConsistency).toBeCloseTo(7.55692681, 8);
  expect(icc.icc31).toBeCloseTo(0.53772767, 8);
  expect(icc.icc21).toBeCloseTo(0.55274889, 8);
  expect(icc.icc11).toBeCloseTo(0.55890973, 8);
});

it.each([
  [1, 2.771808],
  [1.5, 4.157712],
  [2, 5.543615],
  [2.5, 6.929519],
  [3, 8.315423],
])('SEM %f: minimal detectable change %f; of means of three, less by √3 [CALC]', (sem, change) => {
  expect(valueOf(minimalChange(sem, sem))).toBeCloseTo(change, 5);
  expect(valueOf(minimalChange(sem / Math.sqrt(3), sem / Math.sqrt(3)))).toBeCloseTo(
    change / Math.sqrt(3),
    6,
  );
});
