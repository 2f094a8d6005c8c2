import { describe, expect, it } from 'vitest';
import { armLines, strokesOfKind } from './curve-lines';
import type { ComparedStroke } from './pull-stroke';

let made = 0;
function stroke(
  marks: readonly (readonly [number, number])[],
  more: Partial<ComparedStroke> = {},
): ComparedStroke {
  const curve = marks.map(([share, deg], at) => ({ frame: 10 + at, share, deg, uncertaintyDeg: 1 }));
  return {
    clipId: '00000000-0000-4000-8000-000000000001',
    strokeId: `00000000-0000-4000-8000-${String(++made).padStart(12, '0')}`,
    arm: 'left',
    breath: false,
    catch: 10,
    exit: 20,
    forearmCurve: curve,
    dropCurve: curve.map((point) => ({ ...point, deg: point.deg / 10 })),
    ...more,
  };
}
const third = 1 / 3;

describe('curves over the pull', () => {
  it('are drawn straight between neighbouring marks, with a gap where marks are too far apart', () => {
    const [line] = armLines(
      [
        stroke([
          [0.1, 80],
          [0.3, 60],
          [0.8, -20],
          [1, -60],
        ]),
      ],
      'left',
      'forearm',
    ).strokes;
    expect(line?.runs.map((run) => run.map(({ share }) => share))).toEqual([
      [0.1, 0.3],
      [0.8, 1],
    ]);
  });

  it('have a mean and a spread where at least two strokes support them, and nothing elsewhere', () => {
    const lines = armLines(
      [
        stroke([
          [0, 80],
          [third, 50],
          [2 * third, 0],
          [1, -60],
        ]),
        stroke([
          [0, 90],
          [third, 54],
          [2 * third, 4],
        ]),
        stroke([[0.5, 20]], { arm: 'right' }),
      ],
      'left',
      'forearm',
    );
    const [run, ...more] = lines.mean;
    expect(more).toEqual([]);
    expect(run?.at(0)).toEqual({ share: 0, deg: 85, sd: expect.closeTo(Math.sqrt(50), 9) as number });
    // The second stroke ends at two thirds: no mean of one.
    expect(run?.at(-1)?.share).toBe(0.66);
    expect(lines.percents[90]).toMatchObject({ count: 1, sd: null });
    expect(lines.percents[100]?.mean).toBeCloseTo(-60, 9);
  });

  it('keep the same rule for the elbow drop', () => {
    const [line] = armLines(
      [
        stroke([
          [0, 80],
          [0.4, 20],
        ]),
      ],
      'left',
      'drop',
    ).strokes;
    expect(line?.runs).toHaveLength(1);
    expect(line?.runs[0]?.map(({ deg }) => deg)).toEqual([8, 2]);
  });

  it('are parted by breath', () => {
    const strokes = [stroke([[0, 1]]), stroke([[0, 2]], { breath: true })];
    expect(strokesOfKind(strokes, 'all')).toHaveLength(2);
    expect(strokesOfKind(strokes, 'breathing')).toEqual([strokes[1]]);
    expect(strokesOfKind(strokes, 'others')).toEqual([strokes[0]]);
  });
});
