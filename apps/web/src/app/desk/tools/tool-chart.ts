import { draggingJoint } from './dragging-joint';
import { drawingPlumb } from './drawing-plumb';
import { idle } from './idle';
import { panning, startPan } from './panning';
import { placingJoint } from './placing-joint';
import type { ToolPointer, ToolPort } from './tool-port';
import { type HeldPointer, restingState, type ToolBehaviour, type ToolState } from './tool-state';

export type ToolEvent =
  | { readonly kind: 'press' | 'move' | 'release'; readonly pointer: ToolPointer }
  | { readonly kind: 'cancel' }
  /** The task, the frame or the chosen arm changed: a resting state follows, a held one finishes first. */
  | { readonly kind: 'task' };

/** The state that follows an event. Effects go through the port, in the order in which they are to be seen. */
export function nextToolState(state: ToolState, event: ToolEvent, port: ToolPort): ToolState {
  switch (event.kind) {
    case 'task':
      return isHeld(state) ? state : restingState(port);
    case 'cancel':
      return withBehaviour(state, (own, behaviour) => behaviour.cancel(own, port));
    case 'press':
      return pressed(state, event.pointer, port);
    case 'move':
      return withBehaviour(state, (own, behaviour) => behaviour.move(own, event.pointer, port));
    case 'release':
      return withBehaviour(state, (own, behaviour) => behaviour.release(own, event.pointer, port));
  }
}

/** Whether a pointer holds something down. */
export function isHeld(state: ToolState): boolean {
  switch (state.name) {
    case 'idle':
      return false;
    case 'placing-joint':
      return state.pressed !== null;
    case 'drawing-plumb':
      return state.held !== null;
    case 'dragging-joint':
    case 'panning':
      return true;
  }
}

/**
 * Two rules hold in every state: the middle button and the pan key move the picture, and a second finger turns what
 * the first one began into moving and zooming, with everything as it was before.
 */
function pressed(state: ToolState, pointer: ToolPointer, port: ToolPort): ToolState {
  const first = heldBy(state);
  if (state.name !== 'panning' && first !== null) {
    if (pointer.kind !== 'touch' || first.id === pointer.id) return state;
    withBehaviour(state, (own, behaviour) => behaviour.cancel(own, port));
    return { name: 'panning', pointers: [first, { id: pointer.id, at: pointer.at }] };
  }
  if (pointer.pans && !isHeld(state)) return startPan(pointer, port);
  return withBehaviour(state, (own, behaviour) => behaviour.press(own, pointer, port));
}

function heldBy(state: ToolState): HeldPointer | null {
  switch (state.name) {
    case 'placing-joint':
      return state.pressed;
    case 'drawing-plumb':
      return state.held?.pointer ?? null;
    case 'dragging-joint':
      return state.pointer;
    case 'idle':
    case 'panning':
      return null;
  }
}

function withBehaviour(
  state: ToolState,
  run: <S extends ToolState>(own: S, behaviour: ToolBehaviour<S>) => ToolState,
): ToolState {
  switch (state.name) {
    case 'idle':
      return run(state, idle);
    case 'placing-joint':
      return run(state, placingJoint);
    case 'dragging-joint':
      return run(state, draggingJoint);
    case 'drawing-plumb':
      return run(state, drawingPlumb);
    case 'panning':
      return run(state, panning);
  }
}
