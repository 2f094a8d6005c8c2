import { describe, expect, it } from 'vitest';
import { onFrame, reasonOf, valueOf } from '../testing/arms';
import { foreshortening } from './foreshortening';
import { lengthScale } from './length-scale';

const JOINTS = { shoulder: 2, elbow: 2, wrist: 2 };

describe('foreshortening', () => {
  const full = [10, 20, 30].map((frame) =>
    onFrame(frame, { upperArmDeg: 40 + frame, forearmDeg: frame, forePx: 200 }),
  );

  it('is silent while the lengths agree within what marking explains', () => {
    expect(foreshortening(full, JOINTS)).toEqual([]);
    expect(foreshortening([], JOINTS)).toEqual([]);
    expect(
      foreshortening([...full, onFrame(40, { upperArmDeg: 60, forearmDeg: 0, forePx: 194 })], JOINTS),
    ).toEqual([]);
  });

  it('names frame and segment, how far out of plane at least, and what that does to a direction', () => {
    const short = onFrame(40, { upperArmDeg: 60, forearmDeg: 0, forePx: 120 });
    const hints = foreshortening([...full, short], JOINTS);
    expect(hints).toHaveLength(1);
    expect(hints[0]).toMatchObject({ frame: 40, segment: 'forearm' });
    expect(hints[0]?.lengthShare).toBeCloseTo(0.6, 9);
    // (120 + 2·√2·√8)/200 = 0.64
    expect(hints[0]?.outOfPlaneDeg).toBeCloseTo((Math.acos(0.64) * 180) / Math.PI, 9);
    expect(hints[0]?.directionErrorDeg).toBeCloseTo((Math.asin(0.36 / 1.64) * 180) / Math.PI, 9);
  });

  it('leaves marks that cannot be read aside', () => {
    const [first] = full;
    if (!first) throw new Error('no mark');
    expect(foreshortening([...full, { ...first, wrist: first.elbow }], JOINTS)).toEqual([]);
  });
});

describe('scale from a known length', () => {
  const [from, to] = [
    { x: 100, y: 100 },
    { x: 400, y: 500 },
  ];

  it('gives metres per pixel with its uncertainty', () => {
    const scale = valueOf(lengthScale(from, to, { metres: 2.5, uncertaintyM: 0.01 }, 1));
    expect(scale.metresPerPixel).toBeCloseTo(0.005, 12);
    expect(scale.uncertainty).toBeCloseTo(0.005 * Math.hypot(0.004, Math.SQRT2 / 500), 12);
  });

  it('refuses what is no length', () => {
    expect(reasonOf(lengthScale(from, from, { metres: 2.5 }, 1))).toBe('too-short');
    expect(reasonOf(lengthScale(from, to, { metres: 0 }, 1))).toBe('not-positive');
    expect(reasonOf(lengthScale(from, { x: NaN, y: 0 }, { metres: 1 }, 1))).toBe('not-finite');
    expect(reasonOf(lengthScale(from, to, { metres: Infinity }, 1))).toBe('not-finite');
  });
});
