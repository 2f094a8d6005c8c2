import { describe, expect, it } from 'vitest';
import { onFrame, reasonOf, valueOf } from '../testing/arms';
import {
  anglesTwice,
  ownRepeatability,
  ownUncertaintyPx,
  type PlacedTwice,
  typicalErrors,
} from './own-uncertainty';

const axes = { travel: 'right', plumb: null } as const;
const size = { width: 1920, height: 1080 };

function placed(dx: number, dy: number, given: Partial<PlacedTwice> = {}, at = 0): PlacedTwice {
  const first = onFrame(at, { upperArmDeg: 60, forearmDeg: 40 + at });
  const again = { ...first, wrist: { x: first.wrist.x + dx, y: first.wrist.y + dy } };
  return { size, axes, first, again, ...given };
}

describe('a coach’s own spread', () => {
  it('is the pooled within-frame SD of each joint, x and y together', () => {
    // Differences of the wrist 2, 0, −2, 4 in x and 0, 2, 2, 0 in y: Σd²/2 = 16 over 8 degrees of freedom.
    const found = valueOf(ownRepeatability([placed(2, 0), placed(0, 2), placed(-2, 2), placed(4, 0)]));
    expect(found.jointUncertaintyPx.wrist).toBeCloseTo(Math.sqrt(16 / 8), 12);
    expect(found.jointUncertaintyPx.shoulder).toBe(0);
    expect(found.degreesOfFreedom).toBe(8);
    expect(found.frames).toBe(4);
  });

  it('counts pixels of a picture of 1080 lines, whatever the film had', () => {
    const large = { size: { width: 2160, height: 3840 } };
    const found = valueOf(ownRepeatability([placed(4, 0, large), placed(4, 0, large)]));
    expect(found.jointUncertaintyPx.wrist).toBeCloseTo(Math.sqrt((2 * (2 ** 2 / 2)) / 4), 12);
    expect(ownUncertaintyPx(large.size, { shoulder: 3, elbow: 2, wrist: 0.01 })).toEqual({
      shoulder: 6,
      elbow: 4,
      wrist: 0.25,
    });
  });

  it('needs a frame that was marked twice, and numbers', () => {
    expect(reasonOf(ownRepeatability([]))).toBe('too-few-repeats');
    expect(reasonOf(ownRepeatability([placed(NaN, 0)]))).toBe('not-finite');
    expect(reasonOf(typicalErrors([placed(2, 0)]))).toBe('too-few-repeats');
  });
});

describe('typical errors', () => {
  it('are the SD of the differences over √2, without the shift between the two rounds', () => {
    const turned = (deg: number, at: number): PlacedTwice => ({
      size,
      axes,
      first: onFrame(at, { upperArmDeg: 60, forearmDeg: 40 }),
      again: onFrame(at, { upperArmDeg: 60, forearmDeg: 40 - deg }),
    });
    const found = valueOf(typicalErrors([turned(1, 0), turned(3, 1), turned(5, 2)])).forearmDeg;
    expect(found.biasDeg).toBeCloseTo(3, 9);
    expect(found.typicalErrorDeg).toBeCloseTo(2 / Math.SQRT2, 9);
    expect(found.minimalChangeDeg).toBeCloseTo(1.959963984540054 * 2, 9);
    expect(found.frames).toBe(3);
  });

  it('do not jump where a direction turns over 180°', () => {
    const pair = anglesTwice({
      size,
      axes,
      first: onFrame(0, { upperArmDeg: 60, forearmDeg: 179 }),
      again: onFrame(0, { upperArmDeg: 60, forearmDeg: -179 }),
    });
    expect(pair?.forearmDeg.second).toBeCloseTo(181, 9);
  });

  it('read the elbow without the fold at a straight arm', () => {
    const pair = anglesTwice({
      size,
      axes,
      first: onFrame(0, { upperArmDeg: 60, forearmDeg: 58 }),
      again: onFrame(0, { upperArmDeg: 60, forearmDeg: 62 }),
    });
    expect(Math.abs((pair?.elbowDeg.first ?? 0) - (pair?.elbowDeg.second ?? 0))).toBeCloseTo(4, 9);
  });
});
