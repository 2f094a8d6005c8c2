import { armAngles } from '@stillstroke/geometry/angles/arm-angles';
import { cameraRoll, rollUncertaintyDeg } from '@stillstroke/geometry/calibration/plumb';
import { markOf, valueOf } from '@stillstroke/geometry/testing/arms';
import { expect, it } from 'vitest';

/** Roll from a plumb line: plain trigonometry, no printed source. All [CALC]. */
it.each([
  [640, 100, 640, 700, 0],
  [640, 100, 672, 700, 3.05288251],
  [650, 80, 619, 690, -2.90924994],
])('(%d, %d) to (%d, %d): %f°', (tx, ty, bx, by, roll) => {
  const [top, bottom] = [
    { x: tx, y: ty },
    { x: bx, y: by },
  ];
  expect(valueOf(cameraRoll({ top, bottom })).rollDeg).toBeCloseTo(roll, 7);
  expect(valueOf(cameraRoll({ top: bottom, bottom: top })).rollDeg).toBeCloseTo(roll, 7);
});

it.each([
  [1, 0.13504745],
  [2, 0.27009489],
])('its uncertainty for %d px over 600 px: %f°', (px, u) => {
  const plumb = { top: { x: 640, y: 100 }, bottom: { x: 640, y: 700 } };
  expect(valueOf(rollUncertaintyDeg(plumb, px))).toBeCloseTo(u, 7);
});

it('an arm under a rolled camera: the elbow stays, the forearm turns by the roll', () => {
  const arm = markOf(500, 300, 584, 372, 548, 468);
  const plumb = { top: { x: 640, y: 100 }, bottom: { x: 672, y: 700 } };
  const level = valueOf(armAngles(arm, { travel: 'right', plumb: null }));
  const rolled = valueOf(armAngles(arm, { travel: 'right', plumb }));
  expect(level.forearmDeg).toBeCloseTo(-20.55604522, 7);
  expect(rolled.forearmDeg).toBeCloseTo(-23.60892773, 7);
  expect(level.elbowDeg).toBeCloseTo(110.04524943, 7);
  expect(rolled.elbowDeg).toBeCloseTo(110.04524943, 7);
});
