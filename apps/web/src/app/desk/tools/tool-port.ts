import type { ArmSide, Joint } from '@stillstroke/geometry/arm';
import type { PlumbLine } from '@stillstroke/geometry/calibration/plumb';
import type { PicturePoint, Size, StagePoint } from '../stage/spaces';
import type { ViewFrame, ViewTransform } from '../stage/view-transform';

export type PointerKind = 'mouse' | 'touch' | 'pen';

/** A pointer as the tools see it: no event, no element. */
export interface ToolPointer {
  readonly id: number;
  readonly kind: PointerKind;
  readonly at: StagePoint;
  /** The middle button, or any button while the pan key is held. */
  readonly pans: boolean;
}

/** A joint that can be taken hold of. */
export interface JointHandle {
  readonly arm: ArmSide;
  readonly joint: Joint;
  readonly point: PicturePoint;
}

export type PlumbEnd = keyof PlumbLine;

/** What a press on the picture is for at the moment. */
export type Task =
  /** Nothing is missing: joints can be dragged, the picture can be moved. */
  | { readonly kind: 'look' }
  /** The chosen arm's mark lacks this joint on this frame. */
  | { readonly kind: 'place'; readonly arm: ArmSide; readonly joint: Joint }
  /** The clip's vertical is being drawn. */
  | { readonly kind: 'plumb' };

/** What the tools may see of the Desk, and all that they may do to it. Tools hold no other reference. */
export interface ToolPort {
  view(): ViewTransform;
  frame(): ViewFrame;
  task(): Task;
  /** Joints of the shown frame that may be edited, those of the chosen arm first. */
  joints(): readonly JointHandle[];
  /** The plumb as shown: the one being drawn, else the clip's. */
  plumb(): PlumbLine | null;

  setView(view: ViewTransform): void;
  /** The joint under the pointer, for the cursor and its ring; null for none. */
  hover(joint: JointHandle | null): void;
  chooseJoint(handle: JointHandle): void;
  /** Puts the next missing joint down: one undo step. */
  placeJoint(point: PicturePoint): void;
  /** Shows the joint elsewhere, not yet saved. */
  previewJoint(handle: JointHandle, point: PicturePoint): void;
  /** Makes what was previewed one undo step. */
  commitJoint(handle: JointHandle): void;
  /** Shows the joint where it was before the drag. */
  dropPreview(): void;
  previewPlumb(plumb: PlumbLine | null): void;
  commitPlumb(plumb: PlumbLine): void;
  /** The point that the loupe shows, with the pointer that must not cover it; null puts the loupe away. */
  inspect(point: PicturePoint | null, pointer: ToolPointer | null): void;
}

/** Size of the picture as the tools need it. */
export function pictureOf(port: ToolPort): Size {
  return port.frame().picture;
}
