import { describe, expect, it } from 'vitest';
import { strokeMeasures } from './stroke-measures';
import { measuredByName, strokeMeasureNames } from './measured-by-name';

const times = Array.from({ length: 200 }, (_, frame) => frame * 20_000);
const stroke = { entry: 0, catch: 20, exit: 60, nextEntry: 80 };
const context = {
  plumb: { top: { x: 900, y: 100 }, bottom: { x: 900, y: 900 } },
  travel: 'right',
  jointUncertaintyPx: { shoulder: 3, elbow: 2, wrist: 2 },
  distance: { metres: 5, uncertaintyM: 0.1, fromFrame: 0, toFrame: 170 },
} as const;

function arm(frame: number, forearmDeg: number, upperArmDeg: number) {
  const from = (start: { x: number; y: number }, deg: number, length: number) => ({
    x: start.x + length * Math.sin((deg * Math.PI) / 180),
    y: start.y + length * Math.cos((deg * Math.PI) / 180),
  });
  const shoulder = { x: 900, y: 300 };
  const elbow = from(shoulder, upperArmDeg, 200);
  return { frame, shoulder, elbow, wrist: from(elbow, forearmDeg, 180) };
}
const marks = [arm(20, 75, 80), arm(30, 45, 45), arm(40, 10, 10), arm(50, -20, -20), arm(60, -60, -55)];
const measures = strokeMeasures(stroke, marks, times, context);

describe('a measure by its name', () => {
  it('carries parts largest first that add up to its uncertainty, and frames that ascend', () => {
    for (const name of strokeMeasureNames) {
      const found = measuredByName(name, measures);
      if (!found.ok) throw new Error(`${name}: ${found.reason}`);
      const { uncertainty, parts, frames, interval, value } = found.value;
      const alone = parts.map((part) => part.alone);
      expect(alone, name).toEqual([...alone].sort((a, b) => b - a));
      expect(Math.hypot(...alone), name).toBeCloseTo(uncertainty, 9);
      expect(
        parts.reduce((sum, { share }) => sum + share, 0),
        name,
      ).toBeCloseTo(1, 9);
      expect([...frames], name).toEqual([...frames].sort((a, b) => a - b));
      expect(interval.low <= value && value <= interval.high, name).toBe(true);
    }
  });

  it('gives 37.5 cycles a minute for a cycle of 1.6 s, with two entries chosen to a frame', () => {
    const found = measuredByName('strokeRate', measures);
    if (!found.ok) throw new Error(found.reason);
    expect(found.value.value).toBeCloseTo(37.5, 12);
    // u(T) = √2·Δ/√3 inside the clip, the first frame has one neighbour only but the same Δ.
    expect(found.value.uncertainty).toBeCloseTo((37.5 * ((0.02 * Math.SQRT2) / Math.sqrt(3))) / 1.6, 9);
    expect(found.value.frames).toEqual([0, 80]);
  });

  it('says why there is none', () => {
    const open = { ...stroke, nextEntry: null };
    const without = strokeMeasures(open, marks.slice(0, 1), times, context);
    expect(measuredByName('strokeRate', without)).toEqual({
      ok: false,
      reason: 'no-next-entry',
    });
    expect(measuredByName('strokeLength', without)).toEqual({ ok: false, reason: 'no-next-entry' });
    const unknown = strokeMeasures(stroke, marks, times, { ...context, distance: null });
    expect(measuredByName('strokeIndex', unknown)).toEqual({ ok: false, reason: 'no-distance' });
    expect(measuredByName('pull', without)).toEqual({ ok: false, reason: 'no-next-entry' });
    const few = strokeMeasures(stroke, marks.slice(0, 1), times, context);
    expect(measuredByName('push', few)).toEqual({ ok: false, reason: 'too-few-marks' });
  });
});
