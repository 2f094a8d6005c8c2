import type { Drawing, DrawingColour } from '@stillstroke/contract/stills';
import { angleAtCorner } from '@stillstroke/geometry/points/corner-angle';
import { degreesText } from '../../desk/stage/angle-figure';
import { Group, Line, Shape, Text } from '../../desk/stage/konva-core';
import { lineUnit, type PictureSize } from './still-layout';

export const drawingColours: Readonly<Record<DrawingColour, string>> = {
  white: '#ffffff',
  yellow: '#ffe14d',
  green: '#8ff0a4',
};
const CASING = '#10222b';
const FONT = "'Source Sans 3', system-ui, sans-serif";
type Point = { readonly x: number; readonly y: number };

/** Draws things into a group in pixels of a still of this size. */
export function drawingNodes(drawings: readonly Drawing[], still: PictureSize): Group {
  const unit = lineUnit(still);
  const group = new Group({ listening: false });
  for (const drawing of drawings) group.add(...nodesOf(drawing, unit));
  return group;
}

function nodesOf(drawing: Drawing, unit: number): (Shape | Line)[] {
  const colour = drawingColours[drawing.colour];
  switch (drawing.kind) {
    case 'line':
      return cased([drawing.from, drawing.to], colour, unit);
    case 'arrow':
      return [
        ...cased([drawing.from, drawing.to], colour, unit),
        head(drawing.from, drawing.to, colour, unit),
      ];
    case 'angle':
      return angleNodes(drawing, colour, unit);
    case 'words':
      return [textAt(drawing.words, drawing.at, colour, unit, 22)];
  }
}

function cased(points: readonly Point[], colour: string, unit: number): Line[] {
  const shared = {
    points: points.flatMap(({ x, y }) => [x, y]),
    lineCap: 'round' as const,
    lineJoin: 'round' as const,
    listening: false,
  };
  return [
    new Line({ ...shared, stroke: CASING, strokeWidth: 7 * unit, opacity: 0.8 }),
    new Line({ ...shared, stroke: colour, strokeWidth: 3.5 * unit }),
  ];
}

/** The point of an arrow: its tip is where the arrow ends. */
function head(from: Point, to: Point, colour: string, unit: number): Line {
  const turn = Math.atan2(to.y - from.y, to.x - from.x);
  const side = (by: number) => [
    to.x - 17 * unit * Math.cos(turn + by),
    to.y - 17 * unit * Math.sin(turn + by),
  ];
  return new Line({
    points: [to.x, to.y, ...side(0.45), ...side(-0.45)],
    closed: true,
    fill: colour,
    stroke: CASING,
    strokeWidth: 1.5 * unit,
    lineJoin: 'round',
    listening: false,
  });
}

function angleNodes(
  { corner, from, to }: Extract<Drawing, { kind: 'angle' }>,
  colour: string,
  unit: number,
): (Shape | Line)[] {
  const legs = cased([from, corner, to], colour, unit);
  const angle = angleAtCorner(corner, from, to);
  if (!angle.ok) return legs;
  const start = Math.atan2(from.y - corner.y, from.x - corner.x);
  const turn = Math.atan2(to.y - corner.y, to.x - corner.x) - start;
  const sweep = Math.atan2(Math.sin(turn), Math.cos(turn));
  const shorter = Math.min(
    Math.hypot(from.x - corner.x, from.y - corner.y),
    Math.hypot(to.x - corner.x, to.y - corner.y),
  );
  const radius = Math.min(shorter * 0.6, 46 * unit);
  const arc = new Shape({
    stroke: colour,
    strokeWidth: 2 * unit,
    listening: false,
    sceneFunc: (context, shape) => {
      context.beginPath();
      context.arc(corner.x, corner.y, radius, start, start + sweep, sweep < 0);
      context.strokeShape(shape);
    },
  });
  const middle = start + sweep / 2;
  const away = radius + 24 * unit;
  const at = { x: corner.x + away * Math.cos(middle), y: corner.y + away * Math.sin(middle) };
  return [...legs, arc, centred(degreesText(angle.value), at, colour, unit)];
}

function centred(text: string, at: Point, colour: string, unit: number): Text {
  const node = textAt(text, at, colour, unit, 22);
  node.offset({ x: node.width() / 2, y: node.height() / 2 });
  return node;
}

/** Words with a dark edge, readable on any picture. */
export function textAt(text: string, { x, y }: Point, colour: string, unit: number, size: number): Text {
  return new Text({
    text,
    x,
    y,
    fontFamily: FONT,
    fontStyle: '600',
    fontSize: size * unit,
    fill: colour,
    stroke: CASING,
    strokeWidth: size * unit * 0.22,
    lineJoin: 'round',
    fillAfterStrokeEnabled: true,
    listening: false,
  });
}
