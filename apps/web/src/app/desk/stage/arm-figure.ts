import type { ArmSide, Joint } from '@stillstroke/geometry/arm';
import type { VideoPoint } from '@stillstroke/geometry/points/video-point';
import { asPicturePoint, type StagePoint } from './spaces';
import { toStage, type ViewTransform } from './view-transform';

/** The joints of an arm in the order in which they are placed. */
export const JOINTS: readonly Joint[] = ['shoulder', 'elbow', 'wrist'];

/** The joints that are there: all three of a mark, fewer while it is being made. */
export type Joints = Readonly<Partial<Record<Joint, VideoPoint>>>;

/** How strongly an arm is drawn. */
export type Weight =
  /** The chosen arm. */
  | 'chosen'
  /** The other arm of this frame. */
  | 'other'
  /** The version of the same mark that someone else saved meanwhile. */
  | 'theirs'
  /** The same arm on a neighbouring marked frame. */
  | 'trail';

/** What is drawn of one arm, in stage pixels. */
export interface ArmFigure {
  readonly arm: ArmSide;
  readonly weight: Weight;
  /** Opacity, 0 to 1. */
  readonly opacity: number;
  readonly joints: readonly { readonly joint: Joint; readonly at: StagePoint; readonly chosen: boolean }[];
  /** The line through the joints that follow each other; a gap parts it. */
  readonly lines: readonly (readonly StagePoint[])[];
}

export interface ArmFigureInput {
  readonly arm: ArmSide;
  readonly joints: Joints;
  readonly weight: Weight;
  readonly chosenJoint?: Joint | null;
  readonly opacity?: number;
}

/** Lays out one arm for a view. */
export function armFigure(input: ArmFigureInput, view: ViewTransform): ArmFigure {
  const { arm, joints, weight, chosenJoint = null, opacity = 1 } = input;
  const placed: { joint: Joint; at: StagePoint; chosen: boolean }[] = [];
  const lines: StagePoint[][] = [[]];
  for (const joint of JOINTS) {
    const point = joints[joint];
    if (!point) {
      lines.push([]);
      continue;
    }
    const at = toStage(view, asPicturePoint(point));
    placed.push({ joint, at, chosen: joint === chosenJoint });
    lines.at(-1)?.push(at);
  }
  return { arm, weight, opacity, joints: placed, lines: lines.filter((line) => line.length > 1) };
}
