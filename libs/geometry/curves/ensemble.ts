import { meanOf, sumOfSquares } from '../statistics/sample';
import { CURVE_POINTS, type PercentCurve } from './resample';

/** Mean and spread of several strokes at one percent of the pull. */
export interface EnsemblePoint {
  /** Strokes that support this percent. */
  readonly count: number;
  /** Null without any stroke. */
  readonly mean: number | null;
  /** SD with divisor n − 1; null with fewer than two strokes. */
  readonly sd: number | null;
}

/**
 * Pointwise mean and SD over strokes. Peaks flatten when strokes reach them at different moments: show the strokes' own
 * peaks beside it.
 */
export function ensemble(curves: readonly PercentCurve[]): readonly EnsemblePoint[] {
  return Array.from({ length: CURVE_POINTS }, (_, percent) => {
    const values = curves.flatMap((curve) => curve[percent] ?? []);
    const count = values.length;
    if (count === 0) return { count, mean: null, sd: null };
    const mean = meanOf(values);
    return { count, mean, sd: count > 1 ? Math.sqrt(sumOfSquares(values, mean) / (count - 1)) : null };
  });
}
