import { describe, expect, it } from 'vitest';
import { armOf, markOf, reasonOf, valueOf } from '../testing/arms';
import { armAngleUncertainty, defaultJointUncertaintyPx } from './arm-uncertainty';

const TWO = { shoulder: 2, elbow: 2, wrist: 2 };
const plumb = { top: { x: 640, y: 100 }, bottom: { x: 640, y: 700 } };
const context = { travel: 'right', plumb, jointUncertaintyPx: TWO, plumbPointUncertaintyPx: 2 } as const;

describe('uncertainty of an arm’s angles', () => {
  it('adds the roll to directions and leaves it out of angles between segments', () => {
    const u = valueOf(armAngleUncertainty(armOf({ upperArmDeg: 90, forearmDeg: 0, upperPx: 100 }), context));
    expect(u.forearmDeg).toBeCloseTo(Math.hypot(1.62056937, 0.27009489), 6);
    expect(u.elbowDeg).toBeCloseTo(2.29183118, 7);
    expect(u.parts.elbowDeg.map(({ source }) => source)).not.toContain('roll');
    expect(u.parts.forearmDeg.at(-1)?.source).toBe('roll');
  });

  it('lists the parts largest first, and they add up', () => {
    const uneven = { ...context, jointUncertaintyPx: { shoulder: 5, elbow: 2, wrist: 1 } };
    const u = valueOf(armAngleUncertainty(armOf({ upperArmDeg: 60, forearmDeg: 10 }), uneven));
    for (const [angle, parts] of Object.entries(u.parts)) {
      const alone = parts.map((part) => part.alone);
      expect(alone, angle).toEqual([...alone].sort((a, b) => b - a));
      expect(Math.hypot(...alone)).toBeCloseTo(u[angle as keyof typeof u.parts], 9);
      expect(parts.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 9);
    }
  });

  it('holds the covariance of the shoulder in the elbow drop', () => {
    // Elbow drop is the angle at the shoulder: the elbow's formula with the joints' parts exchanged.
    const arm = markOf(512, 300, 596, 372, 560, 468);
    const turned = { shoulder: arm.elbow, elbow: arm.shoulder, wrist: arm.wrist };
    const joints = { shoulder: 2.5, elbow: 2, wrist: 1 };
    const drop = valueOf(armAngleUncertainty(arm, { ...context, jointUncertaintyPx: joints }));
    const elbow = valueOf(
      armAngleUncertainty(turned, { ...context, jointUncertaintyPx: { shoulder: 2, elbow: 2.5, wrist: 1 } }),
    );
    expect(drop.elbowDropDeg).toBeCloseTo(elbow.elbowDeg, 9);
  });

  it('gives a lopsided interval near straight and an ordinary one elsewhere', () => {
    const straight = valueOf(armAngleUncertainty(armOf({ upperArmDeg: 10, forearmDeg: 7 }), context));
    expect(straight.nearStraight).toBe(true);
    expect(straight.elbowIntervalDeg.high).toBe(180);
    expect(straight.elbowIntervalDeg.low).toBeCloseTo(177 - 1.959964 * straight.elbowDeg, 4);
    const bent = valueOf(armAngleUncertainty(armOf({ upperArmDeg: 90, forearmDeg: 0 }), context));
    expect(bent.nearStraight).toBe(false);
    expect(bent.elbowIntervalDeg.high - 90).toBeCloseTo(90 - bent.elbowIntervalDeg.low, 9);
  });

  it('says more about the vertical without a plumb than with one', () => {
    const assumed = valueOf(
      armAngleUncertainty(armOf({ upperArmDeg: 90, forearmDeg: 0 }), { ...context, plumb: null }),
    );
    expect(assumed.parts.forearmDeg[0]).toMatchObject({ source: 'roll', alone: 2 });
  });

  it('scales the default with the picture and never goes below one pixel', () => {
    expect(defaultJointUncertaintyPx({ width: 1920, height: 1080 })).toEqual({
      shoulder: 3,
      elbow: 2,
      wrist: 2,
    });
    expect(defaultJointUncertaintyPx({ width: 2160, height: 3840 })).toEqual({
      shoulder: 6,
      elbow: 4,
      wrist: 4,
    });
    expect(defaultJointUncertaintyPx({ width: 320, height: 240 })).toEqual({
      shoulder: 1,
      elbow: 1,
      wrist: 1,
    });
    expect(defaultJointUncertaintyPx({ width: NaN, height: 0 })).toEqual({ shoulder: 3, elbow: 2, wrist: 2 });
  });

  it('refuses uncertainties that are none', () => {
    const arm = armOf({ upperArmDeg: 90, forearmDeg: 0 });
    const withElbow = (elbow: number) => ({ ...context, jointUncertaintyPx: { ...TWO, elbow } });
    expect(reasonOf(armAngleUncertainty(arm, withElbow(-1)))).toBe('uncertainty-negative');
    expect(reasonOf(armAngleUncertainty(arm, withElbow(NaN)))).toBe('uncertainty-not-finite');
  });
});
