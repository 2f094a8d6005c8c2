import { circularSummary } from '@stillstroke/geometry/statistics/circular';
import { valueOf } from '@stillstroke/geometry/testing/arms';
import { expect, it } from 'vitest';

/** Zar JH (2010). Biostatistical Analysis, 5th ed., ch. 26 [MEM]; data and printed results [SEEN pycircstat2 data and tests]. */
it('examples 26.2 and 26.4: printed 99°, r .82522, s 34°, s₀ 36° [SEEN]; exact [CALC]', () => {
  const read = valueOf(circularSummary([45, 55, 81, 96, 110, 117, 132, 154]));
  expect(Math.round(read.mean)).toBe(99);
  expect(Number(read.concentration.toFixed(5))).toBe(0.82522);
  expect(Math.round(read.deviation)).toBe(34);
  expect(Math.round(read.sd)).toBe(36);
  expect(read.mean).toBeCloseTo(98.98775195, 8);
  expect(read.concentration).toBeCloseTo(0.82521774, 8);
  expect(read.sd).toBeCloseTo(35.5148798, 6);
  expect(read.deviation).toBeCloseTo(33.87554567, 6);
});

it('example 26.5, grouped: printed 162°, .55064 [SEEN]; exact [CALC]', () => {
  const centres = Array.from({ length: 12 }, (_, i) => 15 + 30 * i);
  const read = valueOf(circularSummary(centres, 360, [0, 6, 9, 13, 15, 22, 17, 12, 8, 3, 0, 0]));
  expect(read.count).toBe(105);
  expect(Math.round(read.mean)).toBe(162);
  // Printed .55064, exact .55063507: the printed digit is one off.
  expect(Math.abs(read.concentration - 0.55064)).toBeLessThan(1e-5);
  expect(read.mean).toBeCloseTo(161.56505118, 8);
  expect(read.concentration).toBeCloseTo(0.55063507, 8);
  expect(read.sd).toBeCloseTo(62.5906, 4);
  expect(read.deviation).toBeCloseTo(54.3172, 4);
});
