import { type ArmComparison, compareArms } from '@stillstroke/geometry/statistics/compare-arms';
import { compareTogether } from '@stillstroke/geometry/statistics/compare-measures';
import { holm } from '@stillstroke/geometry/statistics/holm';
import { reasonOf, valueOf } from '@stillstroke/geometry/testing/arms';
import fc from 'fast-check';
import { expect, it } from 'vitest';

/** Holm S (1979), Scand J Statist 6:65–70 [MEM]. */
it('p .01, .04, .03, .005 become .03, .06, .06, .02 [CALC]', () => {
  const adjusted = valueOf(holm([0.01, 0.04, 0.03, 0.005]));
  for (const [at, p] of [0.03, 0.06, 0.06, 0.02].entries()) expect(adjusted[at]).toBeCloseTo(p, 12);
});

it('never makes a p smaller nor larger than Bonferroni does, and keeps the order', () => {
  fc.assert(
    fc.property(
      fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { minLength: 1, maxLength: 12 }),
      (ps) => {
        const adjusted = valueOf(holm(ps));
        for (const [at, p] of ps.entries()) {
          expect(adjusted[at]).toBeGreaterThanOrEqual(p);
          expect(adjusted[at]).toBeLessThanOrEqual(Math.min(1, p * ps.length) + 1e-12);
        }
      },
    ),
  );
  expect(reasonOf(holm([0.5, NaN]))).toBe('bad-probability');
});

it('takes a verdict back when it does not hold among many measures', () => {
  const clear = valueOf(compareArms([10, 11, 12, 11], [20, 21, 22, 21]));
  const barely = valueOf(compareArms([112.4, 109, 115.8, 111.1], [104.2, 108.9, 101.5, 106.3, 110.1]));
  const few = valueOf(compareArms([1, 2], [3, 4]));
  const together = compareTogether<string>({
    clear,
    barely,
    few,
    other: { ...barely, p: 0.6 } satisfies ArmComparison,
  });
  expect(together['clear']?.verdict).toBe('right-larger');
  expect(barely.verdict).toBe('left-larger');
  expect(together['barely']?.pTogether).toBeCloseTo(2 * 0.02733309, 7);
  expect(together['barely']?.verdict).toBe('not-distinguishable');
  expect(together['few']).toMatchObject({ verdict: 'too-few', pTogether: null });
});
