import type { ToolEvent } from '../tools/tool-chart';
import type { PointerKind, ToolPointer } from '../tools/tool-port';
import { stagePoint, type StagePoint } from './spaces';

/** Where pointer events go. */
export interface PointerReceiver {
  send(event: ToolEvent): void;
  /** A wheel or trackpad zoom at a stage point; above 1 is nearer. */
  zoom(factor: number, at: StagePoint): void;
  /** The pointer has left the stage with nothing held. */
  leave(): void;
  panKeyHeld(): boolean;
}

/** Per CSS pixel of wheel travel; trackpad pinches arrive as small steps with the control key. */
const WHEEL_ZOOM = 0.0016;
const PINCH_ZOOM = 0.01;
const PIXELS_PER_LINE = 16;
const PIXELS_PER_PAGE = 400;

/**
 * Turns an element's pointer and wheel events into tool events. Listeners are the element's own and not the template's:
 * a mouse move that changes no signal must cost nothing.
 */
export function feedPointers(element: HTMLElement, receiver: PointerReceiver): () => void {
  const listening = new AbortController();
  const options = { signal: listening.signal };
  const down = new Set<number>();
  const read = (event: PointerEvent) => toolPointer(event, element, receiver.panKeyHeld());

  element.addEventListener(
    'pointerdown',
    (event) => {
      if (event.button > 1) return;
      event.preventDefault();
      element.setPointerCapture(event.pointerId);
      down.add(event.pointerId);
      receiver.send({ kind: 'press', pointer: read(event) });
    },
    options,
  );
  element.addEventListener(
    'pointermove',
    (event) => {
      receiver.send({ kind: 'move', pointer: read(event) });
    },
    options,
  );
  element.addEventListener(
    'pointerup',
    (event) => {
      if (!down.delete(event.pointerId)) return;
      receiver.send({ kind: 'release', pointer: read(event) });
      // A finger that is lifted hovers over nothing.
      if (event.pointerType === 'touch') receiver.leave();
    },
    options,
  );
  const lose = (event: PointerEvent) => {
    if (down.delete(event.pointerId)) receiver.send({ kind: 'cancel' });
  };
  element.addEventListener('pointercancel', lose, options);
  element.addEventListener('lostpointercapture', lose, options);
  element.addEventListener(
    'pointerleave',
    () => {
      if (down.size === 0) receiver.leave();
    },
    options,
  );
  element.addEventListener(
    'wheel',
    (event) => {
      event.preventDefault();
      receiver.zoom(wheelFactor(event), pointOn(element, event));
    },
    { ...options, passive: false },
  );
  return () => {
    listening.abort();
  };
}

/** Zoom factor of a wheel event, whatever unit the device counts in. */
export function wheelFactor({
  deltaY,
  deltaMode,
  ctrlKey,
}: Pick<WheelEvent, 'deltaY' | 'deltaMode' | 'ctrlKey'>): number {
  const unit = deltaMode === 1 ? PIXELS_PER_LINE : deltaMode === 2 ? PIXELS_PER_PAGE : 1;
  const travel = Math.max(-240, Math.min(240, deltaY * unit));
  return Math.exp(-travel * (ctrlKey ? PINCH_ZOOM : WHEEL_ZOOM));
}

function toolPointer(event: PointerEvent, element: HTMLElement, panKeyHeld: boolean): ToolPointer {
  return {
    id: event.pointerId,
    kind: kindOf(event.pointerType),
    at: pointOn(element, event),
    pans: panKeyHeld || event.button === 1,
  };
}

function kindOf(pointerType: string): PointerKind {
  return pointerType === 'touch' || pointerType === 'pen' ? pointerType : 'mouse';
}

function pointOn(element: HTMLElement, { clientX, clientY }: MouseEvent): StagePoint {
  const { left, top } = element.getBoundingClientRect();
  return stagePoint(clientX - left, clientY - top);
}
