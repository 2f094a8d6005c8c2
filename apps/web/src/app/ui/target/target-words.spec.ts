import type { Target } from '@stillstroke/contract/targets';
import { sayBand, sayRelation, targetFor } from './target-words';

const target = (more: Partial<Target>): Target => ({
  id: 'a',
  athleteId: 'ines',
  measure: 'verticalAt',
  arm: 'both',
  low: null,
  high: 0.333,
  words: 'early',
  setBy: 'Owen Hale',
  setAt: '2026-06-01T10:00:00.000Z',
  version: 1,
  ...more,
});

describe('words of targets', () => {
  it('an arm’s own target counts before that for both', () => {
    const both = target({});
    const left = target({ id: 'b', arm: 'left' });
    expect(targetFor([both, left], 'verticalAt', 'left')).toBe(left);
    expect(targetFor([both, left], 'verticalAt', 'right')).toBe(both);
    expect(targetFor([left], 'verticalAt', 'right')).toBeNull();
    expect(targetFor([both], 'pull', 'right')).toBeNull();
  });

  it('a band in the unit people read, open on one side or closed', () => {
    expect(sayBand(target({}))).toBe('up to 33.3 %');
    expect(sayBand(target({ low: 0.1, high: null }))).toBe('from 10 %');
    expect(sayBand(target({ measure: 'elbowAtMidPull', low: 90, high: 110 }))).toBe('90 to 110°');
    expect(sayBand(target({ measure: 'peakDrop', low: -2.5, high: 4 }))).toBe('−2.5 to 4°');
    expect(sayBand(target({ measure: 'strokeRate', low: 28, high: null }))).toBe('from 28 a minute');
  });

  it('where a value lies, without a judgement', () => {
    expect(sayRelation({ kind: 'inside' }, 'deg', 2)).toBe('inside the band');
    expect(sayRelation({ kind: 'above', by: 4 }, 'deg', 2)).toBe('above the band by 4° ± 2°');
    expect(sayRelation({ kind: 'below', by: 0.04 }, 'share', 0.02)).toBe('below the band by 4 points ± 2');
    expect(sayRelation({ kind: 'above', by: 0.04 }, 'share', null)).toBe('above the band by 4 points');
    expect(sayRelation({ kind: 'at-edge', edges: ['low'] }, 'deg', 2)).toBe(
      'cannot be told apart from the band’s edge',
    );
    expect(sayRelation({ kind: 'at-edge', edges: ['low', 'high'] }, 'deg', 2)).toBe(
      'cannot be told apart from either edge of the band',
    );
  });
});
