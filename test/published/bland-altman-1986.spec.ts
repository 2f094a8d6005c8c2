import { agreement } from '@stillstroke/geometry/statistics/agreement';
import { testRetest } from '@stillstroke/geometry/statistics/repeatability';
import { valueOf } from '@stillstroke/geometry/testing/arms';
import { describe, expect, it } from 'vitest';

/**
 * Bland JM, Altman DG (1986). Statistical methods for assessing agreement between two methods of clinical measurement.
 * Lancet 327(8476):307–310. Data [SEEN rdrr.io/cran/BlandAltmanLeh/src/R/PEFR.R].
 */
const W1 = [494, 395, 516, 434, 476, 557, 413, 442, 650, 433, 417, 656, 267, 478, 178, 423, 427];
const W2 = [490, 397, 512, 401, 470, 611, 415, 431, 638, 429, 420, 633, 275, 492, 165, 372, 421];
const M1 = [512, 430, 520, 428, 500, 600, 364, 380, 658, 445, 432, 626, 260, 477, 259, 350, 451];
const M2 = [525, 415, 508, 444, 500, 625, 460, 390, 642, 432, 420, 605, 227, 467, 268, 370, 443];

describe('two peak flow meters', () => {
  const read = valueOf(agreement(W1, M1));

  it('mean and SD of the differences: printed −2.1 and 38.8 [SEEN-2nd], exact [CALC]', () => {
    expect(Number(read.bias.toFixed(1))).toBe(-2.1);
    expect(Number(read.sd.toFixed(1))).toBe(38.8);
    expect(read.bias).toBeCloseTo(-2.11764706, 8);
    expect(read.sd).toBeCloseTo(38.76512987, 8);
  });

  it('limits with 2 SD as printed: −79.7, 75.5 from rounded inputs [SEEN-2nd]; exact [CALC]', () => {
    const printed = valueOf(agreement(W1, M1, 2)).limits;
    expect(Math.abs(printed.low - -79.7)).toBeLessThan(0.1);
    expect(Math.abs(printed.high - 75.5)).toBeLessThan(0.1);
    expect(printed.low).toBeCloseTo(-79.64790681, 7);
    expect(printed.high).toBeCloseTo(75.41261269, 7);
  });

  it('limits with 1.96 SD [CALC]', () => {
    // The oracle was computed with 1.96 itself, ours with 1.95996…
    const limits = valueOf(agreement(W1, M1, 1.96)).limits;
    expect(limits.low).toBeCloseTo(-78.09730161, 7);
    expect(limits.high).toBeCloseTo(73.86200749, 7);
    expect(read.limits.low).toBeCloseTo(limits.low, 2);
  });

  it('interval of the bias: printed −22.0, 17.8 [MEM], exact [CALC]', () => {
    expect(read.biasInterval.low).toBeCloseTo(-22.0488377, 6);
    expect(read.biasInterval.high).toBeCloseTo(17.81354358, 6);
  });

  it('intervals of the limits: printed −114.3, −45.1 and 40.9, 110.1 [MEM], exact with 2 SD [CALC]', () => {
    const printed = valueOf(agreement(W1, M1, 2));
    expect(printed.lowerLimitInterval.low).toBeCloseTo(-114.16974, 4);
    expect(printed.lowerLimitInterval.high).toBeCloseTo(-45.12607, 4);
    expect(printed.upperLimitInterval.low).toBeCloseTo(40.89078, 4);
    expect(printed.upperLimitInterval.high).toBeCloseTo(109.93445, 4);
  });

  it('within-subject SD of either meter, √(Σd²/2n) [CALC]', () => {
    expect(valueOf(testRetest(W1, W2)).technicalError).toBeCloseTo(15.30666906, 8);
    expect(valueOf(testRetest(M1, M2)).technicalError).toBeCloseTo(19.91083063, 8);
  });

  it('SD of the differences of either meter, n − 1 [CALC]', () => {
    expect(valueOf(testRetest(W1, W2)).typicalError * Math.SQRT2).toBeCloseTo(21.72403792, 8);
    expect(valueOf(testRetest(M1, M2)).typicalError * Math.SQRT2).toBeCloseTo(28.87231016, 8);
  });
});
