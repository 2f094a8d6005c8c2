import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { ArmMark } from '../arm';
import { armOf, markOf, reasonOf, valueOf } from '../testing/arms';
import { wrapDegrees } from '../units/angle';
import { armAngles, interiorElbow, signedElbow } from './arm-angles';

const LEVEL = { travel: 'right', plumb: null } as const;

const turn = fc.double({ min: -179.9, max: 179.9, noNaN: true });
const bent = fc.double({ min: 1, max: 179, noNaN: true });
const arm = fc
  .record({ upperArmDeg: turn, bend: bent, side: fc.constantFrom(1, -1) })
  .map(({ upperArmDeg, bend, side }) => ({
    upperArmDeg,
    forearmDeg: wrapDegrees(upperArmDeg + side * bend),
  }));

function mapped(mark: ArmMark, move: (p: { x: number; y: number }) => { x: number; y: number }): ArmMark {
  return { shoulder: move(mark.shoulder), elbow: move(mark.elbow), wrist: move(mark.wrist) };
}

function expectSame(mark: ArmMark, other: ArmMark, clip: Parameters<typeof armAngles>[1]): void {
  const one = valueOf(armAngles(mark, LEVEL));
  const two = valueOf(armAngles(other, clip));
  for (const key of ['forearmDeg', 'upperArmDeg', 'elbowDropDeg'] as const) {
    expect(Math.abs(wrapDegrees(one[key] - two[key])), key).toBeLessThan(1e-6);
  }
  expect(two.elbowDeg).toBeCloseTo(one.elbowDeg, 6);
}

describe('arm angles', () => {
  it.each([
    ['straight down', markOf(0, 0, 0, 10, 0, 20), [0, 0, 180, 0]],
    ['straight ahead', markOf(0, 0, 10, 0, 20, 0), [90, 90, 180, 0]],
    ['straight behind', markOf(0, 0, -10, 0, -20, 0), [-90, -90, 180, 0]],
    ['straight up', markOf(0, 0, 0, -10, 0, -20), [180, 180, 180, 0]],
    ['upper arm ahead, forearm down: high elbow', markOf(0, 0, 10, 0, 10, 10), [0, 90, 90, -45]],
    ['upper arm down, forearm ahead: dropped elbow', markOf(0, 0, 0, 10, 10, 10), [90, 0, 90, 45]],
    ['upper arm down, forearm behind', markOf(0, 0, 0, 10, -10, 10), [-90, 0, 90, -45]],
  ])('%s', (_, mark, [forearm, upper, elbow, drop]) => {
    const angles = valueOf(armAngles(mark, LEVEL));
    expect(angles.forearmDeg).toBeCloseTo(forearm ?? NaN, 9);
    expect(angles.upperArmDeg).toBeCloseTo(upper ?? NaN, 9);
    expect(angles.elbowDeg).toBeCloseTo(elbow ?? NaN, 9);
    expect(angles.elbowDropDeg).toBeCloseTo(drop ?? NaN, 9);
  });

  it('reads the angles an arm was built with, in every quadrant', () => {
    fc.assert(
      fc.property(arm, (model) => {
        const angles = valueOf(armAngles(armOf(model), LEVEL));
        expect(Math.abs(wrapDegrees(angles.forearmDeg - model.forearmDeg))).toBeLessThan(1e-6);
        expect(Math.abs(wrapDegrees(angles.upperArmDeg - model.upperArmDeg))).toBeLessThan(1e-6);
        const bend = Math.abs(wrapDegrees(model.upperArmDeg - model.forearmDeg));
        expect(angles.elbowDeg).toBeCloseTo(180 - bend, 6);
      }),
    );
  });

  it('does not change when picture and travel are mirrored', () => {
    fc.assert(
      fc.property(arm, (model) => {
        const mark = armOf(model);
        expectSame(
          mark,
          mapped(mark, ({ x, y }) => ({ x: 1920 - x, y })),
          { travel: 'left', plumb: null },
        );
      }),
    );
  });

  it('does not change with scale and translation', () => {
    const shift = fc.double({ min: -2000, max: 2000, noNaN: true });
    fc.assert(
      fc.property(arm, shift, shift, fc.double({ min: 0.2, max: 10, noNaN: true }), (model, dx, dy, k) => {
        const mark = armOf(model);
        expectSame(
          mark,
          mapped(mark, ({ x, y }) => ({ x: k * x + dx, y: k * y + dy })),
          LEVEL,
        );
      }),
    );
  });

  it('does not change when camera and plumb roll together, whichever end of the plumb is drawn first', () => {
    fc.assert(
      fc.property(
        arm,
        fc.double({ min: -80, max: 80, noNaN: true }),
        fc.boolean(),
        (model, roll, upsideDown) => {
          const c = Math.cos((roll * Math.PI) / 180);
          const s = Math.sin((roll * Math.PI) / 180);
          const rolled = ({ x, y }: { x: number; y: number }) => ({ x: c * x + s * y, y: -s * x + c * y });
          const ends = [rolled({ x: 100, y: 0 }), rolled({ x: 100, y: 600 })] as const;
          const plumb = upsideDown ? { top: ends[1], bottom: ends[0] } : { top: ends[0], bottom: ends[1] };
          const mark = armOf(model);
          expectSame(mark, mapped(mark, rolled), { travel: 'right', plumb });
        },
      ),
    );
  });

  it('refuses what has no angle, with a code', () => {
    const good = markOf(500, 300, 584, 372, 548, 468);
    expect(reasonOf(armAngles({ ...good, elbow: good.shoulder }, LEVEL))).toBe('coincident-joints');
    expect(reasonOf(armAngles({ ...good, wrist: good.shoulder }, LEVEL))).toBe('coincident-joints');
    expect(reasonOf(armAngles({ ...good, wrist: { x: NaN, y: 1 } }, LEVEL))).toBe('not-finite');
    expect(reasonOf(armAngles({ ...good, elbow: { x: 1, y: Infinity } }, LEVEL))).toBe('not-finite');
    const { shoulder, elbow } = good;
    expect(reasonOf(armAngles({ shoulder, elbow } as ArmMark, LEVEL))).toBe('missing-joint');
    const dot = { top: { x: 1, y: 1 }, bottom: { x: 2, y: 2 } };
    expect(reasonOf(armAngles(good, { travel: 'right', plumb: dot }))).toBe('plumb-too-short');
    const level = { top: { x: 1, y: 1 }, bottom: { x: 400, y: 1 } };
    expect(reasonOf(armAngles(good, { travel: 'right', plumb: level }))).toBe('plumb-level');
  });

  it('never yields NaN for any points at all', () => {
    const any = fc.record({ x: fc.double(), y: fc.double() });
    fc.assert(
      fc.property(any, any, any, (shoulder, elbow, wrist) => {
        const angles = armAngles({ shoulder, elbow, wrist }, LEVEL);
        if (angles.ok) expect(Object.values(angles.value).every(Number.isFinite)).toBe(true);
      }),
    );
  });

  it('folds the signed elbow at straight', () => {
    expect(signedElbow(0, 90)).toBe(90);
    expect(signedElbow(10, 0)).toBe(190);
    expect(interiorElbow(190)).toBe(170);
    expect(interiorElbow(170)).toBe(170);
  });
});
