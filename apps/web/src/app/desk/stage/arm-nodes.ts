import type { Joint } from '@stillstroke/geometry/arm';
import type { ArmFigure, Weight } from './arm-figure';
import { Circle, Group, Line, Rect, type Shape } from './konva-core';
import type { StageColours } from './stage-colours';
import type { StagePoint } from './spaces';

interface Stroke {
  readonly line: number;
  readonly casing: number;
  readonly joint: number;
}

const STROKES: Readonly<Record<Weight, Stroke>> = {
  chosen: { line: 3, casing: 6.5, joint: 6 },
  other: { line: 2.5, casing: 5.5, joint: 5 },
  theirs: { line: 2, casing: 4.5, joint: 6 },
  trail: { line: 1.5, casing: 3, joint: 2.5 },
};
/** The left arm's line is dashed, the right one's is not: the sides can be told apart without their colours. */
const LEFT_DASH = [10, 6];
const CASING_OPACITY = 0.8;

/** Draws one arm into a group: a cased line, square joints on the left and round ones on the right. */
export function armNodes(figure: ArmFigure, colours: StageColours): Group {
  const group = new Group({ opacity: figure.opacity, listening: false });
  const stroke = STROKES[figure.weight];
  for (const line of figure.lines) {
    const points = line.flatMap(({ x, y }) => [x, y]);
    const shared = { points, lineCap: 'round' as const, lineJoin: 'round' as const, listening: false };
    group.add(
      new Line({ ...shared, stroke: colours.casing, strokeWidth: stroke.casing, opacity: CASING_OPACITY }),
    );
    group.add(
      new Line({
        ...shared,
        stroke: colours.arm[figure.arm],
        strokeWidth: stroke.line,
        ...(figure.arm === 'left' ? { dash: LEFT_DASH, lineCap: 'butt' as const } : {}),
      }),
    );
  }
  for (const { joint, at, chosen } of figure.joints) {
    for (const node of jointNodes(figure, joint, at, chosen, colours)) group.add(node);
  }
  return group;
}

/** The wrist is filled, shoulder and elbow are open, so that the arm's ends cannot be mixed up. */
function jointNodes(
  figure: ArmFigure,
  joint: Joint,
  at: StagePoint,
  chosen: boolean,
  colours: StageColours,
): Shape[] {
  const { joint: radius } = STROKES[figure.weight];
  const colour = colours.arm[figure.arm];
  const casing = jointShape(figure, at, radius + 2.5, { fill: colours.casing, opacity: CASING_OPACITY });
  const filled = joint === 'wrist' && figure.weight !== 'theirs';
  const shape = jointShape(figure, at, radius, {
    fill: filled ? colour : colours.casing,
    stroke: colour,
    strokeWidth: figure.weight === 'trail' ? 1 : 2,
  });
  if (figure.weight === 'trail') return [shape];
  if (!chosen) return [casing, shape];
  const ring = { stroke: colours.plumb, strokeWidth: 1.5 };
  return [casing, jointShape(figure, at, radius + 4, ring), shape];
}

/** The outline of a side's joints: square or round, `radius` CSS pixels from the middle to the edge. */
export function jointShape(
  { arm }: Pick<ArmFigure, 'arm'>,
  { x, y }: StagePoint,
  radius: number,
  paint: { fill?: string; stroke?: string; strokeWidth?: number; opacity?: number },
): Shape {
  const shared = { ...paint, listening: false };
  if (arm === 'right') return new Circle({ x, y, radius, ...shared });
  const side = radius * 2 * 0.9;
  return new Rect({ x: x - side / 2, y: y - side / 2, width: side, height: side, ...shared });
}
