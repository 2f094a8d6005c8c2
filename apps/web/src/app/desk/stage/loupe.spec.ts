import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { LOUPE_SIDE, loupePlace, loupeScale } from './loupe';
import { wheelFactor } from './pointer-feed';
import { stagePoint } from './spaces';

const stages = fc.record({
  width: fc.integer({ min: 370, max: 2000 }),
  height: fc.integer({ min: 370, max: 1400 }),
});
const share = fc.double({ min: 0, max: 1, noNaN: true });

describe('loupe', () => {
  it.each(['mouse', 'pen', 'touch'] as const)('never lies under a %s, and never off the stage', (kind) => {
    fc.assert(
      fc.property(stages, share, share, (stage, x, y) => {
        const pointer = stagePoint(x * stage.width, y * stage.height);
        const place = loupePlace(pointer, kind, stage);
        const inside =
          pointer.x > place.x &&
          pointer.x < place.x + LOUPE_SIDE &&
          pointer.y > place.y &&
          pointer.y < place.y + LOUPE_SIDE;
        expect(inside).toBe(false);
        expect(place.x).toBeGreaterThanOrEqual(0);
        expect(place.y).toBeGreaterThanOrEqual(0);
        expect(place.x + LOUPE_SIDE).toBeLessThanOrEqual(stage.width);
        expect(place.y + LOUPE_SIDE).toBeLessThanOrEqual(stage.height);
      }),
    );
  });

  it('enlarges four to eight times, always more than the stage, and goes when the stage shows as much', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.05, max: 64, noNaN: true }), (scale) => {
        const loupe = loupeScale(scale);
        if (scale >= 8) expect(loupe).toBeNull();
        else {
          expect(loupe).toBeGreaterThanOrEqual(4);
          expect(loupe).toBeLessThanOrEqual(8);
          expect(loupe).toBeGreaterThan(scale);
        }
      }),
    );
  });
});

describe('wheelFactor', () => {
  it('zooms in upwards, out downwards, and undoes itself', () => {
    const up = wheelFactor({ deltaY: -100, deltaMode: 0, ctrlKey: false });
    const down = wheelFactor({ deltaY: 100, deltaMode: 0, ctrlKey: false });
    expect(up).toBeGreaterThan(1);
    expect(up * down).toBeCloseTo(1, 12);
  });

  it('reads lines as more than pixels and never leaps', () => {
    const lines = wheelFactor({ deltaY: -3, deltaMode: 1, ctrlKey: false });
    const pixels = wheelFactor({ deltaY: -3, deltaMode: 0, ctrlKey: false });
    expect(lines).toBeGreaterThan(pixels);
    expect(wheelFactor({ deltaY: -1e6, deltaMode: 2, ctrlKey: true })).toBeLessThan(12);
  });
});
