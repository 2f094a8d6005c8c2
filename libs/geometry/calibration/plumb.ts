import type { TravelDirection } from '../arm';
import { type Outcome, ok, refused } from '../outcome';
import { checkPoint, distance, type VideoPoint } from '../points/video-point';
import { type Degrees, type Radians, toDegrees } from '../units/angle';

/** The vertical of a clip, drawn by the coach along something that hangs or stands plumb. */
export interface PlumbLine {
  readonly top: VideoPoint;
  readonly bottom: VideoPoint;
}

export type PlumbReason = 'plumb-not-finite' | 'plumb-too-short' | 'plumb-level';

/** How far the picture is turned against the vertical. */
export interface CameraRoll {
  /** Angle from picture-down to plumb-down: atan2(Δx, Δy), −90° to 90°, + when the lower end leans to the right. */
  readonly rollDeg: Degrees;
  /** True when no plumb was drawn and the picture's own vertical stands in for it. */
  readonly assumed: boolean;
  /** Length of the plumb line in pixels; null when assumed. */
  readonly lengthPx: number | null;
}

/**
 * Rotation from the picture to the swimmer's axes: f ahead (travel), d down the plumb.
 * d = x·sin(roll) + y·cos(roll);  f = ±(x·cos(roll) − y·sin(roll)), + for travel to the right.
 */
export interface BodyAxes {
  readonly cosRoll: number;
  readonly sinRoll: number;
  readonly aheadSign: 1 | -1;
  readonly assumed: boolean;
}

/** A vector in the swimmer's axes, in pixels. */
export interface BodyVector {
  /** Ahead, in the travel direction. */
  readonly f: number;
  /** Down the plumb. */
  readonly d: number;
}

/** A plumb line shorter than this (pixels) says too little about the vertical. */
export const SHORTEST_PLUMB_PX = 20;
/** Closer to level than this, which end is the lower one cannot be told. */
const LEVEL_MARGIN_DEG = 5;
/**
 * Standard uncertainty of the roll while the picture's own vertical is assumed. Our own assumption for a hand-held or
 * pole-mounted camera; common practice, no source.
 */
export const ASSUMED_ROLL_UNCERTAINTY_DEG = 2;

/**
 * Roll of the camera. A line drawn upside down is turned round: down is the half nearer to picture-down.
 * Formula: ρ = atan2(x_b − x_t, y_b − y_t).
 */
export function cameraRoll(plumb: PlumbLine | null): Outcome<CameraRoll, PlumbReason> {
  if (plumb === null) return ok({ rollDeg: 0 as Degrees, assumed: true, lengthPx: null });
  if (!checkPoint(plumb.top).ok || !checkPoint(plumb.bottom).ok) return refused('plumb-not-finite');
  const lengthPx = distance(plumb.top, plumb.bottom);
  if (lengthPx < SHORTEST_PLUMB_PX) return refused('plumb-too-short');
  const turn = plumb.bottom.y < plumb.top.y ? -1 : 1;
  const dx = turn * (plumb.bottom.x - plumb.top.x);
  const dy = turn * (plumb.bottom.y - plumb.top.y);
  const rollDeg = toDegrees(Math.atan2(dx, dy) as Radians);
  if (Math.abs(rollDeg) > 90 - LEVEL_MARGIN_DEG) return refused('plumb-level');
  return ok({ rollDeg, assumed: false, lengthPx });
}

/**
 * Standard uncertainty of the roll, degrees: √2·u/L of the plumb's two end points, u in pixels;
 * {@link ASSUMED_ROLL_UNCERTAINTY_DEG} when there is no plumb.
 */
export function rollUncertaintyDeg(
  plumb: PlumbLine | null,
  endPointUncertaintyPx: number,
): Outcome<Degrees, PlumbReason> {
  const roll = cameraRoll(plumb);
  if (!roll.ok) return roll;
  if (roll.value.lengthPx === null) return ok(ASSUMED_ROLL_UNCERTAINTY_DEG as Degrees);
  if (!(endPointUncertaintyPx >= 0 && endPointUncertaintyPx < Infinity)) return refused('plumb-not-finite');
  return ok(toDegrees(((Math.SQRT2 * endPointUncertaintyPx) / roll.value.lengthPx) as Radians));
}

/** The axes of a clip; without a plumb the picture's own vertical, flagged `assumed`. */
export function bodyAxes(plumb: PlumbLine | null, travel: TravelDirection): Outcome<BodyAxes, PlumbReason> {
  const roll = cameraRoll(plumb);
  if (!roll.ok) return roll;
  return ok(axesAt((roll.value.rollDeg * Math.PI) / 180, travel, roll.value.assumed));
}

/** Axes for a roll in radians. */
function axesAt(rollRad: number, travel: TravelDirection, assumed: boolean): BodyAxes {
  return {
    cosRoll: Math.cos(rollRad),
    sinRoll: Math.sin(rollRad),
    aheadSign: travel === 'right' ? 1 : -1,
    assumed,
  };
}

/** The same axes turned by a further roll, radians. */
export function turnedAxes(axes: BodyAxes, byRad: number): BodyAxes {
  const travel = axes.aheadSign === 1 ? 'right' : 'left';
  return axesAt(Math.atan2(axes.sinRoll, axes.cosRoll) + byRad, travel, axes.assumed);
}

/** The vector from one point to another, in the swimmer's axes. */
export function bodyVector(axes: BodyAxes, from: VideoPoint, to: VideoPoint): BodyVector {
  const x = to.x - from.x;
  const y = to.y - from.y;
  return {
    f: axes.aheadSign * (x * axes.cosRoll - y * axes.sinRoll),
    d: x * axes.sinRoll + y * axes.cosRoll,
  };
}
