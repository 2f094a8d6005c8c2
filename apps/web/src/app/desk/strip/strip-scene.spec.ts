import { describe, expect, it } from 'vitest';
import { layOut, nameWidth, timeAt, xOf, type StripContent, type StripStroke } from './strip-scene';
import { wholeClip, type StripWindow } from './strip-window';

const size = { width: 1062, height: 170 };
const timesUs = Array.from({ length: 1001 }, (_, frame) => frame * 10_000);
const stroke: StripStroke = {
  id: 'a',
  arm: 'right',
  entry: 100,
  catch: 130,
  midPull: 150,
  exit: 190,
  nextEntry: 240,
  breath: true,
  curve: [
    { frame: 130, deg: 80 },
    { frame: 150, deg: 0 },
    { frame: 190, deg: -100 },
  ],
};
const content: StripContent = { timesUs, strokes: [stroke], marks: [{ arm: 'right', frame: 130 }] };
const whole = wholeClip(timesUs);

describe('the scene of the strip', () => {
  it('turns places into times and back', () => {
    for (const x of [nameWidth, 300, 1062]) expect(xOf(timeAt(x, whole, size), whole, size)).toBeCloseTo(x);
  });

  it('draws the four phases end to end', () => {
    const { bars } = layOut(content, whole, size);
    expect(bars.map(({ phase }) => phase)).toEqual(['entryAndCatch', 'pull', 'push', 'recovery']);
    for (let i = 1; i < bars.length; i++) {
      const before = bars[i - 1];
      expect((before?.x ?? 0) + (before?.width ?? 0)).toBeCloseTo(bars[i]?.x ?? 0);
    }
    expect(bars[1]?.x).toBeCloseTo(xOf(1_300_000, whole, size));
  });

  it('shows catch to exit as one bar while the mid-pull is not known, and only what is set of a draft', () => {
    const open = { ...stroke, midPull: null, nextEntry: null };
    expect(layOut({ ...content, strokes: [open] }, whole, size).bars.map(({ phase }) => phase)).toEqual([
      'entryAndCatch',
      'pull',
    ]);
    const draft = { ...open, catch: null, exit: null, curve: [] };
    const scene = layOut({ ...content, strokes: [draft] }, whole, size);
    expect(scene.bars).toEqual([]);
    expect(scene.events).toHaveLength(1);
  });

  it('keeps readings steeper than level at the edge of their lane', () => {
    const { curves, lanes } = layOut(content, whole, size);
    expect(curves[0]?.points[2]?.[1]).toBe(lanes.right.curveBottom);
    expect(curves[0]?.points[1]?.[1]).toBeCloseTo((lanes.right.curveTop + lanes.right.curveBottom) / 2);
  });

  it('leaves out what is not in view', () => {
    const late: StripWindow = { fromUs: 5_000_000, toUs: 6_000_000 };
    const scene = layOut(content, late, size);
    expect([...scene.bars, ...scene.events, ...scene.marks, ...scene.curves, ...scene.breaths]).toEqual([]);
    expect(scene.ticks.every(({ x }) => x >= nameWidth && x <= size.width)).toBe(true);
    expect(scene.ticks.find(({ label }) => label)?.label).toBe('500');
  });

  it('lays out twenty minutes at 60 fps with a bounded number of ticks', () => {
    const long = Array.from({ length: 72_000 }, (_, frame) => Math.round((frame * 1e6) / 60));
    const scene = layOut({ ...content, timesUs: long }, wholeClip(long), size);
    expect(scene.ticks.length).toBeLessThan(100);
    expect(scene.ticks.length).toBeGreaterThan(5);
  });
});
