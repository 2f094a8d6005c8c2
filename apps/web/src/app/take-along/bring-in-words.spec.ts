import type { ImportClip } from '@stillstroke/contract/import';
import { hasChange, hasConflict, sayCounts, sayFigures, saySetUp } from './bring-in-words';

const none = { new: 0, changed: 0, same: 0, onlyHere: 0 };
const clip = (more: Partial<ImportClip>): ImportClip => ({
  from: { id: 'a', name: 'lane-four.mp4', date: '2026-03-02' },
  to: { id: 'b', name: 'lane-four.mp4' },
  foundBy: 'film',
  refusal: null,
  setUp: [],
  strokes: none,
  marks: none,
  figures: { same: 0, different: 0 },
  ...more,
});

describe('words about what would be brought in', () => {
  it('count what is new, different, the same and only here', () => {
    expect(sayCounts({ new: 4, changed: 1, same: 10, onlyHere: 2 })).toBe(
      '4 new, 1 different, 10 the same, 2 only here',
    );
    expect(sayCounts(none)).toBe('none');
  });

  it('name what of the set-up differs', () => {
    expect(saySetUp([])).toBe('the same');
    expect(saySetUp(['plumb'])).toBe('plumb differs');
    expect(saySetUp(['travel', 'captureRateFactor'])).toBe('direction of travel, capture rate factor differ');
  });

  it('say whether figures come out the same', () => {
    expect(sayFigures({ same: 40, different: 0 })).toBe('all 40 come out the same');
    expect(sayFigures({ same: 39, different: 1 })).toMatch(/^1 of 40 come out otherwise/);
  });

  it('ask for a choice only where something here would be touched', () => {
    expect(hasConflict(clip({ marks: { ...none, new: 3 } }))).toBe(false);
    expect(hasChange(clip({ marks: { ...none, new: 3 } }))).toBe(true);
    expect(hasConflict(clip({ strokes: { ...none, changed: 1 } }))).toBe(true);
    expect(hasConflict(clip({ marks: { ...none, onlyHere: 1 } }))).toBe(true);
    expect(hasConflict(clip({ setUp: ['plumb'] }))).toBe(true);
    expect(hasChange(clip({ marks: { ...none, same: 3 } }))).toBe(false);
  });
});
