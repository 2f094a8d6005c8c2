import { describe, expect, it } from 'vitest';
import { FrameCache } from './frame-cache';

class Picture {
  closed = 0;
  close(): void {
    this.closed += 1;
  }
}

function filled(budget: number, ranks: number[], focus: number, direction: -1 | 0 | 1) {
  const cache = new FrameCache<Picture>(budget);
  const pictures = new Map<number, Picture>();
  cache.look(focus, direction);
  for (const rank of ranks) {
    const picture = new Picture();
    pictures.set(rank, picture);
    cache.offer(rank, picture, 10);
  }
  const kept = [...pictures.keys()].filter((rank) => cache.has(rank));
  return { cache, pictures, kept };
}

describe('FrameCache', () => {
  it('stays within its budget and closes every picture exactly once', () => {
    const { cache, pictures, kept } = filled(50, [0, 1, 2, 3, 4, 5, 6, 7, 8, 9], 9, 0);
    expect(cache.bytes).toBe(50);
    expect(kept).toEqual([5, 6, 7, 8, 9]);
    cache.clear();
    expect([...pictures.values()].map((one) => one.closed)).toEqual(new Array(10).fill(1));
    expect({ bytes: cache.bytes, size: cache.size }).toEqual({ bytes: 0, size: 0 });
  });

  it('refuses what is farther than all it holds', () => {
    const { kept, pictures } = filled(30, [10, 11, 12, 50], 10, 0);
    expect(kept).toEqual([10, 11, 12]);
    expect(pictures.get(50)?.closed).toBe(1);
  });

  it('lets go of what lies against the stepping direction first', () => {
    expect(filled(40, [17, 18, 19, 20, 21, 22], 20, -1).kept).toEqual([17, 18, 19, 20]);
    expect(filled(40, [23, 22, 21, 20, 19, 18], 20, 1).kept).toEqual([23, 22, 21, 20]);
  });

  it('keeps the frame in focus even when it alone is above the budget', () => {
    const { kept, cache } = filled(5, [3, 4], 4, 0);
    expect(kept).toEqual([4]);
    expect(cache.size).toBe(1);
  });

  it('closes the picture that a second one of the same rank replaces', () => {
    const cache = new FrameCache<Picture>(100);
    const [first, second] = [new Picture(), new Picture()];
    cache.offer(1, first, 10);
    cache.offer(1, second, 10);
    expect([first.closed, second.closed, cache.bytes]).toEqual([1, 0, 10]);
  });
});
