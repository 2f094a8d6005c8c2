import type { Comparison, MeasureComparison } from '@stillstroke/contract/comparison';
import { describe, expect, it } from 'vitest';
import { sayComparison, sayVerdict } from './comparison-sentence';

const nobody = { count: 0, mean: null, interval: null, sd: null, marking: null, samples: [] };

function row(more: Partial<MeasureComparison>): MeasureComparison {
  return {
    measure: 'verticalAt',
    unit: 'share',
    left: { ...nobody, count: 5, mean: 0.34 },
    right: { ...nobody, count: 6, mean: 0.58 },
    difference: 0.24,
    interval: { low: 0.17, high: 0.31 },
    verdict: 'right-larger',
    moreStrokes: null,
    test: null,
    ...more,
  };
}

const splits = (all: MeasureComparison[]): Comparison['splits'] => ({ all, breathing: [], notBreathing: [] });

describe('the sentence of a comparison', () => {
  it('says which arm, by how much, and over how many strokes', () => {
    const said = sayComparison(splits([row({})]));
    expect(said.headline).toBe('The right forearm comes to vertical later');
    expect(said.detail).toBe(
      'Right 58 %, left 34 %: 24 points apart (95 %: 17 to 31), over 6 and 5 strokes.',
    );
  });

  it('says when breathing strokes carry the difference', () => {
    const said = sayComparison({
      all: [row({})],
      breathing: [row({ difference: 0.4 })],
      notBreathing: [row({ difference: 0.05 })],
    });
    expect(said.detail).toContain('most of it on breathing strokes');
  });

  it('never claims a difference that is not settled', () => {
    const said = sayComparison(
      splits([row({ verdict: 'not-distinguishable', moreStrokes: 14, difference: 0.01 })]),
    );
    expect(said.headline).toBe('Left and right cannot be told apart');
    expect(
      sayVerdict(row({ verdict: 'not-distinguishable', moreStrokes: 14, difference: 0.01 })).detail,
    ).toBe('95 %: 17 to 31; about 14 more strokes a side would settle 1 point');
  });

  it('says why an interval off zero is no difference yet: several measures were looked at', () => {
    const push = row({
      verdict: 'not-distinguishable',
      difference: 0.015,
      interval: { low: 0.003, high: 0.028 },
    });
    expect(sayVerdict(push).detail).toBe('95 %: 0.3 to 2.8; among so many measures one such comes by chance');
    const none = row({ verdict: 'not-distinguishable', difference: 0, interval: { low: -0.02, high: 0.02 } });
    expect(sayVerdict(none).detail).toBe('95 %: −2 to 2');
  });

  it('says how many strokes are missing', () => {
    expect(sayComparison(splits([])).headline).toBe('Nothing to compare yet');
    const few = row({ verdict: 'too-few', left: { ...nobody, count: 2 }, right: { ...nobody, count: 1 } });
    expect(sayComparison(splits([few])).headline).toBe('Too few strokes to compare');
    expect(sayVerdict(few).detail).toBe('2 left and 1 right measured; three a side are needed');
  });

  it('looks at the measures in their order, whatever order they come in', () => {
    const drop = row({ measure: 'peakDrop', unit: 'deg', verdict: 'left-larger', difference: -9 });
    expect(sayComparison(splits([drop, row({})])).headline).toBe('The right forearm comes to vertical later');
    expect(sayComparison(splits([drop])).headline).toBe('The left elbow drops more');
  });
});
