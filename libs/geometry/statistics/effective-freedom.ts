/** A part of a combined standard uncertainty with the degrees of freedom it was estimated with (Infinity: known). */
export interface UncertainPart {
  readonly standard: number;
  readonly degreesOfFreedom: number;
}

/** Welch–Satterthwaite: (Σ u²)² / Σ (u⁴/ν), JCGM 100:2008, G.4.1; Infinity when every part is known. */
export function effectiveFreedom(parts: readonly UncertainPart[]): number {
  // Over the largest part, so that fourth powers of small numbers do not vanish.
  const largest = Math.max(...parts.map(({ standard }) => standard));
  const sum = (of: (part: UncertainPart) => number): number => parts.reduce((all, part) => all + of(part), 0);
  const variance = sum(({ standard }) => (standard / largest) ** 2);
  const spread = sum(({ standard, degreesOfFreedom }) => (standard / largest) ** 4 / degreesOfFreedom);
  return variance ** 2 / spread;
}
