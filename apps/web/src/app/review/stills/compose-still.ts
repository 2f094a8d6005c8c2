import type { Mark } from '@stillstroke/contract/marks';
import type { Drawing } from '@stillstroke/contract/stills';
import { angleFigure } from '../../desk/stage/angle-figure';
import { angleNodes } from '../../desk/stage/angle-nodes';
import { armFigure } from '../../desk/stage/arm-figure';
import { armNodes } from '../../desk/stage/arm-nodes';
import { Group } from '../../desk/stage/konva-core';
import type { Box } from '../../desk/stage/label-place';
import type { StageColours } from '../../desk/stage/stage-colours';
import { drawingNodes, textAt } from './drawing-nodes';
import { lineUnit, planStill, type PictureSize, type StillPlace } from './still-layout';

/** One frame of a still: its picture as shown, in its own size, and what is marked on it. */
export interface FramePicture {
  readonly canvas: HTMLCanvasElement;
  readonly marks: readonly Mark[];
  /** Camera roll of the clip, degrees. */
  readonly rollDeg: number;
  /** Stands in the corner of a pair's frame. */
  readonly label: string | null;
}

/** Puts the frames of a still beside each other, in full size, with the marked arms on them where wished. */
export function composeFrames(
  frames: readonly FramePicture[],
  overlays: boolean,
  colours: StageColours,
): HTMLCanvasElement {
  const plan = planStill(frames.map(({ canvas }) => canvas));
  const still = blank(plan);
  const context = contextOf(still);
  context.fillStyle = colours.casing;
  context.fillRect(0, 0, plan.width, plan.height);
  frames.forEach((frame, at) => {
    const place = plan.places[at];
    if (!place) return;
    const { left, top, width, height } = place;
    context.drawImage(frame.canvas, left, top, width, height);
    const sheet = sheetOf(frame, { place, overlays, unit: lineUnit(plan) }, colours);
    if (sheet) context.drawImage(sheet, left, top);
  });
  return still;
}

/** The frames with what is drawn on them by hand: the picture as it is kept. */
export function composeStill(frames: HTMLCanvasElement, drawings: readonly Drawing[]): HTMLCanvasElement {
  const still = blank(frames);
  const context = contextOf(still);
  context.drawImage(frames, 0, 0);
  if (drawings.length > 0) {
    const { width, height } = frames;
    const sheet = drawingNodes(drawings, frames).toCanvas({ x: 0, y: 0, width, height, pixelRatio: 1 });
    context.drawImage(sheet, 0, 0);
  }
  return still;
}

/** A sheet over one frame with its arms, angles and label; the same drawing as on the Desk. Null when it would be empty. */
function sheetOf(
  { marks, rollDeg, label }: FramePicture,
  { place, overlays, unit }: { place: StillPlace; overlays: boolean; unit: number },
  colours: StageColours,
): HTMLCanvasElement | null {
  const group = new Group({ listening: false });
  const { scale, width, height } = place;
  const stage = { width: width / unit, height: height / unit };
  if (overlays) {
    const view = { scale: scale / unit, offsetX: 0, offsetY: 0 };
    const taken: Box[] = [];
    for (const mark of marks) {
      const { shoulder, elbow, wrist } = mark;
      const joints = { shoulder, elbow, wrist };
      const { forearmDeg, elbowDeg } = mark.angles;
      const figure = angleFigure({ mark: joints, rollDeg, forearmDeg, elbowDeg }, view, stage, taken);
      if (figure) {
        group.add(angleNodes(figure, colours));
        taken.push(figure.forearmLabel.box, figure.elbowLabel.box);
      }
      group.add(armNodes(armFigure({ arm: mark.arm, joints, weight: 'chosen' }, view), colours));
    }
  }
  if (label !== null) group.add(textAt(label, { x: 14, y: 12 }, colours.plumb, 1, 24));
  if (!group.hasChildren()) return null;
  return group.toCanvas({ x: 0, y: 0, ...stage, pixelRatio: unit });
}

/** As a JPEG that loses nothing the eye could see; the server makes it anew. */
export function encodeStill(still: HTMLCanvasElement): Promise<Blob> {
  return new Promise((resolve, reject) => {
    still.toBlob(
      (blob) => (blob ? resolve(blob) : reject(new Error('The picture cannot be made here.'))),
      'image/jpeg',
      0.95,
    );
  });
}

function blank({ width, height }: PictureSize): HTMLCanvasElement {
  const canvas = document.createElement('canvas');
  canvas.width = width;
  canvas.height = height;
  return canvas;
}

function contextOf(canvas: HTMLCanvasElement): CanvasRenderingContext2D {
  const context = canvas.getContext('2d');
  if (!context) throw new Error('This browser draws no pictures.');
  return context;
}
