import { armAngles } from '@stillstroke/geometry/angles/arm-angles';
import { t95 } from '@stillstroke/geometry/statistics/distributions';
import { effectiveFreedom } from '@stillstroke/geometry/statistics/effective-freedom';
import { armOf, markOf, valueOf } from '@stillstroke/geometry/testing/arms';
import { armAngleUncertainty } from '@stillstroke/geometry/uncertainty/arm-uncertainty';
import { propagate } from '@stillstroke/geometry/uncertainty/propagate';
import { describe, expect, it } from 'vitest';
import { seededRandom } from './seeded-random';

/**
 * JCGM 100:2008 (GUM) §5.1.2 eq. (10), §5.2.2 eq. (13) [SEEN iso.org/sites/JCGM/GUM]; Welch–Satterthwaite G.4.1, its
 * worked example [MEM]. The segment and elbow figures are derived from it [CALC].
 */
/** A plumb whose ends are exact: no roll in the figures. */
const exact = {
  travel: 'right',
  plumb: { top: { x: 0, y: 0 }, bottom: { x: 0, y: 600 } },
  plumbPointUncertaintyPx: 0,
} as const;

it('G.4.1: printed 1.03 %, ν 19.0, t 2.09, U 2.2 % [MEM]; exact [CALC]', () => {
  const parts = [
    { standard: 0.25, degreesOfFreedom: 9 },
    { standard: 0.57, degreesOfFreedom: 4 },
    { standard: 0.82, degreesOfFreedom: 14 },
  ];
  const u = Math.hypot(...parts.map(({ standard }) => standard));
  const freedom = effectiveFreedom(parts);
  expect(u).toBeCloseTo(1.02946588, 8);
  expect(freedom).toBeCloseTo(18.99874231, 7);
  // The printed t of 2.09 is that of 19; the oracle's U too.
  expect(t95(19)).toBeCloseTo(2.09302405, 8);
  expect(u * t95(19)).toBeCloseTo(2.15469685, 6);
});

describe('direction of a segment', () => {
  it.each([
    [100, 100, 200, 100, 2, 2, 1.62056937],
    [320, 240, 420, 315, 2, 2, 1.2964555],
    [320, 240, 420, 315, 1.5, 3, 1.53740709],
    [0, 0, 60, 80, 2, 2, 1.62056937],
    [0, 0, 30, 0, 2, 2, 5.4018979],
  ])('(%d, %d) to (%d, %d) with %f and %f px: %f° [CALC]', (x1, y1, x2, y2, u1, u2, u) => {
    const context = { ...exact, jointUncertaintyPx: { shoulder: 1, elbow: u1, wrist: u2 } };
    const read = valueOf(armAngleUncertainty(markOf(x1 - 50, y1 - 60, x1, y1, x2, y2), context));
    expect(read.forearmDeg).toBeCloseTo(u, 7);
  });

  it('uneven coordinates, by propagation: 1.39876824° [CALC]', () => {
    const input = (value: number, standard: number) => ({ source: 'wrist-mark' as const, value, standard });
    const u = propagate(
      [input(0, 1), input(0, 2), input(60, 1), input(80, 3)],
      ([x1 = 0, y1 = 0, x2 = 0, y2 = 0]) => (Math.atan2(y2 - y1, x2 - x1) * 180) / Math.PI,
    );
    expect(u.standard).toBeCloseTo(1.39876824, 4);
  });

  it('roll is added in quadrature: 1.62057° with 0.27° makes 1.64291° [CALC]', () => {
    const plumb = { top: { x: 640, y: 100 }, bottom: { x: 640, y: 700 } };
    const context = {
      travel: 'right',
      plumb,
      plumbPointUncertaintyPx: 2,
      jointUncertaintyPx: { shoulder: 2, elbow: 2, wrist: 2 },
    } as const;
    const read = valueOf(
      armAngleUncertainty(armOf({ upperArmDeg: 80, forearmDeg: 0, forePx: 100 }), context),
    );
    expect(read.forearmDeg).toBeCloseTo(1.64291, 4);
  });
});

describe('angle of the elbow', () => {
  it.each([
    [30, 1.72571585],
    [60, 1.98478402],
    [90, 2.29183118],
    [100, 2.38925361],
    [120, 2.56234516],
    [135, 2.66636942],
    [150, 2.74351692],
    [170, 2.79979226],
    [180, 2.80690848],
  ])('%d°, 100 px, 2 px each: %f° [CALC]', (elbowDeg, u) => {
    const arm = armOf({ upperArmDeg: 40, forearmDeg: 40 - (180 - elbowDeg), upperPx: 100, forePx: 100 });
    const context = { ...exact, jointUncertaintyPx: { shoulder: 2, elbow: 2, wrist: 2 } };
    const read = valueOf(armAngleUncertainty(arm, context));
    expect(read.elbowDeg).toBeCloseTo(u, 7);
    // Segments taken as independent would give 2.29183118 throughout, which is wrong except at 90°.
    if (elbowDeg !== 90) expect(Math.abs(read.elbowDeg - 2.29183118)).toBeGreaterThan(0.09);
  });

  it.each([
    [markOf(300, 200, 420, 290, 400, 410), [2, 2, 2], 117.40757544, 1.89846943],
    [markOf(300, 200, 420, 290, 400, 410), [3, 2, 1.5], 117.40757544, 1.98633558],
    [markOf(512, 300, 596, 372, 560, 468), [2.5, 2, 2], 110.04524943, 2.45784459],
    [markOf(0, 0, 120, 0, 120, 90), [1, 1, 1], 90, 1.1253954],
    [markOf(0, 0, 120, 0, 120, 90), [2, 0, 0], 90, 0.95492966],
    [markOf(0, 0, 120, 0, 120, 90), [0, 2, 0], 90, 1.59154943],
    [markOf(0, 0, 120, 0, 120, 90), [0, 0, 2], 90, 1.27323954],
  ])('arm %# [CALC]', (mark, [shoulder = 0, elbow = 0, wrist = 0], angle, u) => {
    const context = { ...exact, jointUncertaintyPx: { shoulder, elbow, wrist } };
    expect(valueOf(armAngles(mark, exact)).elbowDeg).toBeCloseTo(angle, 7);
    expect(valueOf(armAngleUncertainty(mark, context)).elbowDeg).toBeCloseTo(u, 7);
  });

  it('a straight arm reads 177.76 on average, with an SD of 1.69 [CALC]', () => {
    const random = seededRandom(7);
    const read = Array.from({ length: 20_000 }, () => {
      const [a, b, c, d, e, f] = [0, 0, 0, 0, 0, 0].map(() => 2 * random.normal());
      const mark = markOf(a ?? 0, b ?? 0, 100 + (c ?? 0), d ?? 0, 200 + (e ?? 0), f ?? 0);
      return valueOf(armAngles(mark, exact)).elbowDeg;
    });
    const mean = read.reduce((sum, value) => sum + value, 0) / read.length;
    const sd = Math.sqrt(read.reduce((sum, value) => sum + (value - mean) ** 2, 0) / read.length);
    expect(Math.abs(mean - 177.7604)).toBeLessThan(0.05);
    expect(Math.abs(sd - 1.6913)).toBeLessThan(0.05);
    const straight = armOf({ upperArmDeg: 10, forearmDeg: 10, upperPx: 100, forePx: 100 });
    const context = { ...exact, jointUncertaintyPx: { shoulder: 2, elbow: 2, wrist: 2 } };
    expect(valueOf(armAngleUncertainty(straight, context)).nearStraight).toBe(true);
  });
});
