import { describe, expect, it } from 'vitest';
import { largestInterval, type Reading } from './largest-of';

/** Evenly spread normal quantiles in shuffled order: the same "random" errors in every run. */
function errors(count: number, seed: number): number[] {
  let state = seed;
  const even = () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return (state + 0.5) / 2 ** 32;
  };
  return Array.from(
    { length: count },
    () => Math.sqrt(-2 * Math.log(even())) * Math.cos(2 * Math.PI * even()),
  );
}

function coverage(
  truths: readonly number[],
  interval: (readings: [Reading, ...Reading[]]) => { low: number; high: number },
) {
  const trials = 3000;
  const noise = errors(trials * truths.length, 5);
  const largest = Math.max(...truths);
  let inside = 0;
  for (let trial = 0; trial < trials; trial += 1) {
    const read = truths.map((truth, i) => ({
      value: truth + (noise[trial * truths.length + i] ?? 0),
      standard: 1,
    }));
    const [first, ...others] = read;
    if (!first) throw new Error('no reading');
    const { low, high } = interval([first, ...others]);
    if (low <= largest && largest <= high) inside += 1;
  }
  return inside / trials;
}

/** A broad peak over nine marks: half a standard uncertainty lost per square step. */
const BROAD = [-4, -3, -2, -1, 0, 1, 2, 3, 4].map((x) => -0.1 * x * x);

describe('interval of the largest true value', () => {
  it('holds it 93 to 97 % of the time on a broad peak, where the plain one does not', () => {
    const honest = coverage(BROAD, largestInterval);
    expect(honest).toBeGreaterThan(0.93);
    expect(honest).toBeLessThan(0.97);
    const plain = coverage(BROAD, (readings) => {
      const top = Math.max(...readings.map(({ value }) => value));
      return { low: top - 1.96, high: top + 1.96 };
    });
    expect(plain).toBeLessThan(0.92);
  });

  it('is the ordinary one for a reading that stands out, or stands alone', () => {
    const alone = largestInterval([{ value: 12, standard: 2 }]);
    expect(alone.low).toBeCloseTo(12 - 1.959964 * 2, 4);
    expect(alone.high).toBeCloseTo(12 + 1.959964 * 2, 4);
    const out = largestInterval([
      { value: 12, standard: 2 },
      { value: -40, standard: 2 },
    ]);
    expect(out.low).toBeCloseTo(alone.low, 5);
    expect(out.high).toBeCloseTo(alone.high, 5);
  });

  it('sits lower the more readings come close', () => {
    const one = { value: 10, standard: 2 };
    const two = largestInterval([one, one]);
    const four = largestInterval([one, one, one, one]);
    expect(two.low).toBeLessThan(10 - 1.96 * 2);
    expect(four.low).toBeLessThan(two.low);
    expect(four.high).toBeLessThan(two.high);
  });

  it('is a point for exact readings', () => {
    const { low, high } = largestInterval([
      { value: 3, standard: 0 },
      { value: 1, standard: 0 },
    ]);
    expect([low, high]).toEqual([3, 3]);
  });
});
