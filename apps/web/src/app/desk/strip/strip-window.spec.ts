import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { following, frameAt, moved, typicalFrameUs, wholeClip, zoomed } from './strip-window';

const sixty = Array.from({ length: 1200 }, (_, frame) => Math.round((frame * 1_000_000) / 60));
const whole = wholeClip(sixty);
const frameUs = typicalFrameUs(sixty);

describe('the window of the strip', () => {
  it('holds the time under the pointer when zooming, and never leaves the clip', () => {
    fc.assert(
      fc.property(
        fc.array(
          fc.record({
            factor: fc.double({ min: 0.3, max: 3, noNaN: true }),
            share: fc.double({ min: 0, max: 1, noNaN: true }),
          }),
          { maxLength: 30 },
        ),
        (steps) => {
          let window = whole;
          for (const { factor, share } of steps) {
            const before = window.fromUs + share * (window.toUs - window.fromUs);
            window = zoomed(window, whole, frameUs, factor, share);
            expect(window.fromUs).toBeGreaterThanOrEqual(whole.fromUs - 1e-3);
            expect(window.toUs).toBeLessThanOrEqual(whole.toUs + 1e-3);
            expect(window.toUs - window.fromUs).toBeGreaterThan(0);
            const touchesEdge = window.fromUs <= whole.fromUs + 1 || window.toUs >= whole.toUs - 1;
            const after = window.fromUs + share * (window.toUs - window.fromUs);
            if (!touchesEdge) expect(after).toBeCloseTo(before, 0);
          }
        },
      ),
    );
  });

  it('comes as close as a dozen frames', () => {
    const close = zoomed(whole, whole, frameUs, 1e9, 0.5);
    expect((close.toUs - close.fromUs) / frameUs).toBeCloseTo(12);
  });

  it('follows the playhead and otherwise stays', () => {
    const window = { fromUs: 1_000_000, toUs: 3_000_000 };
    expect(following(window, whole, 2_000_000)).toBe(window);
    expect(following(window, whole, 3_500_000).toUs).toBeGreaterThan(3_500_000);
    expect(following(window, whole, 0).fromUs).toBe(0);
    expect(moved(window, whole, -9e9).fromUs).toBe(0);
  });

  it('finds the frame at a time by the frames’ own times', () => {
    const uneven = [0, 10, 11, 500, 1000];
    expect([-5, 0, 10, 10.5, 11, 499, 500, 5000].map((time) => frameAt(uneven, time))).toEqual([
      0, 0, 1, 1, 2, 2, 3, 4,
    ]);
    expect(frameAt([7], 3)).toBe(0);
  });
});
