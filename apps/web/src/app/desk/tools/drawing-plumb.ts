import { cameraRoll, type PlumbLine } from '@stillstroke/geometry/calibration/plumb';
import { asPicturePoint, type PicturePoint } from '../stage/spaces';
import { insidePicture, toPicture } from '../stage/view-transform';
import { plumbEndAt } from './hit-area';
import { pictureOf, type PlumbEnd, type ToolPointer, type ToolPort } from './tool-port';
import { type DrawingPlumb, restingState, type ToolBehaviour } from './tool-state';

const OTHER_END: Readonly<Record<PlumbEnd, PlumbEnd>> = { top: 'bottom', bottom: 'top' };

export const drawingPlumb: ToolBehaviour<DrawingPlumb> = {
  /** On an end: that end is moved; elsewhere: a new line begins. */
  press(state, pointer, port) {
    if (state.held) return state;
    const plumb = port.plumb();
    const end = plumbEndAt(port, pointer.at, pointer.kind);
    const point = pointUnder(pointer, port);
    const pressed = { id: pointer.id, at: pointer.at };
    const held =
      plumb && end
        ? { pointer: pressed, end, fixed: asPicturePoint(plumb[OTHER_END[end]]) }
        : { pointer: pressed, end: 'bottom' as const, fixed: point };
    port.inspect(point, pointer);
    return { name: 'drawing-plumb', held };
  },

  move(state, pointer, port) {
    const point = pointUnder(pointer, port);
    if (!state.held) {
      port.inspect(point, pointer);
      return state;
    }
    if (state.held.pointer.id !== pointer.id) return state;
    port.previewPlumb(lineOf(state.held, point));
    port.inspect(point, pointer);
    return { ...state, held: { ...state.held, pointer: { id: pointer.id, at: pointer.at } } };
  },

  /** A line from which no vertical can be read (a mere click, a level line) is dropped. */
  release(state, pointer, port) {
    if (state.held?.pointer.id !== pointer.id) return state;
    const plumb = upright(lineOf(state.held, pointUnder(pointer, port)));
    port.inspect(null, null);
    if (cameraRoll(plumb).ok) port.commitPlumb(plumb);
    else port.previewPlumb(null);
    return restingState(port);
  },

  cancel(_, port) {
    port.previewPlumb(null);
    port.inspect(null, null);
    return restingState(port);
  },
};

/** The line with its upper end named top, whichever way it was drawn. */
export function upright(plumb: PlumbLine): PlumbLine {
  return plumb.bottom.y < plumb.top.y ? { top: plumb.bottom, bottom: plumb.top } : plumb;
}

function lineOf(held: NonNullable<DrawingPlumb['held']>, point: PicturePoint): PlumbLine {
  return held.end === 'top' ? { top: point, bottom: held.fixed } : { top: held.fixed, bottom: point };
}

function pointUnder(pointer: ToolPointer, port: ToolPort): PicturePoint {
  return insidePicture(toPicture(port.view(), pointer.at), pictureOf(port));
}
