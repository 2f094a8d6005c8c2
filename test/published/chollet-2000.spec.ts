import { indexOfCoordination } from '@stillstroke/geometry/events/coordination';
import { strokePhases } from '@stillstroke/geometry/events/phases';
import type { StrokeEvents } from '@stillstroke/geometry/events/stroke';
import { constantRate, valueOf } from '@stillstroke/geometry/testing/arms';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

/**
 * Chollet D, Chalies S, Chatard JC (2000). A new index of coordination for the crawl: description and usefulness.
 * Int J Sports Med 21(1):54–59. Definition [MEM], consistent with the abstracts of Millet et al. 2002
 * [SEEN coachsci.sdsu.edu/swim/biomechs/millet.htm] and Seifert et al. 2007
 * [SEEN coachsci.sdsu.edu/swim/biomechs/seifert.htm].
 */

/** 10 ms a frame, so that a frame is a percent of a cycle of 1 s. */
const times = constantRate(400, 100);
const ROUNDED = { eventErrorFrames: 0.5 };

function cycle(entry: number, caught: number, exit: number, length: number): StrokeEvents {
  return { entry, catch: entry + caught, exit: entry + exit, nextEntry: entry + length };
}

describe('index of coordination', () => {
  it.each([
    // case, pull and exit of right and left in percent, offset in percent, LT1, LT2, IdC, mode: all [CALC]
    ['opposition', 30, 80, 30, 80, 50, 0, 0, 0, 'undetermined'],
    ['superposition', 28, 82, 28, 82, 50, 4, 4, 4, 'superposition'],
    ['catch-up', 40, 80, 40, 80, 50, -10, -10, -10, 'catch-up'],
    ['asymmetric', 36, 80, 42, 80, 53, -15, -3, -9, 'catch-up'],
  ] as const)('%s [CALC]', (_, pullR, exitR, pullL, exitL, offset, lag1, lag2, index, mode) => {
    const right = [cycle(0, pullR, exitR, 100), cycle(100, pullR, exitR, 100)];
    const left = [cycle(offset, pullL, exitL, 100)];
    const read = valueOf(indexOfCoordination({ left, right }, times, ROUNDED));
    expect(read.from).toBe('right');
    expect(read.cycles[0]?.lag1).toBeCloseTo(lag1, 9);
    expect(read.cycles[0]?.lag2).toBeCloseTo(lag2, 9);
    expect(read.index).toBeCloseTo(index, 9);
    expect(read.mode).toBe(mode);
  });

  it('the worked example: lags, index and phases of both arms [CALC]', () => {
    const right = [cycle(0, 38, 98, 140), cycle(140, 38, 98, 140)];
    const left = [cycle(70, 39, 99, 140)];
    const read = valueOf(indexOfCoordination({ left, right }, times, ROUNDED));
    expect(read.cycles[0]?.lag1).toBeCloseTo(-7.857143, 6);
    expect(read.cycles[0]?.lag2).toBeCloseTo(-6.428571, 6);
    expect(read.index).toBeCloseTo(-7.142857, 6);

    const phases = (stroke: StrokeEvents | undefined, midFrame: number) => {
      if (!stroke) throw new Error('no stroke');
      const mid = { timeUs: midFrame * 10_000, uncertaintyUs: 0, frame: midFrame };
      const { entryAndCatch, pull, push, recovery } = valueOf(strokePhases(stroke, mid, times));
      return [entryAndCatch, pull, push, recovery].map((phase) => 100 * (phase?.share ?? NaN));
    };
    const expected = [
      [27.142857, 20.0, 22.857143, 30.0],
      [27.857143, 19.285714, 23.571429, 29.285714],
    ];
    for (const [arm, stroke, mid] of [
      [0, right[0], 66],
      [1, left[0], 136],
    ] as const) {
      for (const [at, percent] of phases(stroke, mid).entries())
        expect(percent).toBeCloseTo(expected[arm]?.[at] ?? NaN, 6);
    }
  });

  it('equals the mean propulsive share less 50 for periodic arms, whatever their offset [CALC]', () => {
    const arm = fc.record({ caught: fc.integer({ min: 5, max: 50 }), pull: fc.integer({ min: 5, max: 45 }) });
    fc.assert(
      fc.property(arm, arm, fc.integer({ min: 1, max: 99 }), (r, l, offset) => {
        const right = [
          cycle(0, r.caught, r.caught + r.pull, 100),
          cycle(100, r.caught, r.caught + r.pull, 100),
        ];
        const left = [cycle(offset, l.caught, l.caught + l.pull, 100)];
        const read = valueOf(indexOfCoordination({ left, right }, times));
        expect(read.index).toBeCloseTo((r.pull + l.pull) / 2 - 50, 9);
        const { lag1 = NaN, lag2 = NaN } = read.cycles[0] ?? {};
        expect(lag1).toBeCloseTo(r.caught + r.pull - offset - l.caught, 9);
        expect(lag2).toBeCloseTo(offset + l.caught + l.pull - 100 - r.caught, 9);
      }),
    );
  });

  it.each([
    // Printed group means [MEM] and the propulsive shares they imply [CALC]
    [-7.6, 42.4],
    [-3.2, 46.8],
    [-0.9, 49.1],
  ])('a mean index of %f %% [MEM] goes with a propulsive share of %f %% [CALC]', (index, share) => {
    const scale = 10; // 1000 frames a cycle, so that tenths of a percent are frames
    const fine = constantRate(4000, 1000);
    const pull = Math.round(share * scale);
    const right = [cycle(0, 300, 300 + pull, 1000), cycle(1000, 300, 300 + pull, 1000)];
    const left = [cycle(500, 300, 300 + pull, 1000)];
    expect(valueOf(indexOfCoordination({ left, right }, fine)).index).toBeCloseTo(index, 9);
  });
});

describe('refusals', () => {
  const right = [cycle(0, 30, 80, 100), cycle(100, 30, 80, 100)];
  it('says what is missing', () => {
    const read = (left: StrokeEvents[], of = right) => {
      const outcome = indexOfCoordination({ left, right: of }, times);
      return outcome.ok ? null : outcome.reason;
    };
    expect(read([])).toBe('too-few-strokes');
    expect(read([cycle(50, 30, 80, 100)], right.slice(0, 1))).toBe('too-few-strokes');
    expect(read([cycle(20, 30, 80, 100), cycle(60, 30, 80, 100)])).toBe('arms-do-not-alternate');
    expect(read([{ ...cycle(50, 30, 80, 100), exit: 60 }])).toBe('exit-not-after-catch');
  });
});
