import { cameraRoll, type PlumbLine } from '@stillstroke/geometry/calibration/plumb';
import { plumbNodes, textNode } from './angle-nodes';
import { labelSize } from './angle-figure';
import { Circle, Group, Line } from './konva-core';
import { placeLabel } from './label-place';
import { asPicturePoint, type Size, stagePoint } from './spaces';
import type { StageColours } from './stage-colours';
import { toStage, type ViewTransform } from './view-transform';

export interface PlumbFigure {
  readonly plumb: PlumbLine;
  /** Being drawn: with handles, extended over the stage, and its lean in degrees. Else a faint line. */
  readonly active: boolean;
}

const LEAN_FONT = 18;

/** Draws the clip's vertical. */
export function plumbFigureNodes(
  { plumb, active }: PlumbFigure,
  view: ViewTransform,
  stage: Size,
  colours: StageColours,
): Group {
  const group = new Group({ listening: false });
  const top = toStage(view, asPicturePoint(plumb.top));
  const bottom = toStage(view, asPicturePoint(plumb.bottom));
  if (!active) {
    group.add(...plumbNodes([top, bottom], colours, 1, 0.45));
    return group;
  }
  group.add(extension(top, bottom, stage, colours));
  group.add(...plumbNodes([top, bottom], colours, 1.5));
  for (const { x, y } of [top, bottom]) {
    group.add(
      new Circle({ x, y, radius: 8, fill: 'rgb(16 34 43 / 0.35)', stroke: colours.casing, strokeWidth: 4 }),
      new Circle({ x, y, radius: 8, stroke: colours.plumb, strokeWidth: 2 }),
    );
  }
  const text = leanText(plumb);
  if (text) {
    const size = labelSize(text, LEAN_FONT);
    const middle = stagePoint((top.x + bottom.x) / 2, (top.y + bottom.y) / 2);
    const wish = { round: middle, towards: 0, from: size.width / 2 + 14, size };
    const box = placeLabel(wish, { lines: [[top, bottom]], boxes: [], stage });
    group.add(textNode(text, box, LEAN_FONT, colours));
  }
  return group;
}

/** How far the line leans against the picture's own vertical, to a tenth of a degree; null while none can be read. */
export function leanText(plumb: PlumbLine): string | null {
  const roll = cameraRoll(plumb);
  if (!roll.ok) return null;
  const lean = Math.round(Math.abs(roll.value.rollDeg) * 10) / 10;
  return lean === 0 ? 'upright' : `leans ${lean.toFixed(1)}°`;
}

/** The line carried on to both sides, to lay it along things longer than itself. */
function extension(
  top: { x: number; y: number },
  bottom: { x: number; y: number },
  stage: Size,
  colours: StageColours,
): Line {
  const length = Math.hypot(bottom.x - top.x, bottom.y - top.y);
  const reach = length > 0 ? (stage.width + stage.height) / length : 0;
  const dx = (bottom.x - top.x) * reach;
  const dy = (bottom.y - top.y) * reach;
  return new Line({
    points: [top.x - dx, top.y - dy, bottom.x + dx, bottom.y + dy],
    stroke: colours.plumb,
    strokeWidth: 1,
    dash: [3, 5],
    opacity: 0.6,
    listening: false,
  });
}
