import type { ArmMark, ArmSide } from '@stillstroke/geometry/arm';
import { cameraRoll, type PlumbLine } from '@stillstroke/geometry/calibration/plumb';
import type { JointHandle } from '../tools/tool-port';
import type { ToolState } from '../tools/tool-state';
import { angleFigure } from './angle-figure';
import { angleNodes } from './angle-nodes';
import { armFigure, type Joints } from './arm-figure';
import { armNodes, jointShape } from './arm-nodes';
import { type Group, Line, type Shape } from './konva-core';
import type { Box } from './label-place';
import { plumbFigureNodes } from './plumb-nodes';
import { asPicturePoint, type PicturePoint, type Size, type StagePoint } from './spaces';
import type { StageColours } from './stage-colours';
import type { StageArm } from './stage-state';
import { toStage, type ViewTransform } from './view-transform';

type Nodes = readonly (Group | Shape)[];

/** Where things are drawn. */
export interface ScenePlace {
  readonly view: ViewTransform;
  readonly stage: Size;
  readonly colours: StageColours;
  /** What the stage's own controls cover. */
  readonly taken: readonly Box[];
}

export interface RestingScene {
  /** The arm that is not chosen. */
  readonly other: StageArm | null;
  readonly chosen: ArmSide;
  /** Marks of the chosen arm on neighbouring frames, nearest first; empty while the trail is off. */
  readonly trail: readonly ArmMark[];
  readonly plumb: PlumbLine | null;
}

/** Opacity of the nearest and of each further neighbour; line, casing and joint lie over each other and add up. */
const TRAIL_OPACITY = [0.35, 0.28, 0.22, 0.16];

/** What does not move while a joint of the chosen arm is dragged. */
export function restingNodes(scene: RestingScene, { view, stage, colours }: ScenePlace): Nodes {
  const trail = scene.trail
    .slice(0, TRAIL_OPACITY.length)
    .map((mark, i) => ({ mark, opacity: TRAIL_OPACITY[i] ?? 0 }));
  return [
    ...(scene.plumb ? [plumbFigureNodes({ plumb: scene.plumb, active: false }, view, stage, colours)] : []),
    ...trail.reverse().map(({ mark, opacity }) => {
      const { shoulder, elbow, wrist } = mark;
      const joints = { shoulder, elbow, wrist };
      return armNodes(armFigure({ arm: scene.chosen, joints, weight: 'trail', opacity }, view), colours);
    }),
    ...(scene.other ? armWithTheirs(scene.other, 'other', view, colours) : []),
  ];
}

export interface MovingScene {
  /** The chosen arm as far as it is placed. */
  readonly arm: StageArm | null;
  readonly chosen: ArmSide;
  readonly chosenJoint: JointHandle['joint'] | null;
  readonly angles: { readonly forearmDeg: number; readonly elbowDeg: number } | null;
  readonly plumb: PlumbLine | null;
  readonly drawsPlumb: boolean;
  readonly tool: ToolState;
  /** Where the next joint would go. */
  readonly aim: PicturePoint | null;
  /** The keyboard's pointer. */
  readonly crosshair: PicturePoint | null;
  readonly hovered: JointHandle | null;
}

/** The chosen arm with its angles, and what hangs on the pointer. */
export function movingNodes(scene: MovingScene, place: ScenePlace): Nodes {
  const { view, stage, colours } = place;
  const nodes: (Group | Shape)[] = [];
  if (scene.arm) {
    nodes.push(...armWithTheirs(scene.arm, 'chosen', view, colours, scene.chosenJoint));
    const mark = wholeMark(scene.arm.joints);
    if (mark && scene.angles) {
      const figure = angleFigure(
        { mark, rollDeg: rollOf(scene.plumb), ...scene.angles },
        view,
        stage,
        place.taken,
      );
      // Under the arm, so that the joints can be seen and the line stays the arm's.
      if (figure) nodes.unshift(angleNodes(figure, colours));
    }
  }
  if (scene.hovered) nodes.push(hoverRing(scene.hovered, place));
  if (scene.tool.name === 'placing-joint') nodes.push(...nextJoint(scene, place));
  if (scene.drawsPlumb && scene.plumb) {
    nodes.push(plumbFigureNodes({ plumb: scene.plumb, active: true }, view, stage, colours));
  }
  if (scene.crosshair) nodes.push(...crosshairNodes(toStage(view, scene.crosshair), stage, colours));
  return nodes;
}

/** All three joints, or null. */
export function wholeMark({ shoulder, elbow, wrist }: Joints): ArmMark | null {
  return shoulder && elbow && wrist ? { shoulder, elbow, wrist } : null;
}

function armWithTheirs(
  { arm, joints, theirs }: StageArm,
  weight: 'chosen' | 'other',
  view: ViewTransform,
  colours: StageColours,
  chosenJoint: JointHandle['joint'] | null = null,
): Nodes {
  const own = armNodes(armFigure({ arm, joints, weight, chosenJoint }, view), colours);
  if (!theirs) return [own];
  const { shoulder, elbow, wrist } = theirs;
  const other = { arm, joints: { shoulder, elbow, wrist }, weight: 'theirs' as const, opacity: 0.75 };
  return [armNodes(armFigure(other, view), colours), own];
}

/** The next joint's shape at the aim, and the line that it would make. */
function nextJoint({ tool, aim, arm, crosshair }: MovingScene, { view, colours }: ScenePlace): Nodes {
  const point = crosshair ?? aim;
  if (tool.name !== 'placing-joint' || !point) return [];
  const at = toStage(view, point);
  const shape = jointShape(tool, at, 7, { stroke: colours.arm[tool.arm], strokeWidth: 2 });
  const casing = jointShape(tool, at, 7, { stroke: colours.casing, strokeWidth: 5, opacity: 0.7 });
  const before =
    tool.joint === 'elbow' ? arm?.joints.shoulder : tool.joint === 'wrist' ? arm?.joints.elbow : null;
  if (!before) return [casing, shape];
  const from = toStage(view, asPicturePoint(before));
  const line = new Line({
    points: [from.x, from.y, at.x, at.y],
    stroke: colours.arm[tool.arm],
    strokeWidth: 1.5,
    opacity: 0.7,
    dash: [2, 4],
    listening: false,
  });
  return [line, casing, shape];
}

function hoverRing({ arm, point }: JointHandle, { view, colours }: ScenePlace): Shape {
  return jointShape({ arm }, toStage(view, point), 12, {
    stroke: colours.plumb,
    strokeWidth: 1.5,
    opacity: 0.9,
  });
}

function crosshairNodes({ x, y }: StagePoint, stage: Size, colours: StageColours): Nodes {
  const gap = 9;
  const runs = [
    [0, y, x - gap, y],
    [x + gap, y, stage.width, y],
    [x, 0, x, y - gap],
    [x, y + gap, x, stage.height],
  ];
  return runs.flatMap((points) => [
    new Line({ points, stroke: colours.casing, strokeWidth: 3, opacity: 0.5, listening: false }),
    new Line({ points, stroke: colours.plumb, strokeWidth: 1, opacity: 0.9, listening: false }),
  ]);
}

function rollOf(plumb: PlumbLine | null): number {
  const roll = cameraRoll(plumb);
  return roll.ok ? roll.value.rollDeg : 0;
}
