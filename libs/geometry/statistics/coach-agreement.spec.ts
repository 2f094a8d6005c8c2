import { describe, expect, it } from 'vitest';
import { reasonOf, valueOf } from '../testing/arms';
import { coachAgreement, type ReadByTwo } from './coach-agreement';

const readings = (pairs: readonly (readonly [number, number])[], uncertainty = 2): ReadByTwo[] =>
  pairs.map(([first, second]) => ({
    first,
    second,
    firstUncertainty: uncertainty,
    secondUncertainty: uncertainty,
  }));

describe('agreement of two people', () => {
  it('gives bias and limits of the differences, and where each frame stands', () => {
    const found = valueOf(
      coachAgreement(
        readings([
          [10, 9],
          [20, 22],
          [30, 29],
          [40, 38],
        ]),
      ),
    );
    // 1, −2, 1, 2: mean 0.5, SD √(9/3).
    expect(found.bias).toBeCloseTo(0.5, 12);
    expect(found.sd).toBeCloseTo(Math.sqrt(3), 12);
    expect(found.limits.high).toBeCloseTo(0.5 + 1.959964 * Math.sqrt(3), 5);
    expect(found.points[1]).toEqual({ mean: 21, difference: -2 });
    expect(found.marking).toBeCloseTo(Math.sqrt(8), 12);
    expect(found.verdict).toBe('no-shift');
  });

  it('weighs a shift against what placing two marks leaves open', () => {
    const shifted = (by: number) =>
      valueOf(
        coachAgreement(
          readings([
            [by, 0],
            [by + 0.1, 0],
            [by - 0.1, 0],
          ]),
        ),
      );
    expect(shifted(2).verdict).toBe('small');
    expect(shifted(-2).verdict).toBe('small');
    expect(shifted(3).verdict).toBe('large');
  });

  it('goes the shorter way round, and lets a straight elbow pass 180', () => {
    expect(
      valueOf(
        coachAgreement(
          readings([
            [179, -179],
            [178, -180],
            [180, -178],
          ]),
        ),
      ).bias,
    ).toBeCloseTo(-2, 9);
    const straight = valueOf(
      coachAgreement(
        readings([
          [184, 182],
          [186, 184],
          [179, 181],
        ]),
      ),
    );
    expect(straight.points[0]).toEqual({ mean: 183, difference: 2 });
  });

  it('needs three frames with numbers on them', () => {
    expect(
      reasonOf(
        coachAgreement(
          readings([
            [1, 2],
            [3, 4],
          ]),
        ),
      ),
    ).toBe('too-few-pairs');
    expect(
      reasonOf(
        coachAgreement(
          readings([
            [1, 2],
            [3, NaN],
            [4, 4],
          ]),
        ),
      ),
    ).toBe('not-finite');
  });
});
