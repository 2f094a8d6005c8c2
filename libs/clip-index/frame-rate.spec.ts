import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { steadyRate } from './frame-rate';

const grid = (rate: number, frames: number, ticksPerSecond: number, rounding = Math.round): number[] =>
  Array.from({ length: frames }, (_, n) =>
    Math.round((rounding((n / rate) * ticksPerSecond) / ticksPerSecond) * 1e6),
  );

describe('steadyRate', () => {
  it('finds the rate that was rounded to any clock', () => {
    const rates = [24, 24000 / 1001, 25, 30, 30000 / 1001, 50, 60, 60000 / 1001, 120, 240];
    fc.assert(
      fc.property(
        fc.constantFrom(...rates),
        fc.integer({ min: 700, max: 2000 }),
        fc.constantFrom(1000, 600, 15360, 90000),
        fc.constantFrom(Math.round, Math.floor, Math.ceil),
        (rate, frames, ticks, rounding) => {
          expect(steadyRate(grid(rate, frames, ticks, rounding), ticks)).toBeCloseTo(rate, 9);
        },
      ),
    );
  });

  it('calls a dropped frame a varying rate', () => {
    const times = grid(60, 600, 90000);
    times.splice(300, 1);
    expect(steadyRate(times, 90000)).toBeNull();
  });

  it('has no rate for one frame or none, nor for frames that share one time', () => {
    expect(steadyRate([], 1000)).toBeNull();
    expect(steadyRate([500], 1000)).toBeNull();
    expect(steadyRate([500, 500, 500], 1000)).toBeNull();
  });
});
