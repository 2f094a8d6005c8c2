import { flatPort, waterAngle } from '@stillstroke/geometry/calibration/refraction';
import { reasonOf, valueOf } from '@stillstroke/geometry/testing/arms';
import { describe, expect, it } from 'vitest';

/**
 * Refraction at a flat port, n = 1.333 [CALC]; qualitative: [SEEN g3ynh.info/photography/articles/fp_theory.html].
 * Kwon YH, Casebolt JB (2006) Sports Biomech 5:95–120 [MEM].
 */
describe('flat port', () => {
  it.each([
    // water°, air°, r/(f·t), error against paraxial %, q, largest angle error °
    [5, 6.6716, 1.33698, 0.299, 1.006, 0.171],
    [10, 13.3838, 1.3494, 1.23, 1.0248, 0.7],
    [11.309932474, 15.1545, 1.35421, 1.591, 1.0321, 0.904],
    [15, 20.1821, 1.37181, 2.911, 1.0591, 1.644],
    [20, 27.1237, 1.40739, 5.581, 1.1147, 3.11],
    [26.565051177, 36.5936, 1.48499, 11.402, 1.241, 6.174],
    [30, 41.7975, 1.5485, 16.166, 1.3495, 8.554],
  ])('%f° in water', (water, air, ratio, error, q, direction) => {
    const view = valueOf(flatPort(water));
    expect(view.airDeg).toBeCloseTo(air, 4);
    expect(view.radius / Math.tan((water * Math.PI) / 180)).toBeCloseTo(ratio, 5);
    expect(100 * view.radiusError).toBeCloseTo(error, 3);
    expect(view.stretch).toBeCloseTo(q, 4);
    expect(view.directionErrorDeg).toBeCloseTo(direction, 3);
    expect(valueOf(waterAngle(view.radius))).toBeCloseTo(water, 9);
  });

  it.each([
    [30, 22.03],
    [45, 32.037],
    [60, 40.518],
  ])('a half-angle of %d° in air sees %f° in water', (air, water) => {
    expect(valueOf(waterAngle(Math.tan((air * Math.PI) / 180)))).toBeCloseTo(water, 3);
  });

  it('sees nothing beyond the critical angle of 48.60663°, and n = 1 changes nothing', () => {
    expect(flatPort(48.606).ok).toBe(true);
    expect(reasonOf(flatPort(48.607))).toBe('outside-view');
    expect(reasonOf(waterAngle(NaN))).toBe('outside-view');
    const air = valueOf(flatPort(25, 1));
    expect([air.airDeg, air.stretch, air.directionErrorDeg]).toEqual([expect.closeTo(25, 9), 1, 0]);
  });
});
