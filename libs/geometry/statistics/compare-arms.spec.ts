import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { reasonOf, valueOf } from '../testing/arms';
import { compareArms } from './compare-arms';

const LEFT = [112.4, 109, 115.8, 111.1];
const RIGHT = [104.2, 108.9, 101.5, 106.3, 110.1];

describe('left against right', () => {
  it('gives no verdict below three strokes a side, but still the means', () => {
    const one = valueOf(compareArms([10, 12], [20, 22, 24]));
    expect(one).toMatchObject({
      verdict: 'too-few',
      difference: -11,
      interval: null,
      p: null,
      moreStrokes: null,
    });
    expect(one.left?.mean).toBe(11);
    expect(valueOf(compareArms([], [1, 2, 3]))).toMatchObject({
      verdict: 'too-few',
      left: null,
      difference: null,
    });
    expect(valueOf(compareArms([5], [1]))).toMatchObject({ verdict: 'too-few', difference: 4 });
  });

  it('changes sides with the sides', () => {
    const value = fc.double({ min: -90, max: 90, noNaN: true });
    const strokes = fc.array(value, { minLength: 3, maxLength: 8 });
    const mirrored = { 'left-larger': 'right-larger', 'right-larger': 'left-larger' } as Record<
      string,
      string
    >;
    fc.assert(
      fc.property(strokes, strokes, (a, b) => {
        const one = valueOf(compareArms(a, b, { leftMarking: 2, rightMarking: 3 }));
        const two = valueOf(compareArms(b, a, { leftMarking: 3, rightMarking: 2 }));
        expect(two.verdict).toBe(mirrored[one.verdict] ?? one.verdict);
        expect(two.difference).toBeCloseTo(-(one.difference ?? NaN), 9);
        expect(two.interval?.low).toBeCloseTo(-(one.interval?.high ?? NaN), 6);
      }),
    );
  });

  it('has a verdict exactly when the interval leaves zero out, and a p that says the same', () => {
    const value = fc.double({ min: 0, max: 20, noNaN: true });
    const strokes = fc.array(value, { minLength: 3, maxLength: 6 });
    fc.assert(
      fc.property(strokes, strokes, fc.double({ min: 0, max: 4, noNaN: true }), (a, b, marking) => {
        const read = valueOf(compareArms(a, b, { leftMarking: marking, rightMarking: marking }));
        const { low, high } = read.interval ?? { low: NaN, high: NaN };
        fc.pre(Math.abs(low) > 1e-6 && Math.abs(high) > 1e-6);
        expect(read.verdict === 'not-distinguishable').toBe(low < 0 && high > 0);
        expect(Object.values(read).every((v) => typeof v !== 'number' || Number.isFinite(v))).toBe(true);
      }),
    );
  });

  it('never calls equal strokes a difference beyond what marking carries', () => {
    const equal = valueOf(compareArms([10, 10, 10], [12, 12, 12], { leftMarking: 2, rightMarking: 2 }));
    expect(equal.verdict).toBe('not-distinguishable');
    expect(equal.interval?.high).toBeCloseTo(-2 + 1.959964 * Math.sqrt((4 + 4) / 3), 5);
    expect(valueOf(compareArms([10, 10, 10], [10, 10, 10]))).toMatchObject({
      verdict: 'not-distinguishable',
      p: 1,
    });
  });

  it('keeps an uncertainty that strokes share however many strokes there are', () => {
    const many = (mean: number) => Array.from({ length: 60 }, (_, i) => mean + (i % 3));
    const alone = valueOf(compareArms(many(10), many(12)));
    expect(alone.verdict).toBe('right-larger');
    const shared = valueOf(compareArms(many(10), many(12), { common: 1.5 }));
    expect(shared.verdict).toBe('not-distinguishable');
    expect(shared.moreStrokes).toBeNull();
  });

  it('says how many more strokes would settle the difference, and they then do', () => {
    const open = valueOf(compareArms([10, 14, 18], [13, 17, 21]));
    expect(open.verdict).toBe('not-distinguishable');
    // SD 4 a side, difference 3: two-sided t test with 80 % power needs 29 a side.
    expect(open.moreStrokes).toBe(29 - 3);
    expect(valueOf(compareArms(LEFT, RIGHT)).moreStrokes).toBe(0);
    expect(valueOf(compareArms([10, 50, 90], [11, 51, 91])).moreStrokes).toBeNull();
  });

  it('refuses values and uncertainties that are none', () => {
    expect(reasonOf(compareArms([1, 2, NaN], RIGHT))).toBe('not-finite');
    expect(reasonOf(compareArms(LEFT, [Infinity]))).toBe('not-finite');
    expect(reasonOf(compareArms(LEFT, RIGHT, { leftMarking: -1 }))).toBe('bad-uncertainty');
    expect(reasonOf(compareArms(LEFT, RIGHT, { common: NaN }))).toBe('bad-uncertainty');
  });
});
