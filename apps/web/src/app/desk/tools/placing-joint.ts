import { insidePicture, toPicture } from '../stage/view-transform';
import { startDrag } from './dragging-joint';
import { jointAt } from './hit-area';
import { type JointHandle, pictureOf, type ToolPointer, type ToolPort } from './tool-port';
import { type PlacingJoint, restingState, type ToolBehaviour } from './tool-state';

export const placingJoint: ToolBehaviour<PlacingJoint> = {
  press(state, pointer, port) {
    if (state.pressed !== null) return state;
    const placed = placedJointAt(state, pointer, port);
    if (placed) return startDrag(placed, pointer, port);
    port.hover(null);
    port.inspect(pointUnder(pointer, port), pointer);
    return { ...state, pressed: { id: pointer.id, at: pointer.at } };
  },

  move(state, pointer, port) {
    if (state.pressed === null) {
      const placed = placedJointAt(state, pointer, port);
      port.hover(placed);
      port.inspect(placed ? null : pointUnder(pointer, port), placed ? null : pointer);
    } else if (state.pressed.id === pointer.id) {
      port.inspect(pointUnder(pointer, port), pointer);
      return { ...state, pressed: { id: pointer.id, at: pointer.at } };
    }
    return state;
  },

  release(state, pointer, port) {
    if (state.pressed?.id !== pointer.id) return state;
    port.inspect(null, null);
    port.placeJoint(pointUnder(pointer, port));
    return restingState(port);
  },

  cancel(_, port) {
    port.inspect(null, null);
    return restingState(port);
  },
};

function pointUnder(pointer: ToolPointer, port: ToolPort) {
  return insidePicture(toPicture(port.view(), pointer.at), pictureOf(port));
}

/**
 * Joints of the same arm that are already down can be corrected before the last one is. Those of the other arm cannot:
 * seen from the side both shoulders often lie on each other.
 */
function placedJointAt(state: PlacingJoint, pointer: ToolPointer, port: ToolPort): JointHandle | null {
  const own = port.joints().filter((handle) => handle.arm === state.arm);
  return jointAt(own, port.view(), pointer.at, pointer.kind);
}
