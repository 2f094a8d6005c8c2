import { pairedDifference } from '@stillstroke/geometry/statistics/paired';
import { hedgesG } from '@stillstroke/geometry/statistics/effect-size';
import { welch } from '@stillstroke/geometry/statistics/welch';
import { reasonOf, valueOf } from '@stillstroke/geometry/testing/arms';
import { expect, it } from 'vitest';

/** Cushny & Peebles 1905; Student 1908; R's datasets::sleep. Data [SEEN], printed Welch result [SEEN, several]. */
const G1 = [0.7, -1.6, -0.2, -1.2, -0.1, 3.4, 3.7, 0.8, 0, 2];
const G2 = [1.9, 0.8, 1.1, 0.1, -0.1, 4.4, 5.5, 1.6, 4.6, 3.4];

it('unpaired: printed t −1.8608, df 17.776, p 0.07939, interval −3.3654832, 0.2054832 [SEEN]; exact [CALC]', () => {
  const read = valueOf(welch(G1, G2));
  expect(Number(read.t.toFixed(4))).toBe(-1.8608);
  expect(Number(read.degreesOfFreedom.toFixed(3))).toBe(17.776);
  expect(read.p).toBeCloseTo(0.07939, 5);
  expect(read.interval.low).toBeCloseTo(-3.3654832, 6);
  expect(read.interval.high).toBeCloseTo(0.2054832, 6);
  expect(read.t).toBeCloseTo(-1.86081347, 8);
  expect(read.degreesOfFreedom).toBeCloseTo(17.77647352, 7);
  expect(read.p).toBeCloseTo(0.07939414, 8);
});

it('paired [CALC]', () => {
  const read = valueOf(pairedDifference(G1, G2));
  expect(read.t).toBeCloseTo(-4.06212768, 8);
  expect(read.degreesOfFreedom).toBe(9);
  expect(read.p).toBeCloseTo(0.00283289, 8);
  expect(read.interval.low).toBeCloseTo(-2.45988576, 7);
  expect(read.interval.high).toBeCloseTo(-0.70011422, 7);
});

it('refuses what has no answer', () => {
  expect(reasonOf(pairedDifference(G1, G2.slice(1)))).toBe('unequal-length');
  expect(reasonOf(welch([1, 1, 1], [2, 2, 2]))).toBe('no-spread');
  expect(reasonOf(welch([1], [2, 3]))).toBe('too-few-values');
  expect(reasonOf(welch([], [2, 3]))).toBe('empty');
  expect(reasonOf(hedgesG([1, 1], [1, 1]))).toBe('no-spread');
});
