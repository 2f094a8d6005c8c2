/** A part of a combined standard uncertainty with the degrees of freedom it was estimated with (Infinity: known). */
export interface UncertainPart {
  readonly standard: number;
  readonly degreesOfFreedom: number;
}

/** Welch–Satterthwaite: (Σ u²)² / Σ (u⁴/ν), JCGM 100:2008, G.4.1; Infinity when every part is known. */
export function effectiveFreedom(parts: readonly UncertainPart[]): number {
  const variance = parts.reduce((sum, { standard }) => sum + standard ** 2, 0);
  const spread = parts.reduce(
    (sum, { standard, degreesOfFreedom }) => sum + standard ** 4 / degreesOfFreedom,
    0,
  );
  return variance ** 2 / spread;
}
