import {
  markingRepeatability,
  pooledSpread,
  testRetest,
} from '@stillstroke/geometry/statistics/repeatability';
import { markOf, reasonOf, valueOf } from '@stillstroke/geometry/testing/arms';
import { describe, expect, it } from 'vitest';

/**
 * Dahlberg G (1940), Statistical Methods for Medical and Biological Students [MEM]; Hopkins WG (2000), Measures of
 * reliability in sports medicine and science, Sports Med 30(1):1–15 [SEEN abstract]. Formula of the technical error
 * [SEEN nutriverse.io/anthrocheckr/articles/tem.html]. Data: Weir's set A.
 */
const A1 = [146, 148, 170, 90, 157, 156, 176, 205];
const A2 = [140, 152, 152, 99, 145, 153, 167, 218];

it('technical error, typical error, repeatability [CALC]', () => {
  const read = valueOf(testRetest(A1, A2));
  expect(read.bias).toBeCloseTo(2.75, 12);
  expect(read.technicalError).toBeCloseTo(7.33143915, 8);
  expect(read.typicalError).toBeCloseTo(7.55692681, 8);
  // Oracle with 1.96 itself; ours with 1.95996…
  expect(read.repeatability).toBeCloseTo(20.32171253, 3);
});

describe('repeated marks', () => {
  const groups = [
    [101, 103, 102],
    [220, 219, 223],
    [340, 342, 338],
    [455, 455, 458],
  ];

  it('pooled within-frame SD and the uncertainty of a mean of three [CALC]', () => {
    const pooled = valueOf(pooledSpread(groups));
    expect(pooled.sd).toBeCloseTo(1.75594229, 8);
    expect(pooled.degreesOfFreedom).toBe(8);
    expect(pooled.sd / Math.sqrt(3)).toBeCloseTo(1.01379375, 7);
  });

  it('does so per joint, both coordinates pooled', () => {
    const frames = groups.map((xs) => xs.map((x) => markOf(x, 2 * x, 500, 500, 900 + x / 2, 40)));
    const own = valueOf(markingRepeatability(frames));
    const s = 1.75594229;
    expect(own.jointUncertaintyPx.shoulder).toBeCloseTo(s * Math.sqrt((1 + 4) / 2), 7);
    expect(own.jointUncertaintyPx.elbow).toBe(0);
    expect(own.jointUncertaintyPx.wrist).toBeCloseTo(s * Math.sqrt(0.25 / 2), 7);
    expect(own).toMatchObject({ frames: 4, degreesOfFreedom: 16 });
  });

  it('needs a frame marked twice', () => {
    expect(reasonOf(pooledSpread([[1], [2]]))).toBe('too-few-repeats');
    expect(reasonOf(pooledSpread([[1, Infinity]]))).toBe('not-finite');
    expect(reasonOf(testRetest([1, 2], [1]))).toBe('unequal-length');
  });
});
