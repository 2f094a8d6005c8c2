import { describe, expect, it } from 'vitest';
import { canGoOn, startFor } from './decode-plan';

/** Decode order I0 P3 B1 B2 | I6 B4 B5 P9 B7 B8: the second group is open, its first pictures lead its key frame. */
const RANKS = [0, 3, 1, 2, 6, 4, 5, 9, 7, 8];
const KEYS = new Set([0, 4]);
const order = { rankOf: RANKS, canStartAt: (at: number) => Promise.resolve(KEYS.has(at)) };
const start = (position: number) => startFor(order, position, RANKS[position] ?? 0);

describe('startFor', () => {
  it('takes the nearest start before', async () => {
    expect(await start(3)).toBe(0);
    expect(await start(4)).toBe(4);
    expect(await start(8)).toBe(4);
  });

  it('goes one start farther back for pictures that lead a key frame', async () => {
    expect(await start(5)).toBe(0);
    expect(await start(6)).toBe(0);
  });

  it('is null when nothing can be started at', async () => {
    const none = { rankOf: RANKS, canStartAt: () => Promise.resolve(false) };
    expect(await startFor(none, 3, 2)).toBeNull();
  });
});

describe('canGoOn', () => {
  const at = (next: number, from = 0, pending: number[] = []) => ({
    start: from,
    next,
    pending: new Set(pending),
  });

  it('goes on towards what is still to come', () => {
    expect(canGoOn(at(2), 0, 3, 2)).toBe(true);
  });

  it('starts anew for what has gone by, unless it is still inside the decoder', () => {
    expect(canGoOn(at(4), 0, 3, 2)).toBe(false);
    expect(canGoOn(at(4, 0, [2]), 0, 3, 2)).toBe(true);
  });

  it('starts anew when the decoder started too late to know what the picture refers to', () => {
    expect(canGoOn(at(5, 4), 0, 5, 4)).toBe(false);
  });

  it('decodes through a short gap before a key frame and jumps over a long one', () => {
    expect(canGoOn(at(2), 10, 12, 12)).toBe(true);
    expect(canGoOn(at(2), 100, 112, 112)).toBe(false);
  });
});
