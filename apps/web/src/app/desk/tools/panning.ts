import { panBy, pinch } from '../stage/view-transform';
import type { ToolPointer, ToolPort } from './tool-port';
import { type Panning, restingState, type ToolBehaviour } from './tool-state';

export function startPan(pointer: ToolPointer, port: ToolPort): Panning {
  port.hover(null);
  port.inspect(null, null);
  return { name: 'panning', pointers: [{ id: pointer.id, at: pointer.at }] };
}

export const panning: ToolBehaviour<Panning> = {
  /** A second finger zooms as well; a third changes nothing. */
  press(state, pointer) {
    if (state.pointers.length >= 2 || state.pointers.some(({ id }) => id === pointer.id)) return state;
    return { ...state, pointers: [...state.pointers, { id: pointer.id, at: pointer.at }] };
  },

  move(state, pointer, port) {
    if (!state.pointers.some(({ id }) => id === pointer.id)) return state;
    const after = state.pointers.map((held) =>
      held.id === pointer.id ? { id: held.id, at: pointer.at } : held,
    );
    const [a, b] = state.pointers;
    const [c, d] = after;
    if (a && b && c && d) {
      port.setView(pinch(port.view(), port.frame(), [a.at, b.at], [c.at, d.at]));
    } else if (a && c) {
      port.setView(panBy(port.view(), port.frame(), c.at.x - a.at.x, c.at.y - a.at.y));
    }
    return { ...state, pointers: after };
  },

  release(state, pointer, port) {
    const pointers = state.pointers.filter(({ id }) => id !== pointer.id);
    return pointers.length > 0 ? { ...state, pointers } : restingState(port);
  },

  cancel: (_, port) => restingState(port),
};
