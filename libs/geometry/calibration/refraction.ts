import { type Outcome, ok, refused } from '../outcome';
import { type Degrees, type Radians, toDegrees } from '../units/angle';

/** Refraction at a flat port with the pinhole at the port: Snell's law, no lens distortion beside it. */

/** Of fresh water in visible light. */
export const WATER_INDEX = 1.333;

export interface FlatPortView {
  /** Angle of the ray in air (inside the housing), degrees from the axis. */
  readonly airDeg: Degrees;
  /** Distance from the picture's centre over focal length: n·t/√(1 − (n² − 1)t²), t = tan of the angle in water. */
  readonly radius: number;
  /** How much farther out than with the plain magnification n, as a share. */
  readonly radiusError: number;
  /** Radial over tangential magnification, 1 on the axis. */
  readonly stretch: number;
  /** Largest error of a direction there: asin((q − 1)/(q + 1)). */
  readonly directionErrorDeg: Degrees;
}

/** What a flat port does at an angle (0 up to the critical angle, 48.6° for water) off the axis in water. */
export function flatPort(waterDeg: number, index = WATER_INDEX): Outcome<FlatPortView, 'outside-view'> {
  const water = (waterDeg * Math.PI) / 180;
  const s = index * Math.sin(water);
  if (!(waterDeg >= 0 && waterDeg < 90 && s < 1 && index >= 1)) return refused('outside-view');
  const t = Math.tan(water);
  const stretch = 1 / (1 - (index * index - 1) * t * t);
  const radius = index * t * Math.sqrt(stretch);
  return ok({
    airDeg: toDegrees(Math.asin(s) as Radians),
    radius,
    radiusError: Math.sqrt(stretch) - 1,
    stretch,
    directionErrorDeg: toDegrees(Math.asin((stretch - 1) / (stretch + 1)) as Radians),
  });
}

/** Angle in water (degrees off the axis) of a point at a distance from the picture's centre over focal length. */
export function waterAngle(radius: number, index = WATER_INDEX): Outcome<Degrees, 'outside-view'> {
  if (!(radius >= 0 && Number.isFinite(radius))) return refused('outside-view');
  const t = radius / Math.sqrt(index * index + (index * index - 1) * radius * radius);
  return ok(toDegrees(Math.atan(t) as Radians));
}
