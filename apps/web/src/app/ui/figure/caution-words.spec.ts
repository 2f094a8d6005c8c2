import type { CautionSummary } from '@stillstroke/contract/view-cautions';
import { cautionCodes, type ViewCaution } from '@stillstroke/geometry/view/caution';
import { describe, expect, it } from 'vitest';
import { inShort, sayCaution, sayCautionShort, sayCautionSummary } from './caution-words';

const caution: ViewCaution = {
  code: 'foreshortened',
  arm: 'left',
  sizeDeg: 12.4,
  causeDeg: 50.2,
  assumed: false,
  frames: [40],
  affects: [
    { reading: 'forearm', sizeDeg: 12.4 },
    { reading: 'elbow', sizeDeg: 1.24 },
  ],
};

describe('cautions in words', () => {
  it('name the size in degrees in few words and in the sentence, every code', () => {
    for (const code of cautionCodes) {
      const one = { ...caution, code };
      expect(sayCautionShort(one), code).toMatch(/, up to 12°$/);
      expect(sayCaution(one), code).toContain('the forearm may be off by up to 12°, the elbow by up to 1.2°');
      expect(sayCaution(one), code).not.toMatch(/undefined|null|NaN/);
    }
  });

  it('say what they take for granted only where they do', () => {
    const port = { ...caution, code: 'flat-port' } as const;
    expect(sayCaution(port)).not.toContain('70°');
    expect(sayCaution({ ...port, assumed: true })).toContain('70° across in air is taken');
    // 10.5 % longer on the near arm is 9.5 % shorter on the far one.
    expect(sayCaution({ ...caution, code: 'far-arm', causeDeg: null })).toContain('about 10 % shorter');
  });

  it('say readings of one size together', () => {
    const both = { ...caution, affects: caution.affects.map((one) => ({ ...one, sizeDeg: 4 })) };
    expect(sayCaution(both)).toContain('the forearm and the elbow may be off by up to 4°');
  });

  it('over many strokes once for each code and arm, the largest first', () => {
    const far: CautionSummary = {
      code: 'far-arm',
      measure: 'peakDrop',
      arm: 'left',
      sizeDeg: 3,
      assumed: true,
      strokes: 5,
    };
    const short = inShort([
      far,
      { ...far, measure: 'verticalAt', sizeDeg: 4, strokes: 6 },
      { ...far, code: 'plumb-assumed', measure: 'verticalAt', arm: null, sizeDeg: 3.92, strokes: 12 },
    ]);
    expect(short.map(sayCautionSummary)).toEqual([
      'Far arm (left arm): up to 4° on 6 strokes',
      'Plumb assumed: up to 4° on 12 strokes',
    ]);
  });
});
