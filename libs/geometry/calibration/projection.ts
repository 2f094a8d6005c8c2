import { type Degrees, type Radians, toDegrees } from '../units/angle';

/** What a tilt of the arm's plane out of the picture does to lengths and angles (seen from far away). */

function cosine(deg: number): number {
  return Math.cos((deg * Math.PI) / 180);
}

function sine(deg: number): number {
  return Math.sin((deg * Math.PI) / 180);
}

function inDegrees(radians: number): Degrees {
  return toDegrees(radians as Radians);
}

/** Largest error of a direction in a plane tilted by φ (0 to 90): asin((1 − cos φ)/(1 + cos φ)). */
export function largestDirectionError(tiltDeg: number): Degrees {
  const c = cosine(tiltDeg);
  return inDegrees(Math.asin((1 - c) / (1 + c)));
}

/** Error of a length along the tilted direction, as a share: cos φ − 1, never above 0. */
export function lengthError(tiltDeg: number): number {
  return cosine(tiltDeg) - 1;
}

/**
 * Elbow angle in space (0 to 180) of a projected one, when upper arm and forearm leave the picture's plane by elevations
 * e₁ and e₂, both counted outward from the elbow: cos α = cos e₁·cos e₂·cos α′ + sin e₁·sin e₂.
 */
export function elbowInSpace(projectedDeg: number, upperArmOutDeg: number, forearmOutDeg: number): Degrees {
  const c =
    cosine(upperArmOutDeg) * cosine(forearmOutDeg) * cosine(projectedDeg) +
    sine(upperArmOutDeg) * sine(forearmOutDeg);
  return inDegrees(Math.acos(Math.min(1, Math.max(-1, c))));
}

/**
 * Apparent scale of something nearer to the camera by `nearerM` than a plane at `distanceM` that is shown at scale 1;
 * negative: farther away. distanceM > nearerM. The reason why lengths of near and far arm are never compared.
 */
export function apparentScale(distanceM: number, nearerM: number): number {
  return distanceM / (distanceM - nearerM);
}
