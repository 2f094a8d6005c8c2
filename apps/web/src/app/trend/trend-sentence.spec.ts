import type { Trend } from '@stillstroke/contract/trend';
import { describe, expect, it } from 'vitest';
import { sayTrend } from './trend-sentence';

type ArmTrend = Trend['arms'][number];
const id = '00000000-0000-4000-8000-000000000001';
const point = (arm: 'left' | 'right', date: string, mean: number) => ({
  sessionId: id,
  date,
  arm,
  mean,
  uncertainty: 0.02,
  count: 3,
  sd: 0.02,
  marking: 0.02,
  setUp: 0,
  frames: [],
});
const arm = (side: 'left' | 'right', more: Partial<ArmTrend>): ArmTrend => ({
  arm: side,
  points: [point(side, '2026-07-04', 0.71), point(side, '2026-11-28', 0.58)],
  change: -0.13,
  interval: { low: -0.2, high: -0.06 },
  welch: null,
  detectable: 0.06,
  verdict: 'changed',
  slope: null,
  ...more,
});
const trend = (arms: ArmTrend[], measure: Trend['measure'] = 'verticalAt'): Trend => ({
  athleteId: id,
  measure,
  unit: measure === 'verticalAt' ? 'share' : 'deg',
  measured: [measure],
  view: 'side-underwater',
  stroke: 'full',
  series: [{ view: 'side-underwater', stroke: 'full', sessions: 2 }],
  arms,
  cautions: [],
  leftOut: [],
});

describe('the sentence of a trend', () => {
  it('says a change only where it is more than marking could produce', () => {
    const left = arm('left', { change: -0.01, verdict: 'not-more-than-marking' });
    expect(sayTrend(trend([left, arm('right', {})]))).toBe(
      'Right arm earlier by 13 points since July: more than marking could produce. ' +
        'Left arm 1 point from the first session: not more than marking could produce.',
    );
  });

  it('claims no change where the strokes of one session differ as much', () => {
    const left = arm('left', { change: 0.05, verdict: 'not-more-than-strokes-vary' });
    expect(sayTrend(trend([left]))).toBe(
      'Left arm 5 points from the first session: not more than strokes of one session differ among themselves.',
    );
  });

  it('says when two sessions hold too few strokes', () => {
    const left = arm('left', { change: 0.05, verdict: 'too-few' });
    expect(sayTrend(trend([left]))).toBe('Left arm measured on too few strokes to say whether it moved.');
  });

  it('has a word for each direction of each measure', () => {
    expect(sayTrend(trend([arm('right', { change: 7 })], 'peakDrop'))).toContain('drops 7° more');
    expect(sayTrend(trend([arm('right', { change: -7 })], 'peakDrop'))).toContain('drops 7° less');
  });

  it('says of both arms together what moved', () => {
    const both = arm('left', { arm: 'both', change: 0.03, detectable: 0.01 });
    const said = sayTrend({ ...trend([both], 'coordination'), unit: 'share' });
    expect(said).toContain('Both arms 3 points less gap since July');
  });

  it('claims nothing from one session or none', () => {
    const once = arm('left', {
      points: [point('left', '2026-07-04', 0.7)],
      change: null,
      verdict: 'too-few',
    });
    expect(sayTrend(trend([once]))).toBe('Left arm measured in one session so far.');
    expect(sayTrend(trend([arm('left', { points: [] })]))).toBe('Left arm not measured.');
    expect(sayTrend(trend([]))).toBe('No session with this measure yet.');
  });
});
