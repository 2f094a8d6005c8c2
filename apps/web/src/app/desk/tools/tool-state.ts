import type { ArmSide, Joint } from '@stillstroke/geometry/arm';
import type { PicturePoint, StagePoint } from '../stage/spaces';
import type { JointHandle, PlumbEnd, ToolPointer, ToolPort } from './tool-port';

/** A pointer that is down, and where it was last seen. */
export interface HeldPointer {
  readonly id: number;
  readonly at: StagePoint;
}

/** Nothing is pressed and nothing is missing. */
export interface Idle {
  readonly name: 'idle';
}

/** The next joint hangs on the pointer; `pressed` while it is held down, until it is put down at release. */
export interface PlacingJoint {
  readonly name: 'placing-joint';
  readonly arm: ArmSide;
  readonly joint: Joint;
  readonly pressed: HeldPointer | null;
}

/** A joint is held by a pointer. */
export interface DraggingJoint {
  readonly name: 'dragging-joint';
  readonly pointer: HeldPointer;
  readonly handle: JointHandle;
  /** Where the pointer went down. */
  readonly from: StagePoint;
  /** False until the pointer has left the spot: a press that stays chooses the joint and changes nothing. */
  readonly moved: boolean;
}

/** The clip's vertical: waiting for a press, or one end being held while the other stays at `fixed`. */
export interface DrawingPlumb {
  readonly name: 'drawing-plumb';
  readonly held: {
    readonly pointer: HeldPointer;
    readonly end: PlumbEnd;
    readonly fixed: PicturePoint;
  } | null;
}

/** The picture is moved by one pointer, or moved and zoomed by two. */
export interface Panning {
  readonly name: 'panning';
  readonly pointers: readonly HeldPointer[];
}

export type ToolState = Idle | PlacingJoint | DraggingJoint | DrawingPlumb | Panning;
export type ToolName = ToolState['name'];

/** What a state does with each event; answers the state that follows, itself when nothing changes. */
export interface ToolBehaviour<S extends ToolState> {
  press(state: S, pointer: ToolPointer, port: ToolPort): ToolState;
  /** Moves with and without a button down. */
  move(state: S, pointer: ToolPointer, port: ToolPort): ToolState;
  release(state: S, pointer: ToolPointer, port: ToolPort): ToolState;
  /** Escape, a lost pointer, or a second finger: everything is as before the press. */
  cancel(state: S, port: ToolPort): ToolState;
}

/** The state that waits for what the task needs. */
export function restingState(port: ToolPort): ToolState {
  const task = port.task();
  switch (task.kind) {
    case 'look':
      return { name: 'idle' };
    case 'place':
      return { name: 'placing-joint', arm: task.arm, joint: task.joint, pressed: null };
    case 'plumb':
      return { name: 'drawing-plumb', held: null };
  }
}
