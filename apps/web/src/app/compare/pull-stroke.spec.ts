import { describe, expect, it } from 'vitest';
import { forearmAt, frameAtShare, typicalStroke, type ComparedStroke } from './pull-stroke';

function stroke(arm: 'left' | 'right', atShare: readonly (readonly [number, number])[]): ComparedStroke {
  return {
    clipId: '00000000-0000-4000-8000-000000000001',
    strokeId:
      `00000000-0000-4000-8000-0000000000${atShare.length}${Math.abs(Math.round(atShare[0]?.[1] ?? 0))}`.slice(
        0,
        36,
      ),
    arm,
    breath: false,
    catch: 10,
    exit: 20,
    dropCurve: [],
    forearmCurve: atShare.map(([share, deg], at) => ({ frame: 10 + at, share, deg, uncertaintyDeg: 1 })),
  };
}

describe('strokes shown side by side', () => {
  it('interpolates only between marks', () => {
    const one = stroke('left', [
      [0, 80],
      [0.4, 20],
      [0.8, -60],
    ]);
    expect(forearmAt(one, 0.2)).toBeCloseTo(50);
    expect(forearmAt(one, 0.6)).toBeCloseTo(-20);
    const far = stroke('left', [
      [0, 80],
      [0.6, 20],
    ]);
    expect(forearmAt(far, 0.3)).toBeNull();
    expect(
      forearmAt(
        stroke('left', [
          [0.2, 80],
          [0.5, 20],
        ]),
        0.1,
      ),
    ).toBeNull();
    expect(
      forearmAt(
        stroke('left', [
          [0.2, 80],
          [0.5, 20],
        ]),
        0.9,
      ),
    ).toBeNull();
  });

  it('shows the middle stroke of the arm, not the extreme one', () => {
    const curves = [10, 60, 30].map((deg) =>
      stroke('right', [
        [0, 90],
        [0.4, deg],
        [0.6, 0],
        [1, -60],
      ]),
    );
    expect(typicalStroke(curves, 'right')).toBe(curves[2]);
    expect(typicalStroke(curves, 'left')).toBeNull();
  });

  it('finds the frame by time, also where the rate varies', () => {
    // Frames 10…20: the first half of the pull's time lies in its last two frames.
    const times = Array.from({ length: 21 }, (_, frame) => frame * 1000);
    times[19] = 100_000;
    times[20] = 200_000;
    const one = stroke('left', [
      [0, 80],
      [1, 0],
    ]);
    expect(frameAtShare(one, 0, times)).toBe(10);
    expect(frameAtShare(one, 0.5, times)).toBe(19);
    expect(frameAtShare(one, 1, times)).toBe(20);
  });
});
