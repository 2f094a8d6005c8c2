export type Colour = readonly [number, number, number];

/** What tells one swimmer and one pool from another. Colours are linear light, 0 to 1. */
export interface Look {
  readonly skin: Colour;
  readonly suit: Colour;
  /** A one-piece suit, or tight trunks to the middle of the thigh. */
  readonly suitCut: 'one-piece' | 'trunks';
  readonly cap: Colour;
  readonly laneLine: Colour;
  readonly laneMark: Colour;
  /** Shift of the water from blue-green (0) towards green (1). */
  readonly green: number;
}

export const POOL = {
  /** Metres from the lens to the swimmer, to the far wall (side view), and down to the floor. */
  swimmerAt: 3.3,
  farWallAt: 7.3,
  endWallAt: 15,
  floorDepth: 1.6,
  /** Lane line beside the swimmer. */
  laneLineAt: 1.3,
  swimSpeed: 1.42,
} as const;

/** Colour as written on the web, 0 to 255 each, to linear light. */
export function colour(red: number, green: number, blue: number): Colour {
  const linear = (value: number): number => (value / 255) ** 2.2;
  return [linear(red), linear(green), linear(blue)];
}
