import {
  nameWidth,
  rulerHeight,
  type PhaseName,
  type Size,
  type StripArm,
  type StripScene,
} from './strip-scene';

export interface StripColours {
  readonly left: string;
  readonly right: string;
  readonly quiet: string;
  readonly line: string;
  readonly text: string;
  readonly ground: string;
}

const phaseAlpha: Readonly<Record<PhaseName, number>> = {
  entryAndCatch: 0.38,
  pull: 1,
  push: 0.62,
  recovery: 0,
};
const barHeight = 12;

/** Draws a scene; the context is already scaled to CSS pixels and holds nothing else. */
export function paintStrip(
  context: CanvasRenderingContext2D,
  scene: StripScene,
  size: Size,
  colours: StripColours,
  playhead: { readonly x: number; readonly label: string },
): void {
  context.clearRect(0, 0, size.width, size.height);
  context.font = '12px "Source Sans 3", sans-serif';
  paintRuler(context, scene, colours, size);
  for (const arm of ['left', 'right'] as const) paintLane(context, scene, arm, colours, size);
  paintPlayhead(context, size, colours, playhead);
}

function paintRuler(
  context: CanvasRenderingContext2D,
  scene: StripScene,
  colours: StripColours,
  size: Size,
): void {
  context.strokeStyle = colours.line;
  context.fillStyle = colours.quiet;
  context.textAlign = 'left';
  for (const { x, label } of scene.ticks) {
    stroke(context, x, 0, x, label === null ? 5 : 10);
    if (label !== null && x < size.width - 24) context.fillText(label, x + 4, 14);
  }
}

function paintLane(
  context: CanvasRenderingContext2D,
  scene: StripScene,
  arm: StripArm,
  colours: StripColours,
  size: Size,
): void {
  const { middle } = scene.lanes[arm];
  const colour = colours[arm];
  context.fillStyle = colour;
  context.textAlign = 'left';
  context.font = '600 14px "Source Sans 3", sans-serif';
  context.fillText(arm === 'left' ? '▪ Left' : '● Right', 8, middle + 5);
  context.strokeStyle = colours.line;
  stroke(context, nameWidth, middle, size.width, middle);
  context.strokeStyle = colour;
  for (const { x, width, phase } of scene.bars.filter((bar) => bar.arm === arm)) {
    if (phase === 'recovery') {
      context.setLineDash(arm === 'left' ? [5, 3] : []);
      context.lineWidth = 1.5;
      stroke(context, x, middle, x + width, middle);
      context.setLineDash([]);
      continue;
    }
    context.globalAlpha = phaseAlpha[phase];
    context.fillRect(x, middle - barHeight / 2, width, barHeight);
    context.globalAlpha = 1;
  }
  paintCurves(context, scene, arm);
  paintPoints(context, scene, arm, colours);
}

function paintCurves(context: CanvasRenderingContext2D, scene: StripScene, arm: StripArm): void {
  context.lineWidth = 1.5;
  context.setLineDash(arm === 'left' ? [5, 3] : []);
  for (const { points } of scene.curves.filter((curve) => curve.arm === arm)) {
    context.beginPath();
    for (const [x, y] of points) context.lineTo(x, y);
    context.stroke();
  }
  context.setLineDash([]);
}

/** Events as notches in the bar, marked frames as the joints' shapes of the arm, breaths as a crescent above the bar. */
function paintPoints(
  context: CanvasRenderingContext2D,
  scene: StripScene,
  arm: StripArm,
  colours: StripColours,
): void {
  const { middle } = scene.lanes[arm];
  context.lineWidth = 1.5;
  context.strokeStyle = colours.text;
  for (const { x, byWrist } of scene.events.filter((event) => event.arm === arm)) {
    // Broken where the wrist stands in for the hand.
    context.setLineDash(byWrist ? [3, 3] : []);
    stroke(context, x, middle - 9, x, middle + 9);
  }
  context.setLineDash([]);
  context.fillStyle = colours.ground;
  for (const { x } of scene.marks.filter((mark) => mark.arm === arm)) {
    context.beginPath();
    if (arm === 'left') context.rect(x - 3.5, middle - 3.5, 7, 7);
    else context.arc(x, middle, 4, 0, 2 * Math.PI);
    context.fill();
    context.stroke();
  }
  context.fillStyle = colours.text;
  for (const { x } of scene.breaths.filter((breath) => breath.arm === arm)) {
    context.beginPath();
    context.arc(x, middle - 14, 5, 0.35 * Math.PI, 1.55 * Math.PI);
    context.arc(x + 2.6, middle - 15, 4, 1.45 * Math.PI, 0.45 * Math.PI, true);
    context.fill();
  }
}

function paintPlayhead(
  context: CanvasRenderingContext2D,
  { width, height }: Size,
  colours: StripColours,
  { x, label }: { readonly x: number; readonly label: string },
): void {
  if (x < nameWidth - 1 || x > width + 1) return;
  context.strokeStyle = context.fillStyle = colours.text;
  context.lineWidth = 1.5;
  stroke(context, x, 2, x, height - 14);
  context.beginPath();
  context.moveTo(x - 4.5, height - 15);
  context.lineTo(x + 4.5, height - 15);
  context.lineTo(x + 3.2, height - 8);
  context.lineTo(x, height - 2);
  context.lineTo(x - 3.2, height - 8);
  context.fill();
  context.font = '600 12px "Source Sans 3", sans-serif';
  const wide = context.measureText(label).width + 14;
  const left = x + 8 + wide > width ? x - 8 - wide : x + 8;
  context.fillStyle = colours.line;
  context.beginPath();
  context.roundRect(left, 1, wide, rulerHeight, 4);
  context.fill();
  context.fillStyle = colours.text;
  context.textAlign = 'left';
  context.fillText(label, left + 7, 15);
}

function stroke(context: CanvasRenderingContext2D, x1: number, y1: number, x2: number, y2: number): void {
  context.beginPath();
  context.moveTo(x1, y1);
  context.lineTo(x2, y2);
  context.stroke();
}
