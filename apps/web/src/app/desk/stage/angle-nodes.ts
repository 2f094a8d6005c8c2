import type { AngleFigure, AngleLabel, ArcFigure } from './angle-figure';
import { Arc, Group, Line, Shape, Text } from './konva-core';
import type { Box, Segment } from './label-place';
import type { StageColours } from './stage-colours';
import { stageDistance } from './spaces';

const FONT = "'Source Sans 3', system-ui, sans-serif";

/** Draws an arm's angles: plumb line through the elbow, arcs, and their numbers. */
export function angleNodes(figure: AngleFigure, colours: StageColours): Group {
  const group = new Group({ listening: false });
  group.add(...plumbNodes(figure.plumb, colours, 1.5));
  group.add(...arcNodes(figure.forearmArc, colours, 1), ...arcNodes(figure.elbowArc, colours, 0.75));
  group.add(labelNode(figure.forearmLabel, colours), labelNode(figure.elbowLabel, colours));
  return group;
}

/** The house's plumb line: a thin line from top to foot with a small bob hanging on it. */
export function plumbNodes(line: Segment, colours: StageColours, width: number, opacity = 1): Shape[] {
  const [top, foot] = line;
  const points = [top.x, top.y, foot.x, foot.y];
  const shared = { points, listening: false, lineCap: 'round' as const };
  const lean = (Math.atan2(foot.x - top.x, foot.y - top.y) * 180) / Math.PI;
  return [
    new Line({ ...shared, stroke: colours.casing, strokeWidth: width + 2, opacity: 0.55 * opacity }),
    new Line({ ...shared, stroke: colours.plumb, strokeWidth: width, opacity }),
    ...(stageDistance(top, foot) < 1 ? [] : [bobNode(foot.x, foot.y, -lean, colours, opacity)]),
  ];
}

function bobNode(x: number, y: number, rotation: number, colours: StageColours, opacity: number): Shape {
  return new Shape({
    x,
    y,
    rotation,
    opacity,
    listening: false,
    fill: colours.plumb,
    stroke: colours.casing,
    strokeWidth: 1,
    sceneFunc: (context, shape) => {
      context.beginPath();
      context.rect(-1.5, -3, 3, 3);
      context.moveTo(-4.5, 0);
      context.lineTo(4.5, 0);
      context.quadraticCurveTo(4.5, 6, 0, 12);
      context.quadraticCurveTo(-4.5, 6, -4.5, 0);
      context.closePath();
      context.fillStrokeShape(shape);
    },
  });
}

function arcNodes(
  { centre, radius, start, sweep }: ArcFigure,
  colours: StageColours,
  opacity: number,
): Shape[] {
  const from = sweep < 0 ? start + sweep : start;
  const shared = {
    x: centre.x,
    y: centre.y,
    innerRadius: radius,
    outerRadius: radius,
    rotation: (from * 180) / Math.PI,
    angle: (Math.abs(sweep) * 180) / Math.PI,
    listening: false,
  };
  return [
    new Arc({ ...shared, stroke: colours.casing, strokeWidth: 3.5, opacity: 0.6 * opacity }),
    new Arc({ ...shared, stroke: colours.plumb, strokeWidth: 1.5, opacity }),
  ];
}

/** A number with a dark edge, readable on any picture. */
export function labelNode({ text, box, fontSize }: AngleLabel, colours: StageColours): Text {
  return textNode(text, box, fontSize, colours);
}

export function textNode(text: string, box: Box, fontSize: number, colours: StageColours): Text {
  return new Text({
    text,
    x: box.left - 20,
    y: box.top,
    width: box.width + 40,
    height: box.height,
    align: 'center',
    verticalAlign: 'middle',
    fontFamily: FONT,
    fontStyle: '600',
    fontSize,
    fill: colours.plumb,
    stroke: colours.casing,
    strokeWidth: fontSize * 0.22,
    lineJoin: 'round',
    fillAfterStrokeEnabled: true,
    listening: false,
  });
}
