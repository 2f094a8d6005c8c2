import { describe, expect, it } from 'vitest';
import { nextPrefetch, type PrefetchView } from './prefetch';

function view(over: Partial<PrefetchView>, cached: number[] = []): PrefetchView {
  const at = new Set(cached);
  return { focus: 100, direction: 0, count: 200, capacity: 20, settled: (frame) => at.has(frame), ...over };
}

const range = (from: number, to: number): number[] =>
  Array.from({ length: to - from + 1 }, (_, n) => from + n);

describe('nextPrefetch', () => {
  it('forward, fetches the first frame that is missing', () => {
    expect(nextPrefetch(view({ direction: 1 }, [101, 102]))).toEqual({ goal: 103, keepFrom: 103 });
  });

  it('forward, stops at half the capacity and at the end of the clip', () => {
    expect(nextPrefetch(view({ direction: 1 }, range(101, 110)))).toBeNull();
    expect(nextPrefetch(view({ direction: 1, focus: 199 }))).toBeNull();
  });

  it('fetches only a few frames while the direction is open', () => {
    expect(nextPrefetch(view({ capacity: 500 }, range(101, 106)))).toBeNull();
    expect(nextPrefetch(view({ capacity: 500 }, range(101, 105)))).toEqual({ goal: 106, keepFrom: 106 });
  });

  it('back, fetches a chunk as soon as less than half of one is left', () => {
    expect(nextPrefetch(view({ direction: -1 }, range(96, 99)))).toEqual({ goal: 95, keepFrom: 84 });
    expect(nextPrefetch(view({ direction: -1 }, range(93, 99)))).toBeNull();
  });

  it('back, stops at the first frame', () => {
    expect(nextPrefetch(view({ direction: -1, focus: 3 }, [0, 1, 2]))).toBeNull();
    expect(nextPrefetch(view({ direction: -1, focus: 3 }, [1, 2]))).toEqual({ goal: 0, keepFrom: 0 });
  });

  it('forward, does nothing when there is room for one frame only', () => {
    expect(nextPrefetch(view({ direction: 1, capacity: 1 }))).toBeNull();
  });
});
