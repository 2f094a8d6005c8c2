import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { reasonOf, valueOf } from '../testing/arms';
import { band, figureAgainstBand, relationToBand } from './band';

const third = valueOf(band(0.2, 0.35));
const around = (value: number, half: number) => ({ low: value - half, high: value + half });

describe('a band', () => {
  it('has at least one end, finite, low below high', () => {
    expect(valueOf(band(null, 0.35))).toEqual({ low: null, high: 0.35 });
    expect(reasonOf(band(null, null))).toBe('open-on-both-sides');
    expect(reasonOf(band(0.4, 0.35))).toBe('ends-crossed');
    expect(reasonOf(band(0.35, 0.35))).toBe('ends-crossed');
    for (const end of [NaN, Infinity, -Infinity]) {
      expect(reasonOf(band(end, 0.35))).toBe('not-finite');
      expect(reasonOf(band(null, end))).toBe('not-finite');
    }
  });
});

describe('a value against a band', () => {
  const relation = (value: number, half: number, target = third) =>
    valueOf(relationToBand(value, around(value, half), target));

  it('is inside, beyond an end, or not to be told from it', () => {
    expect(relation(0.27, 0.05)).toEqual({ kind: 'inside' });
    expect(relation(0.1, 0.05)).toEqual({ kind: 'below', by: expect.closeTo(0.1, 12) as number });
    expect(relation(0.45, 0.05)).toEqual({ kind: 'above', by: expect.closeTo(0.1, 12) as number });
    expect(relation(0.33, 0.05)).toEqual({ kind: 'at-edge', edges: ['high'] });
    expect(relation(0.38, 0.05)).toEqual({ kind: 'at-edge', edges: ['high'] });
    expect(relation(0.19, 0.05)).toEqual({ kind: 'at-edge', edges: ['low'] });
    // So wide that it says nothing about either end.
    expect(relation(0.27, 0.5)).toEqual({ kind: 'at-edge', edges: ['low', 'high'] });
  });

  it('knows no end on the open side', () => {
    const from = valueOf(band(120, null));
    expect(relation(500, 10, from)).toEqual({ kind: 'inside' });
    expect(relation(115, 10, from)).toEqual({ kind: 'at-edge', edges: ['low'] });
    expect(relation(100, 10, from)).toEqual({ kind: 'below', by: 20 });
  });

  it('takes an end as belonging to the band, and 1.96 uncertainties as the interval', () => {
    expect(relation(1, 0, valueOf(band(1, 2)))).toEqual({ kind: 'inside' });
    const upTo = valueOf(band(null, 10));
    expect(valueOf(figureAgainstBand(12, 1.01, upTo))).toEqual({ kind: 'above', by: 2 });
    expect(valueOf(figureAgainstBand(12, 1.03, upTo))).toEqual({ kind: 'at-edge', edges: ['high'] });
    expect(valueOf(figureAgainstBand(8, 1.01, upTo))).toEqual({ kind: 'inside' });
  });

  it('refuses what is no number and an interval that does not hold its value', () => {
    for (const wrong of [NaN, Infinity, -Infinity]) {
      expect(reasonOf(figureAgainstBand(wrong, 1, third))).toBe('not-finite');
      expect(reasonOf(figureAgainstBand(1, wrong, third))).toBe('not-finite');
    }
    expect(reasonOf(relationToBand(1, { low: 2, high: 3 }, third))).toBe('interval-crossed');
    expect(reasonOf(figureAgainstBand(1, -1, third))).toBe('interval-crossed');
  });

  const number = fc.double({ min: -500, max: 500, noNaN: true });
  const half = fc.double({ min: 0, max: 200, noNaN: true });

  it('says exactly one thing, and what it says holds for every value of the interval', () => {
    fc.assert(
      fc.property(
        number,
        number,
        number,
        half,
        fc.double({ min: 0, max: 1, noNaN: true }),
        (a, b, value, h, t) => {
          fc.pre(a !== b);
          const target = valueOf(band(Math.min(a, b), Math.max(a, b)));
          const interval = around(value, h);
          const said = valueOf(relationToBand(value, interval, target));
          const any = Math.min(Math.max(interval.low + t * 2 * h, interval.low), interval.high);
          const [low, high] = [target.low ?? NaN, target.high ?? NaN];
          if (said.kind === 'inside') expect(any >= low && any <= high).toBe(true);
          if (said.kind === 'below') expect(any < low && said.by > 0).toBe(true);
          if (said.kind === 'above') expect(any > high && said.by > 0).toBe(true);
          if (said.kind === 'at-edge') {
            for (const edge of said.edges) {
              const end = edge === 'low' ? low : high;
              expect(interval.low <= end && end <= interval.high).toBe(true);
            }
          }
        },
      ),
    );
  });

  it('turns round with the sign: below becomes above', () => {
    const turned = { inside: 'inside', below: 'above', above: 'below', 'at-edge': 'at-edge' } as const;
    fc.assert(
      fc.property(number, number, half, (end, value, h) => {
        const said = valueOf(relationToBand(value, around(value, h), { low: end, high: null }));
        const mirrored = valueOf(relationToBand(-value, around(-value, h), { low: null, high: -end }));
        expect(mirrored.kind).toBe(turned[said.kind]);
      }),
    );
  });

  it('never becomes surer as the interval widens', () => {
    fc.assert(
      fc.property(number, half, half, (value, h, more) => {
        const target = { low: -50, high: 50 };
        const narrow = valueOf(relationToBand(value, around(value, h), target));
        const wide = valueOf(relationToBand(value, around(value, h + more), target));
        if (narrow.kind === 'at-edge') expect(wide.kind).toBe('at-edge');
        else expect([narrow.kind, 'at-edge']).toContain(wide.kind);
      }),
    );
  });
});
