import { symmetryIndex } from '@stillstroke/geometry/statistics/symmetry';
import { reasonOf, valueOf } from '@stillstroke/geometry/testing/arms';
import { describe, expect, it } from 'vitest';

/**
 * Robinson RO, Herzog W, Nigg BM (1987). J Manipulative Physiol Ther 10(4):172–176 [citation SEEN; formula MEM]; the same
 * formula [SEEN coachesinfo.com, Sanders et al. (2012) J Swimming Research 19:1].
 */
describe('symmetry index', () => {
  it.each([
    [50, 45, 10.526316],
    [45, 50, -10.526316],
    [46, 44, 4.444444],
    [2, 1, 66.666667],
    [10, 0, 200],
  ])('right %d, left %d: %f %% [CALC]', (right, left, percent) => {
    const exact = (value: number) => ({ value, uncertainty: 0 });
    expect(valueOf(symmetryIndex(exact(right), exact(left))).percent).toBeCloseTo(percent, 6);
  });

  it('its uncertainty: 50 and 45 with 2 each cannot be told apart [CALC]', () => {
    const index = valueOf(symmetryIndex({ value: 50, uncertainty: 2 }, { value: 45, uncertainty: 2 }));
    expect(index.uncertainty).toBeCloseTo(5.962825, 6);
    expect(index.percent).toBeLessThan(1.96 * index.uncertainty);
  });

  it('is refused where it means nothing: signed quantities (20 and −20 divide by zero, 20 and −19 give 7800 %) [CALC]', () => {
    expect(reasonOf(symmetryIndex({ value: 20, uncertainty: 1 }, { value: -20, uncertainty: 1 }))).toBe(
      'not-positive',
    );
    expect(reasonOf(symmetryIndex({ value: 20, uncertainty: 1 }, { value: -19, uncertainty: 1 }))).toBe(
      'not-positive',
    );
    expect(reasonOf(symmetryIndex({ value: NaN, uncertainty: 1 }, { value: 1, uncertainty: 1 }))).toBe(
      'not-finite',
    );
  });
});
