import { robustSlope } from '@stillstroke/geometry/trend/robust-slope';
import { slopeOf } from '@stillstroke/geometry/trend/slope';
import { valueOf } from '@stillstroke/geometry/testing/arms';
import { describe, expect, it } from 'vitest';

/** Sen PK (1968), J Am Stat Assoc 63:1379–1389 [MEM]; least squares beside it. Figures [CALC]. */
const Y = [110.2, 109.1, 109.8, 107.5, 107.9, 106.0, 106.4, 105.1];
const points = Y.map((y, x) => ({ x, y }));

describe('eight sessions', () => {
  it('least squares [CALC]', () => {
    const line = valueOf(slopeOf(points));
    expect(line.slope).toBeCloseTo(-0.71666667, 8);
    expect(line.scatter).toBeCloseTo(0.09856779, 8);
    expect(line.interval.low).toBeCloseTo(-0.95785335, 7);
    expect(line.interval.high).toBeCloseTo(-0.47547998, 7);
    expect(line.intercept).toBeCloseTo(110.25833333, 8);
    expect(line.explained).toBeCloseTo(0.89807105, 8);
    expect(line.known).toBeNull();
  });

  it('median of pairs, with its interval and Kendall’s S [CALC]', () => {
    const robust = valueOf(robustSlope(points));
    expect(robust.slope).toBeCloseTo(-0.75, 9);
    expect(robust.interval.low).toBeCloseTo(-0.95, 9);
    expect(robust.interval.high).toBeCloseTo(-0.4, 9);
    expect(robust.kendallS).toBe(-22);
  });

  it('weighted by 1/u² [CALC]', () => {
    const weights = [1, 1, 1, 0.25, 1, 1, 1, 0.25];
    const line = valueOf(
      slopeOf(points.map((p, i) => ({ ...p, uncertainty: 1 / Math.sqrt(weights[i] ?? NaN) }))),
    );
    expect(line.slope).toBeCloseTo(-0.70603865, 8);
    expect(line.intercept).toBeCloseTo(110.31135266, 8);
    expect(line.known).toBeCloseTo(0.17720318, 8);
  });
});
