import { sayCount, sayDuration, sayMeasured, saySize, saySlowness } from './clip-words';

describe('a clip in words', () => {
  it('counts frames with thousands apart', () => {
    expect(sayCount(300)).toBe('300');
    expect(sayCount(1488)).toBe('1\u202f488');
    expect(sayCount(1234567)).toBe('1\u202f234\u202f567');
  });

  it('says durations and never sixty seconds', () => {
    expect(sayDuration(24_800_000)).toBe('24.8 s');
    expect(sayDuration(65_000_000)).toBe('1 min 05 s');
    expect(sayDuration(119_700_000)).toBe('2 min 00 s');
  });

  it('says sizes', () => {
    expect(saySize(300)).toBe('1 kB');
    expect(saySize(3_840_000)).toBe('3.8 MB');
    expect(saySize(38_400_000)).toBe('38 MB');
    expect(saySize(1_500_000_000)).toBe('1.50 GB');
  });

  it('says how much slower it plays than it was', () => {
    expect(saySlowness(1)).toBe('ordinary speed');
    expect(saySlowness(0.25)).toBe('slow motion, 4 times slower');
    expect(saySlowness(1 / 3)).toBe('slow motion, 3 times slower');
    expect(saySlowness(2)).toBe('sped up, 2 times faster');
  });

  it('says what has been marked', () => {
    expect(sayMeasured({ markedFrames: 0, strokeCount: 0 })).toBe('not marked yet');
    expect(sayMeasured({ markedFrames: 1, strokeCount: 2 })).toBe('1 frame marked, 2 strokes');
  });
});
