import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { videoPoint } from '../points/video-point';
import { reasonOf, valueOf } from '../testing/arms';
import { degrees, radians, toDegrees, toRadians, wrapDegrees } from './angle';
import { frameIndex } from './frame-index';
import { microseconds, worldSeconds } from './microseconds';
import { pixels } from './pixels';
import { share } from './share';

describe('units are made only of numbers that fit', () => {
  it.each([NaN, Infinity, -Infinity])('%f fits nowhere', (value) => {
    for (const made of [degrees(value), radians(value), pixels(value), microseconds(value), share(value)]) {
      expect(reasonOf(made)).toBe('not-finite');
    }
    expect(reasonOf(videoPoint(value, 1))).toBe('not-finite');
    expect(reasonOf(frameIndex(value))).toBe('frame-not-whole');
  });

  it('ranges', () => {
    expect(reasonOf(pixels(-1))).toBe('negative');
    expect(reasonOf(share(1.1))).toBe('outside-share');
    expect(reasonOf(frameIndex(2.5))).toBe('frame-not-whole');
    expect(reasonOf(frameIndex(-1))).toBe('frame-outside-clip');
    expect(reasonOf(frameIndex(10, 10))).toBe('frame-outside-clip');
    expect(reasonOf(videoPoint(1e9, 0))).toBe('far-outside-picture');
    expect([valueOf(share(0)), valueOf(share(1)), valueOf(frameIndex(9, 10))]).toEqual([0, 1, 9]);
  });

  it('degrees and radians there and back, and the wrap at ±180', () => {
    fc.assert(
      fc.property(fc.double({ min: -720, max: 720, noNaN: true }), (value) => {
        const angle = valueOf(degrees(value));
        expect(toDegrees(toRadians(angle))).toBeCloseTo(value, 9);
        const wrapped = wrapDegrees(value);
        expect(wrapped).toBeGreaterThan(-180);
        expect(wrapped).toBeLessThanOrEqual(180);
        expect(Math.cos(toRadians(wrapped))).toBeCloseTo(Math.cos(toRadians(angle)), 9);
        expect(Math.sin(toRadians(wrapped))).toBeCloseTo(Math.sin(toRadians(angle)), 9);
      }),
    );
    expect([wrapDegrees(180), wrapDegrees(-180), wrapDegrees(540), wrapDegrees(-90)]).toEqual([
      180, 180, 180, -90,
    ]);
  });

  it('slow motion shortens the world', () => {
    expect(worldSeconds(2_000_000, 0.25)).toBe(0.5);
  });
});
