import { armAngles } from '@stillstroke/geometry/angles/arm-angles';
import { describe, expect, it } from 'vitest';
import { angleFigure, degreesText } from './angle-figure';
import { armFigure } from './arm-figure';
import { stagePoint } from './spaces';

const stage = { width: 1000, height: 600 };
const plain = { scale: 1, offsetX: 0, offsetY: 0 };
const mark = { shoulder: { x: 300, y: 200 }, elbow: { x: 400, y: 250 }, wrist: { x: 500, y: 350 } };

describe('armFigure', () => {
  it('runs one line through a whole mark, in stage pixels', () => {
    const figure = armFigure(
      { arm: 'left', joints: mark, weight: 'chosen', chosenJoint: 'elbow' },
      { scale: 2, offsetX: 10, offsetY: -5 },
    );
    expect(figure.lines).toEqual([[stagePoint(610, 395), stagePoint(810, 495), stagePoint(1010, 695)]]);
    expect(figure.joints.map(({ joint, chosen }) => [joint, chosen])).toEqual([
      ['shoulder', false],
      ['elbow', true],
      ['wrist', false],
    ]);
  });

  it('draws no line across a joint that is missing', () => {
    const { shoulder, wrist } = mark;
    expect(armFigure({ arm: 'right', joints: { shoulder, wrist }, weight: 'chosen' }, plain).lines).toEqual(
      [],
    );
    expect(armFigure({ arm: 'right', joints: { shoulder }, weight: 'chosen' }, plain).joints).toHaveLength(1);
  });
});

describe('angleFigure', () => {
  it.each([
    ['right', 0],
    ['left', 0],
    ['right', 7],
    ['left', -12],
  ] as const)('sweeps as many degrees as the reading says, travelling %s, rolled %f°', (travel, rollDeg) => {
    const roll = (rollDeg * Math.PI) / 180;
    const plumb = { top: { x: 0, y: 0 }, bottom: { x: 200 * Math.sin(roll), y: 200 * Math.cos(roll) } };
    const angles = armAngles(mark, { travel, plumb });
    if (!angles.ok) throw new Error(angles.reason);
    const figure = angleFigure({ mark, rollDeg, ...angles.value }, plain, stage);
    const degrees = (radians: number) => (radians * 180) / Math.PI;
    expect(degrees(Math.abs(figure?.forearmArc.sweep ?? NaN))).toBeCloseTo(
      Math.abs(angles.value.forearmDeg),
      6,
    );
    expect(degrees(Math.abs(figure?.elbowArc.sweep ?? NaN))).toBeCloseTo(angles.value.elbowDeg, 6);
    const [top, foot] = figure?.plumb ?? [];
    expect(Math.atan2((foot?.x ?? 0) - (top?.x ?? 0), (foot?.y ?? 0) - (top?.y ?? 0))).toBeCloseTo(roll, 9);
  });

  it('keeps its numbers off what is taken', () => {
    const input = { mark, rollDeg: 0, forearmDeg: 45, elbowDeg: 160 };
    const free = angleFigure(input, plain, stage)?.forearmLabel.box;
    if (!free) throw new Error('no label');
    const moved = angleFigure(input, plain, stage, [free]);
    for (const box of [moved?.forearmLabel.box, moved?.elbowLabel.box]) {
      const apart = Math.max(
        (box?.left ?? NaN) - free.left - free.width,
        free.left - (box?.left ?? NaN) - (box?.width ?? NaN),
        (box?.top ?? NaN) - free.top - free.height,
        free.top - (box?.top ?? NaN) - (box?.height ?? NaN),
      );
      expect(apart).toBeGreaterThan(0);
    }
  });

  it('draws nothing for an elbow that is off the stage', () => {
    const input = { mark, rollDeg: 0, forearmDeg: 45, elbowDeg: 160 };
    expect(angleFigure(input, { scale: 8, offsetX: 0, offsetY: 0 }, stage)).toBeNull();
  });

  it('writes whole degrees', () => {
    expect(degreesText(45.6)).toBe('46°');
    expect(degreesText(-12.4)).toBe('−12°');
    expect(degreesText(-0.3)).toBe('0°');
  });
});
