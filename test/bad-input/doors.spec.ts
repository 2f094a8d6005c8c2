import { describe, expect, it } from 'vitest';
import { sayReason } from '../../apps/web/src/app/ui/figure/reason-words';
import { doors, inner } from './doors';
import { outcomeFunctions, reasonCodes } from './geometry-source';
import { notANumber, spoilt } from './spoil';

describe('every door of the geometry library', () => {
  it('is tried here: a function that answers an outcome has its line in doors.ts', () => {
    expect([...doors, ...inner].map(({ name }) => name).sort()).toEqual(outcomeFunctions().sort());
  });

  it.each([...doors, ...inner])('$name answers to good input', ({ input, enter }) => {
    const answer = enter(...input);
    expect(answer.ok ? 'ok' : answer.reason).toBe('ok');
    expect(notANumber(answer)).toEqual([]);
  });

  it.each(doors)('$name answers to bad input by a value without NaN or by a reason', ({ input, enter }) => {
    let tried = 0;
    let refusals = 0;
    for (const { what, input: bad } of spoilt(input)) {
      tried += 1;
      let answer;
      try {
        answer = enter(...bad);
      } catch (error) {
        throw new Error(`${what}: ${String(error)}`, { cause: error });
      }
      if (answer.ok) expect([what, notANumber(answer.value)]).toEqual([what, []]);
      else {
        refusals += 1;
        expect([what, answer.reason]).toEqual([what, expect.stringMatching(/^[a-z]+(-[a-z]+)*$/)]);
      }
    }
    expect(tried).toBeGreaterThan(5);
    expect(refusals).toBeGreaterThan(0);
  });
});

describe('every reason', () => {
  const unknown = sayReason('no such reason');

  it('has words for the person', () => {
    const codes = reasonCodes();
    expect(codes.length).toBeGreaterThan(50);
    expect(codes.filter((code) => sayReason(code) === unknown)).toEqual([]);
  });

  it('is said differently from every other that asks for something else', () => {
    expect(sayReason(null)).toBe(unknown);
    for (const code of reasonCodes()) expect(sayReason(code)).not.toMatch(/NaN|undefined|null/);
  });
});
