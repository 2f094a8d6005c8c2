import { intraclass } from '@stillstroke/geometry/statistics/intraclass';
import { pooledSpread } from '@stillstroke/geometry/statistics/repeatability';
import { reasonOf, valueOf } from '@stillstroke/geometry/testing/arms';
import { describe, expect, it } from 'vitest';

/**
 * Shrout PE, Fleiss JL (1979). Intraclass correlations: uses in assessing rater reliability. Psychol Bull 86(2):420–428.
 * Data and the six rounded values [SEEN rdrr.io/cran/psych/src/tests/testthat/test_ICC.R]; exact values [CALC].
 */
const TABLE = [
  [9, 2, 5, 8],
  [6, 1, 3, 2],
  [8, 4, 6, 8],
  [7, 1, 2, 6],
  [10, 5, 6, 9],
  [6, 2, 4, 7],
];

describe('six targets, four judges', () => {
  const icc = valueOf(intraclass(TABLE));

  it('mean squares [CALC]', () => {
    expect(icc.meanSquares.between).toBeCloseTo(11.24166667, 8);
    expect(icc.meanSquares.within).toBeCloseTo(6.26388889, 8);
    expect(icc.meanSquares.readers).toBeCloseTo(32.48611111, 8);
    expect(icc.meanSquares.error).toBeCloseTo(1.01944444, 8);
  });

  it.each([
    ['icc11', 0.17, 0.16574177],
    ['icc21', 0.29, 0.28976378],
    ['icc31', 0.71, 0.71484071],
    ['icc1k', 0.44, 0.44279713],
    ['icc2k', 0.62, 0.62005055],
    ['icc3k', 0.91, 0.90931554],
  ] as const)('%s: printed %f [SEEN], exact %f [CALC]', (key, printed, exact) => {
    expect(Number(icc[key].toFixed(2))).toBe(printed);
    expect(icc[key]).toBeCloseTo(exact, 8);
  });

  it('standard errors of measurement; the absolute one is the technical error of all judges [CALC]', () => {
    expect(icc.semConsistency).toBeCloseTo(1.00967542, 8);
    expect(icc.semAbsolute).toBeCloseTo(2.50277624, 8);
    expect(valueOf(pooledSpread(TABLE)).sd).toBeCloseTo(2.50277624, 8);
  });

  it('refuses tables that carry no answer', () => {
    expect(reasonOf(intraclass([[1, 2]]))).toBe('too-few-values');
    expect(reasonOf(intraclass([[1, 2], [3]]))).toBe('uneven-table');
    expect(
      reasonOf(
        intraclass([
          [1, NaN],
          [3, 4],
        ]),
      ),
    ).toBe('not-finite');
    expect(
      reasonOf(
        intraclass([
          [2, 2],
          [2, 2],
        ]),
      ),
    ).toBe('no-spread');
  });
});
