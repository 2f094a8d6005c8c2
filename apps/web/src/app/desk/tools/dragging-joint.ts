import { insidePicture, toPicture, toStage, type ViewTransform } from '../stage/view-transform';
import { type PicturePoint, stageDistance, type StagePoint, stagePoint } from '../stage/spaces';
import type { JointHandle, PointerKind, ToolPointer, ToolPort } from './tool-port';
import { pictureOf } from './tool-port';
import { type DraggingJoint, restingState, type ToolBehaviour, type ToolState } from './tool-state';

/** CSS pixels that a press may tremble without moving the joint. */
const TREMBLE: Readonly<Record<PointerKind, number>> = { mouse: 2, pen: 3, touch: 6 };

export function startDrag(handle: JointHandle, pointer: ToolPointer, port: ToolPort): DraggingJoint {
  port.hover(handle);
  port.chooseJoint(handle);
  port.inspect(handle.point, pointer);
  return {
    name: 'dragging-joint',
    pointer: { id: pointer.id, at: pointer.at },
    handle,
    from: pointer.at,
    moved: false,
  };
}

export const draggingJoint: ToolBehaviour<DraggingJoint> = {
  press: (state) => state,

  move(state, pointer, port) {
    if (pointer.id !== state.pointer.id) return state;
    const moved = state.moved || stageDistance(state.from, pointer.at) > TREMBLE[pointer.kind];
    const next = { ...state, moved, pointer: { id: pointer.id, at: pointer.at } };
    if (!moved) return next;
    const point = heldPoint(state, pointer.at, port);
    port.previewJoint(state.handle, point);
    port.inspect(point, pointer);
    return next;
  },

  release(state, pointer, port): ToolState {
    if (pointer.id !== state.pointer.id) return state;
    const last = draggingJoint.move(state, pointer, port);
    if (last.name === 'dragging-joint' && last.moved) port.commitJoint(state.handle);
    port.inspect(null, null);
    return restingState(port);
  },

  cancel(state, port) {
    if (state.moved) port.dropPreview();
    port.inspect(null, null);
    return restingState(port);
  },
};

/** The joint keeps the distance to the pointer at which it was taken, so that it does not jump under a finger. */
function heldPoint(state: DraggingJoint, at: StagePoint, port: ToolPort): PicturePoint {
  const view: ViewTransform = port.view();
  const start = toStage(view, state.handle.point);
  const held = stagePoint(start.x + at.x - state.from.x, start.y + at.y - state.from.y);
  return insidePicture(toPicture(view, held), pictureOf(port));
}
