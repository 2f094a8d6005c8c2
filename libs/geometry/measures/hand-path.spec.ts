import { describe, expect, it } from 'vitest';
import { fitScale, type PictureScale } from '../calibration/picture-scale';
import { markOf, reasonOf, valueOf } from '../testing/arms';
import { handPath } from './hand-path';

const scale: PictureScale = {
  kind: 'length',
  plane: 'swimmer',
  from: { x: 0, y: 0 },
  to: { x: 400, y: 0 },
  metres: 2,
  uncertaintyM: 0,
};
const fitted = (given: PictureScale) => valueOf(fitScale(given, 1));
const stroke = { entry: 0, catch: 10, exit: 30, nextEntry: null };
const marks = [
  { frame: 0, ...markOf(500, 200, 600, 210, 700, 180) },
  { frame: 10, ...markOf(500, 200, 600, 220, 690, 240) },
  { frame: 20, ...markOf(500, 200, 540, 290, 520, 380) },
  { frame: 30, ...markOf(500, 200, 440, 260, 400, 250) },
];
const context = {
  travel: 'right',
  plumb: { top: { x: 50, y: 0 }, bottom: { x: 50, y: 600 } },
  jointUncertaintyPx: { shoulder: 2, elbow: 1, wrist: 1 },
} as const;

describe('hand path', () => {
  it('reaches 200 px at 5 mm a pixel, and goes 180 px deep', () => {
    const { reachAtEntry, handDepth } = handPath(fitted(scale), stroke, marks, context);
    const reach = valueOf(reachAtEntry);
    expect(reach.metres).toBeCloseTo(1, 12);
    expect(reach.frame).toBe(0);
    // Scale √2/400 of 1 m; places √(2² + 1²) px of 5 mm; plumb √2/600 of the 20 px upward.
    const parts = [Math.SQRT2 / 400, Math.sqrt(5) * 0.005, (0.1 * Math.SQRT2) / 600];
    expect(reach.uncertaintyM).toBeCloseTo(Math.hypot(...parts), 5);
    const alone = Object.fromEntries(reach.parts.map((part) => [part.source, part.alone]));
    expect(alone['shoulder-mark']).toBeCloseTo(0.01, 5);
    expect(alone['wrist-mark']).toBeCloseTo(0.005, 5);
    expect(alone['scale']).toBeCloseTo(Math.SQRT2 / 400, 5);
    expect(reach.parts.map((part) => part.source)).toEqual(['shoulder-mark', 'wrist-mark', 'scale', 'roll']);
    const depth = valueOf(handDepth);
    expect(depth.metres).toBeCloseTo(0.9, 12);
    expect(depth.frame).toBe(20);
    expect(depth.frames).toEqual([10, 20, 30]);
  });

  it('keeps its signs for a swimmer to the left, and turns with the plumb', () => {
    const mirrored = marks.map(({ frame, shoulder, elbow, wrist }) => {
      const m = ({ x, y }: { x: number; y: number }) => ({ x: 1000 - x, y });
      return { frame, shoulder: m(shoulder), elbow: m(elbow), wrist: m(wrist) };
    });
    const left = handPath(fitted(scale), stroke, mirrored, { ...context, travel: 'left' });
    expect(valueOf(left.reachAtEntry).metres).toBeCloseTo(1, 12);
    // A plumb that leans by 45° in the picture: ahead is half right, half up. 200 right and 20 up give 220/√2.
    const leaning = { top: { x: 0, y: 0 }, bottom: { x: 300, y: 300 } };
    const turned = handPath(fitted(scale), stroke, marks, { ...context, plumb: leaning });
    expect(valueOf(turned.reachAtEntry).metres).toBeCloseTo((220 / Math.SQRT2) * 0.005, 9);
  });

  it('is refused by name: another plane, no mark on the entry, too few marks', () => {
    const wall = handPath(fitted({ ...scale, plane: 'wall' }), stroke, marks, context);
    expect(reasonOf(wall.reachAtEntry)).toBe('scale-of-other-plane');
    expect(reasonOf(wall.handDepth)).toBe('scale-of-other-plane');
    const few = handPath(fitted(scale), stroke, marks.slice(1, 2), context);
    expect(reasonOf(few.reachAtEntry)).toBe('entry-not-marked');
    expect(reasonOf(few.handDepth)).toBe('too-few-marks');
  });
});
