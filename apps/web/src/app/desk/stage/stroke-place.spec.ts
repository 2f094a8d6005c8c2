import { describe, expect, it } from 'vitest';
import { strokePlace } from './stroke-place';

/** Frames 0 to 9 at uneven times. */
const times = [0, 10, 20, 30, 40, 100, 110, 120, 130, 140];
const stroke = { arm: 'right', entry: 1, catch: 3, exit: 7 } as const;

describe('strokePlace', () => {
  it('gives the share of the pull by time, not by frames', () => {
    expect(strokePlace(stroke, 3, times)).toBe('right pull, 0 %');
    expect(strokePlace(stroke, 5, times)).toBe('right pull, 78 %');
    expect(strokePlace(stroke, 7, times)).toBe('right pull, 100 %');
  });

  it('names what is before and after the pull', () => {
    expect(strokePlace(stroke, 2, times)).toBe('right entry and catch');
    expect(strokePlace(stroke, 8, times)).toBe('right recovery');
  });

  it('says as much as the events allow', () => {
    expect(strokePlace(null, 3, times)).toBe('');
    expect(strokePlace({ ...stroke, catch: null, exit: null }, 5, times)).toBe('right entry and catch');
    expect(strokePlace({ ...stroke, arm: 'left', exit: null }, 5, times)).toBe('left pull');
    expect(strokePlace(stroke, 5, [])).toBe('right pull');
  });
});
