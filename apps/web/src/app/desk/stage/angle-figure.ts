import type { ArmMark } from '@stillstroke/geometry/arm';
import { type Box, placeLabel, type Segment } from './label-place';
import { asPicturePoint, type Size, stageDistance, type StagePoint, stagePoint } from './spaces';
import { toStage, type ViewTransform } from './view-transform';

/** An arc as canvases draw it: radians, clockwise from x; `sweep` is signed. */
export interface ArcFigure {
  readonly centre: StagePoint;
  readonly radius: number;
  readonly start: number;
  readonly sweep: number;
}

export interface AngleLabel {
  readonly text: string;
  readonly box: Box;
  /** Font size, CSS pixels. */
  readonly fontSize: number;
}

/** The angles of an arm as drawn on it, in stage pixels. */
export interface AngleFigure {
  /** From the elbow down the plumb. */
  readonly plumb: Segment;
  readonly forearmArc: ArcFigure;
  readonly elbowArc: ArcFigure;
  readonly forearmLabel: AngleLabel;
  readonly elbowLabel: AngleLabel;
}

export interface AngleFigureInput {
  readonly mark: ArmMark;
  /** Camera roll, degrees: angle from picture-down to plumb-down, + when the plumb leans to the right at its foot. */
  readonly rollDeg: number;
  /** Degrees, as the readings show them. */
  readonly forearmDeg: number;
  readonly elbowDeg: number;
}

const FOREARM_FONT = 26;
const ELBOW_FONT = 16;
/** Width of a digit of the house's typeface, in units of its size; tabular, so all are alike. */
const DIGIT_WIDTH = 0.56;

/**
 * Lays out the angles of an arm; null when its elbow is not on the stage, for then there is nothing to point at.
 *
 * @param taken places on the stage that its controls cover, CSS pixels
 */
export function angleFigure(
  input: AngleFigureInput,
  view: ViewTransform,
  stage: Size,
  taken: readonly Box[] = [],
): AngleFigure | null {
  const [shoulder, elbow, wrist] = [input.mark.shoulder, input.mark.elbow, input.mark.wrist].map((point) =>
    toStage(view, asPicturePoint(point)),
  );
  if (!shoulder || !elbow || !wrist || !isOn(stage, elbow)) return null;
  const forearmPx = stageDistance(elbow, wrist);
  const plumbPx = within(forearmPx * 1.25, 56, 200);
  const down = Math.PI / 2 - (input.rollDeg * Math.PI) / 180;
  const plumb: Segment = [elbow, along(elbow, down, plumbPx)];
  const forearmArc = arcBetween(elbow, within(forearmPx * 0.62, 26, 110), down, directionOf(elbow, wrist));
  const upward = directionOf(elbow, shoulder);
  const elbowArc = arcBetween(elbow, within(forearmPx * 0.25, 14, 34), upward, directionOf(elbow, wrist));
  const lines: Segment[] = [[shoulder, elbow], [elbow, wrist], plumb];
  const forearmLabel = label(input.forearmDeg, FOREARM_FONT, forearmArc, { lines, boxes: taken, stage });
  const elbowLabel = label(input.elbowDeg, ELBOW_FONT, elbowArc, {
    lines,
    boxes: [...taken, forearmLabel.box],
    stage,
  });
  return { plumb, forearmArc, elbowArc, forearmLabel, elbowLabel };
}

/** Whole degrees with a true minus sign. */
export function degreesText(degrees: number): string {
  const whole = Math.round(degrees);
  return `${whole < 0 ? '−' : ''}${Math.abs(whole)}°`;
}

/** Size of a label's text, CSS pixels. */
export function labelSize(text: string, fontSize: number): Size {
  return { width: text.length * DIGIT_WIDTH * fontSize, height: fontSize };
}

function label(
  degrees: number,
  fontSize: number,
  arc: ArcFigure,
  obstacles: Parameters<typeof placeLabel>[1],
): AngleLabel {
  const text = degreesText(degrees);
  const size = labelSize(text, fontSize);
  const wish = {
    round: arc.centre,
    towards: arc.start + arc.sweep / 2,
    from: arc.radius + fontSize * 0.8,
    size,
  };
  return { text, fontSize, box: placeLabel(wish, obstacles) };
}

/** The shorter way round from one direction to another. */
function arcBetween(centre: StagePoint, radius: number, from: number, to: number): ArcFigure {
  const turn = (to - from) % (2 * Math.PI);
  const sweep = turn > Math.PI ? turn - 2 * Math.PI : turn <= -Math.PI ? turn + 2 * Math.PI : turn;
  return { centre, radius, start: from, sweep };
}

function along(from: StagePoint, direction: number, px: number): StagePoint {
  return stagePoint(from.x + px * Math.cos(direction), from.y + px * Math.sin(direction));
}

function directionOf(from: StagePoint, to: StagePoint): number {
  return Math.atan2(to.y - from.y, to.x - from.x);
}

function isOn(stage: Size, { x, y }: StagePoint): boolean {
  return x >= 0 && y >= 0 && x <= stage.width && y <= stage.height;
}

function within(value: number, low: number, high: number): number {
  return Math.min(Math.max(value, low), high);
}
