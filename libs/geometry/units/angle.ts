import { type Outcome, ok, refused } from '../outcome';

declare const degreesBrand: unique symbol;
declare const radiansBrand: unique symbol;

/** Angle in degrees. Finite. Sign and range are those of the measure that carries it. */
export type Degrees = number & { readonly [degreesBrand]: true };
/** Angle in radians. Finite. */
export type Radians = number & { readonly [radiansBrand]: true };

export function degrees(value: number): Outcome<Degrees, 'not-finite'> {
  return Number.isFinite(value) ? ok(value as Degrees) : refused('not-finite');
}

export function radians(value: number): Outcome<Radians, 'not-finite'> {
  return Number.isFinite(value) ? ok(value as Radians) : refused('not-finite');
}

/** Degrees of a direction given by its components: atan2(across, along), in (−180, 180]. Components are finite. */
export function directionDegrees(across: number, along: number): Degrees {
  return toDegrees(Math.atan2(across, along) as Radians);
}

export function toDegrees(angle: Radians): Degrees {
  return ((angle * 180) / Math.PI) as Degrees;
}

export function toRadians(angle: Degrees): Radians {
  return ((angle * Math.PI) / 180) as Radians;
}

/** The same direction in (−180, 180]. A value that is not finite stays what it is. */
export function wrapDegrees(angle: number): Degrees {
  const turned = ((angle % 360) + 360) % 360;
  return (turned > 180 ? turned - 360 : turned) as Degrees;
}
