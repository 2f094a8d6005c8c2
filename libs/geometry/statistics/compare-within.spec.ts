import { describe, expect, it } from 'vitest';
import { valueOf } from '../testing/arms';
import { compareArms } from './compare-arms';
import { compareWithin } from './compare-within';

const A = [112.4, 109, 115.8, 111.1];
const B = [104.2, 108.9, 101.5, 106.3, 110.1];

describe('one kind of stroke against another, each arm against itself', () => {
  it('of one arm is Welch’s comparison', () => {
    const within = valueOf(compareWithin([{ one: A, other: B }]));
    const arms = valueOf(compareArms(A, B));
    expect(within.difference).toBeCloseTo(arms.difference ?? NaN, 12);
    expect(within.interval?.low).toBeCloseTo(arms.interval?.low ?? NaN, 9);
    expect(within.welch?.degreesOfFreedom).toBeCloseTo(arms.welch?.degreesOfFreedom ?? NaN, 9);
    expect(within.p).toBeCloseTo(arms.p ?? NaN, 12);
    expect(within.verdict).toBe('one-larger');
  });

  it('does not take a difference between the arms for one between the kinds', () => {
    // The left arm reads 40 more than the right; breathing changes nothing, but the left breathes more often.
    const within = valueOf(
      compareWithin([
        { one: [50, 51, 49, 50.5, 49.5, 50], other: [50, 49.5, 50.5] },
        { one: [10, 10.5, 9.5], other: [10, 9, 11, 10.2, 9.8, 10] },
      ]),
    );
    expect(within.difference).toBeCloseTo(0, 9);
    expect(within.verdict).toBe('not-distinguishable');
    expect(within).toMatchObject({ arms: 2, oneCount: 9, otherCount: 9 });
  });

  it('averages the arms’ differences, more surely than either arm alone', () => {
    const left = { one: [20, 22, 21], other: [15, 16, 17] };
    const right = { one: [30, 31, 29], other: [25, 27, 26] };
    const both = valueOf(compareWithin([left, right]));
    const alone = valueOf(compareWithin([left]));
    expect(both.difference).toBeCloseTo(4.5, 12);
    // s²/3 of each mean, over 4: √(4·(1/3))/2.
    expect(both.welch?.standard).toBeCloseTo(Math.sqrt(4 / 3) / 2, 12);
    expect(both.welch?.degreesOfFreedom).toBeCloseTo(8, 9);
    expect(both.welch?.parts.map(({ source, share }) => [source, share])).toEqual([
      ['first-strokes', expect.closeTo(0.5, 9)],
      ['second-strokes', expect.closeTo(0.5, 9)],
    ]);
    expect(both.welch?.standard).toBeLessThan(alone.welch?.standard ?? 0);
  });

  it('leaves aside an arm with fewer than three strokes of a kind, and says nothing without any arm', () => {
    const some = valueOf(
      compareWithin([
        { one: A, other: B },
        { one: [1, 2], other: [3, 4, 5] },
      ]),
    );
    expect(some).toMatchObject({ arms: 1, oneCount: 4, otherCount: 5 });
    expect(valueOf(compareWithin([{ one: [1, 2], other: [3, 4, 5] }]))).toMatchObject({
      arms: 0,
      verdict: 'too-few',
      difference: null,
      interval: null,
    });
  });

  it('is never surer than marking lets it be', () => {
    const equal = { one: [10, 10, 10], other: [9, 9, 9] };
    expect(valueOf(compareWithin([equal])).verdict).toBe('one-larger');
    const marked = valueOf(compareWithin([{ ...equal, oneMarking: [2, 2, 2], otherMarking: [2, 2, 2] }]));
    expect(marked.verdict).toBe('not-distinguishable');
    expect(marked.interval?.high).toBeCloseTo(1 + 1.959964 * Math.sqrt(8 / 3), 5);
  });

  it('refuses what is no number', () => {
    expect(compareWithin([{ one: [1, NaN, 2], other: [1, 2, 3] }])).toEqual({
      ok: false,
      reason: 'not-finite',
    });
    expect(compareWithin([{ one: [1, 3, 2], other: [1, 2, 3], oneMarking: [NaN, 1, 1] }])).toEqual({
      ok: false,
      reason: 'bad-uncertainty',
    });
  });
});
