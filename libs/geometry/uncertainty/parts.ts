/** What a standard uncertainty comes from. */
export type UncertaintySource =
  | 'shoulder-mark'
  | 'elbow-mark'
  | 'wrist-mark'
  | 'roll'
  | 'entry-frame'
  | 'catch-frame'
  | 'mid-pull'
  | 'exit-frame'
  | 'next-entry-frame'
  /** The spread of the strokes on either side of a difference, and what they share. */
  | 'first-strokes'
  | 'second-strokes'
  | 'shared'
  | 'distance'
  | 'time'
  /** The two places between which something is measured, and the scale it is measured with. */
  | 'first-place'
  | 'second-place'
  | 'scale';

/** One contribution to a standard uncertainty. */
export interface UncertaintyPart {
  readonly source: UncertaintySource;
  /** The standard uncertainty this source would leave on its own, in the unit of the result. */
  readonly alone: number;
  /** Its share of the variance, 0 to 1. */
  readonly share: number;
}

/** A standard uncertainty with its parts, largest first. */
export interface CombinedUncertainty {
  readonly standard: number;
  readonly parts: readonly UncertaintyPart[];
}

/** Adds independent contributions in quadrature; those of one source are added up first. JCGM 100:2008, eq. (10). */
export function combine(
  contributions: readonly { readonly source: UncertaintySource; readonly alone: number }[],
): CombinedUncertainty {
  const variances = new Map<UncertaintySource, number>();
  for (const { source, alone } of contributions) {
    variances.set(source, (variances.get(source) ?? 0) + alone * alone);
  }
  const total = [...variances.values()].reduce((sum, variance) => sum + variance, 0);
  const parts = [...variances]
    .map(([source, variance]) => ({
      source,
      alone: Math.sqrt(variance),
      share: total > 0 ? variance / total : 0,
    }))
    .sort((a, b) => b.alone - a.alone);
  return { standard: Math.sqrt(total), parts };
}
