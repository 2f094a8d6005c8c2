import { homography, mapPoint } from '@stillstroke/geometry/calibration/homography';
import { leastSquares } from '@stillstroke/geometry/calibration/linear-solve';
import { studentAt, studentBelow } from '@stillstroke/geometry/statistics/distributions';
import { summarise } from '@stillstroke/geometry/statistics/sample';
import { pairedDifference } from '@stillstroke/geometry/statistics/paired';
import { welch } from '@stillstroke/geometry/statistics/welch';
import { valueOf } from '@stillstroke/geometry/testing/arms';
import { slopeOf } from '@stillstroke/geometry/trend/slope';
import ttest2 from '@stdlib/stats-ttest2';
import fc from 'fast-check';
import { jStat } from 'jstat';
import { Matrix, SVD, solve } from 'ml-matrix';
import { linearRegression, linearRegressionLine, median, sampleStandardDeviation } from 'simple-statistics';
import { describe, expect, it } from 'vitest';
import { medianOf } from '@stillstroke/geometry/statistics/sample';

/** General statistics and matrix packages, used as independent implementations on random inputs. */
const reading = fc.double({ min: -180, max: 180, noNaN: true });
const sample = fc.uniqueArray(reading, { minLength: 3, maxLength: 12 }).filter(spread);

function spread(values: readonly number[]): boolean {
  return Math.max(...values) - Math.min(...values) > 0.1;
}

function near(actual: number, expected: number, relative = 1e-8): void {
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(relative * Math.max(1, Math.abs(expected)));
}

describe('agrees with', () => {
  it('@stdlib/stats-ttest2 on Welch’s test', () => {
    fc.assert(
      fc.property(sample, sample, (a, b) => {
        const ours = valueOf(welch(a, b));
        const theirs = ttest2(a, b);
        near(ours.t, theirs.statistic);
        near(ours.degreesOfFreedom, theirs.df);
        near(ours.p, theirs.pValue);
        near(ours.interval.low, theirs.ci[0] ?? NaN, 1e-7);
        near(ours.interval.high, theirs.ci[1] ?? NaN, 1e-7);
      }),
    );
  });

  it('jstat on Student’s t and the paired test', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 0.99, noNaN: true }),
        fc.integer({ min: 2, max: 60 }),
        (p, freedom) => {
          near(studentAt(p, freedom), jStat.studentt.inv(p, freedom), 1e-5);
          near(studentBelow(studentAt(p, freedom), freedom), p, 1e-9);
        },
      ),
    );
    fc.assert(
      fc.property(sample, (a) => {
        const b = a.map((value, i) => value + i * i + 1);
        const ours = valueOf(pairedDifference(a, b));
        const d = a.map((value, i) => value - (b[i] ?? NaN));
        near(ours.t, jStat.mean(d) / (jStat.stdev(d, true) / Math.sqrt(d.length)));
        near(ours.p, jStat.ttest(ours.t, d.length, 2), 1e-6);
      }),
    );
  });

  it('simple-statistics on spread, median and slope', () => {
    fc.assert(
      fc.property(sample, (ys) => {
        near(valueOf(summarise(ys)).sd ?? NaN, sampleStandardDeviation(ys));
        near(medianOf(ys), median(ys));
        const points = ys.map((y, x): [number, number] => [x * 3.5, y]);
        if (points.length < 4) return;
        const ours = valueOf(slopeOf(points.map(([x, y]) => ({ x, y }))));
        const theirs = linearRegression(points);
        near(ours.slope, theirs.m);
        near(ours.intercept, theirs.b);
        near(ours.intercept + 7 * ours.slope, linearRegressionLine(theirs)(7));
      }),
    );
  });

  it('ml-matrix on least squares', () => {
    const row = fc.array(fc.integer({ min: -1000, max: 1000 }), { minLength: 3, maxLength: 3 });
    const right = fc.array(fc.integer({ min: -1000, max: 1000 }), { minLength: 9, maxLength: 9 });
    fc.assert(
      fc.property(fc.array(row, { minLength: 5, maxLength: 9 }), right, (rows, values) => {
        const condition = new SVD(new Matrix(rows)).condition;
        fc.pre(condition < 1e4);
        const b = values.slice(0, rows.length);
        const ours = valueOf(leastSquares(rows, b));
        const theirs = solve(new Matrix(rows), Matrix.columnVector(b), true).to1DArray();
        for (const [at, value] of theirs.entries()) near(ours[at] ?? NaN, value, 1e-6);
      }),
    );
  });

  it('ml-matrix on a homography by singular values', () => {
    const jitter = fc.array(fc.double({ min: -0.02, max: 0.02, noNaN: true }), {
      minLength: 8,
      maxLength: 8,
    });
    fc.assert(
      fc.property(jitter, (moved) => {
        const corners = [
          [0, 0],
          [1, 0],
          [1, 1],
          [0, 1],
        ] as const;
        const pairs = corners.map(([x, y], i) => ({
          picture: { x: x + 10 * (moved[2 * i] ?? 0), y: y + 10 * (moved[2 * i + 1] ?? 0) },
          plane: { x, y },
        }));
        const rows = pairs.flatMap(({ picture: p, plane: q }) => [
          [p.x, p.y, 1, 0, 0, 0, -p.x * q.x, -p.y * q.x, -q.x],
          [0, 0, 0, p.x, p.y, 1, -p.x * q.y, -p.y * q.y, -q.y],
        ]);
        // Nine columns of which eight rows fix all but one: the last right singular vector is the mapping.
        const h = new SVD(new Matrix([...rows, new Array<number>(9).fill(0)])).rightSingularVectors.getColumn(
          8,
        );
        const at = { x: 0.4, y: 0.7 };
        const w = (h[6] ?? 0) * at.x + (h[7] ?? 0) * at.y + (h[8] ?? 0);
        const seen = mapPoint(valueOf(homography(pairs)).toPlane, at);
        near(seen?.x ?? NaN, ((h[0] ?? 0) * at.x + (h[1] ?? 0) * at.y + (h[2] ?? 0)) / w, 1e-6);
        near(seen?.y ?? NaN, ((h[3] ?? 0) * at.x + (h[4] ?? 0) * at.y + (h[5] ?? 0)) / w, 1e-6);
      }),
    );
  });
});
