import { jointAt } from './hit-area';
import { startDrag } from './dragging-joint';
import { startPan } from './panning';
import type { Idle, ToolBehaviour } from './tool-state';

export const idle: ToolBehaviour<Idle> = {
  press(_, pointer, port) {
    const handle = jointAt(port.joints(), port.view(), pointer.at, pointer.kind);
    return handle ? startDrag(handle, pointer, port) : startPan(pointer, port);
  },

  move(state, pointer, port) {
    port.hover(jointAt(port.joints(), port.view(), pointer.at, pointer.kind));
    return state;
  },

  release: (state) => state,
  cancel: (state) => state,
};
