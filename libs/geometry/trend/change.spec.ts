import { describe, expect, it } from 'vitest';
import { reasonOf, valueOf } from '../testing/arms';
import { sessionChange } from './change';
import { robustSlope } from './robust-slope';
import { sessionMean } from './session-mean';
import { slopeOf } from './slope';

const session = (values: number[], marking = 2, setUp = 0) =>
  valueOf(sessionMean(values, { marking, setUp }));

describe('change between two sessions', () => {
  it('names a change, and one that marking could have produced', () => {
    const before = session([20, 21, 22, 23]);
    expect(valueOf(sessionChange(before, session([10, 11, 12, 13])))).toMatchObject({
      change: -10,
      verdict: 'changed',
    });
    const small = valueOf(sessionChange(before, session([19, 20, 21, 22])));
    expect(small.verdict).toBe('not-more-than-marking-could-produce');
    expect(small.minimalChange).toBeCloseTo(1.959964 * Math.sqrt((4 + 4) / 4), 5);
  });

  it('keeps apart what the strokes of a session vary among themselves', () => {
    const wide = valueOf(sessionChange(session([10, 20, 30], 0.5), session([15, 25, 35], 0.5)));
    expect(wide.verdict).toBe('not-more-than-strokes-vary');
  });

  it('does not let more strokes shrink the set-up', () => {
    const many = (mean: number) => Array.from({ length: 50 }, (_, i) => mean + (i % 3));
    expect(valueOf(sessionChange(session(many(20)), session(many(22)))).verdict).toBe('changed');
    const moved = valueOf(sessionChange(session(many(20), 2, 1.5), session(many(22), 2, 1.5)));
    expect(moved.verdict).toBe('not-more-than-marking-could-produce');
  });

  it('gives no verdict for too few strokes, and none of NaN for equal ones', () => {
    expect(valueOf(sessionChange(session([20, 21]), session([1, 2, 3])))).toMatchObject({
      verdict: 'too-few',
      interval: null,
    });
    const equal = valueOf(sessionChange(session([5, 5, 5], 0), session([5, 5, 5], 0)));
    expect(equal).toMatchObject({
      change: 0,
      minimalChange: 0,
      verdict: 'not-more-than-marking-could-produce',
    });
    expect(reasonOf(sessionMean([], { marking: 1 }))).toBe('empty');
    expect(reasonOf(sessionMean([1], { marking: -1 }))).toBe('bad-uncertainty');
    expect(reasonOf(sessionMean([NaN], { marking: 1 }))).toBe('not-finite');
  });

  it('counts one stroke by its marking', () => {
    expect(session([7], 3)).toMatchObject({ count: 1, sd: null, uncertainty: 3 });
  });
});

describe('slopes', () => {
  const line = [0, 7, 14, 21].map((x) => ({ x, y: 100 - x / 7 }));

  it('need four sessions at different times', () => {
    expect(reasonOf(slopeOf(line.slice(0, 3)))).toBe('too-few-sessions');
    expect(reasonOf(robustSlope(line.slice(0, 3)))).toBe('too-few-sessions');
    const together = line.map(({ y }) => ({ x: 3, y }));
    expect(reasonOf(slopeOf(together))).toBe('one-moment');
    expect(reasonOf(robustSlope(together))).toBe('one-moment');
    expect(reasonOf(slopeOf([...line, { x: NaN, y: 1 }]))).toBe('not-finite');
    expect(reasonOf(slopeOf(line.map((point) => ({ ...point, uncertainty: 0 }))))).toBe('bad-uncertainty');
    expect(reasonOf(slopeOf(line.map((point, i) => (i ? { ...point, uncertainty: 1 } : point))))).toBe(
      'bad-uncertainty',
    );
  });

  it('never claim more than the sessions’ own uncertainties allow', () => {
    const sure = valueOf(slopeOf(line.map((point) => ({ ...point, uncertainty: 2 }))));
    expect(sure.slope).toBeCloseTo(-1 / 7, 9);
    expect(sure.scatter).toBeCloseTo(0, 9);
    expect(sure.interval.low).toBeLessThan(-0.3);
    expect(sure.interval.high).toBeGreaterThan(0);
  });

  it('the robust one stays when a session goes wrong', () => {
    const wrong = [0, 7, 14, 21, 28, 35, 42].map((x) => ({ x, y: x === 21 ? 300 : 100 - x / 7 }));
    expect(valueOf(robustSlope(wrong)).slope).toBeCloseTo(-1 / 7, 9);
    expect(Math.abs(valueOf(slopeOf(wrong)).intercept - 100)).toBeGreaterThan(10);
  });

  it('handle equal values', () => {
    const flat = line.map(({ x }) => ({ x, y: 5 }));
    expect(valueOf(slopeOf(flat))).toMatchObject({ slope: 0, explained: null });
    expect(valueOf(robustSlope(flat))).toMatchObject({ slope: 0, kendallS: 0 });
  });
});
