import { describe, expect, it } from 'vitest';
import { constantRate, reasonOf, valueOf } from '../testing/arms';
import { swimSpeed } from './known-distance';

const times = constantRate(400, 50);
const distance = { metres: 5, uncertaintyM: 0.1, fromFrame: 100, toFrame: 275 };

describe('speed over a known distance', () => {
  it('is metres by world seconds, with the parts of its uncertainty', () => {
    const speed = valueOf(swimSpeed(distance, times));
    expect(speed.durationS).toBeCloseTo(3.5, 12);
    expect(speed.metresPerSecond).toBeCloseTo(5 / 3.5, 12);
    // Two frames, evenly within ±1 of 20 ms each; 0.1 of 5 m.
    const time = (Math.SQRT2 * 0.02) / Math.sqrt(3) / 3.5;
    expect(speed.standard).toBeCloseTo((5 / 3.5) * Math.hypot(0.1 / 5, time), 12);
    expect(speed.parts.map(({ source }) => source)).toEqual(['distance', 'time']);
  });

  it('takes the frames’ own times, and slow motion', () => {
    const uneven = times.map((time, frame) => (frame > 275 ? time + 40_000 : time));
    const before = valueOf(swimSpeed(distance, times));
    const after = valueOf(swimSpeed(distance, uneven));
    // The last frame stands 60 ms before the next and 20 ms after the one before: 40 ms on average.
    const timePart = (parts: typeof before.parts) =>
      parts.find(({ source }) => source === 'time')?.alone ?? NaN;
    expect(timePart(after.parts) / timePart(before.parts)).toBeCloseTo(Math.sqrt((1 + 4) / 2), 9);
    const slow = valueOf(swimSpeed(distance, times, { captureRateFactor: 0.25 }));
    expect(slow.metresPerSecond).toBeCloseTo(4 * before.metresPerSecond, 12);
    expect(slow.standard / slow.metresPerSecond).toBeCloseTo(before.standard / before.metresPerSecond, 12);
  });

  it('refuses by code', () => {
    const of = (change: object) => reasonOf(swimSpeed({ ...distance, ...change }, times));
    expect(reasonOf(swimSpeed(null, times))).toBe('no-distance');
    expect(of({ metres: NaN })).toBe('not-finite');
    expect(of({ uncertaintyM: Infinity })).toBe('not-finite');
    expect(of({ metres: 0 })).toBe('not-positive');
    expect(of({ metres: -5 })).toBe('not-positive');
    expect(of({ uncertaintyM: 5 })).toBe('distance-not-told');
    expect(of({ fromFrame: 275 })).toBe('distance-frames-out-of-order');
    expect(of({ toFrame: 400 })).toBe('frame-outside-clip');
    expect(of({ fromFrame: 1.5 })).toBe('frame-not-whole');
    expect(
      reasonOf(
        swimSpeed(
          distance,
          times.map(() => 0),
        ),
      ),
    ).toBe('no-duration');
    expect(reasonOf(swimSpeed(distance, times, { captureRateFactor: 0 }))).toBe('bad-capture-rate');
  });
});
