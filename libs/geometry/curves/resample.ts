/** A reading at its place in the pull. */
export interface CurveSample {
  /** 0 catch to 1 exit. */
  readonly share: number;
  readonly deg: number;
}

/** Points of a curve in percent of the pull: index 0 to 100. Null where marks do not support it. */
export type PercentCurve = readonly (number | null)[];

export const CURVE_POINTS = 101;
/**
 * Marks further apart than this share of the pull do not support a line between them. Our own choice, no source: a third
 * of the pull, as marked at the least, and a frame or two of rounding.
 */
export const WIDEST_GAP = 0.4;

/**
 * Straight lines between neighbouring marks, read at every percent; null before the first, after the last, and across
 * gaps wider than `widestGap`. Samples need not be sorted; those that are not finite are left aside.
 */
export function resample(samples: readonly CurveSample[], widestGap = WIDEST_GAP): PercentCurve {
  const sorted = samples
    .filter(({ share, deg }) => Number.isFinite(share) && Number.isFinite(deg))
    .sort((a, b) => a.share - b.share);
  let at = 0;
  return Array.from({ length: CURVE_POINTS }, (_, percent) => {
    const share = percent / 100;
    while (at + 1 < sorted.length && (sorted[at + 1]?.share ?? Infinity) < share) at += 1;
    return readAt(share, sorted[at], sorted[at + 1], widestGap);
  });
}

function readAt(
  share: number,
  before: CurveSample | undefined,
  after: CurveSample | undefined,
  widestGap: number,
): number | null {
  if (!before || share < before.share) return null;
  if (share === before.share) return before.deg;
  if (!after || share > after.share) return null;
  if (share === after.share) return after.deg;
  const gap = after.share - before.share;
  if (gap > widestGap) return null;
  return before.deg + ((share - before.share) / gap) * (after.deg - before.deg);
}
