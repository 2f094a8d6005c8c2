import { type Outcome, ok, refused } from '../outcome';

export interface SymmetryIndex {
  /** 100·(R − L)/(½(R + L)), percent, + right larger. */
  readonly percent: number;
  readonly uncertainty: number;
}

/**
 * Symmetry index (Robinson, Herzog and Nigg 1987) of durations or lengths. Only for positive quantities with a true
 * zero: for angles compare degrees instead, since the index of an angle changes with the way it is counted.
 */
export function symmetryIndex(
  right: { readonly value: number; readonly uncertainty: number },
  left: { readonly value: number; readonly uncertainty: number },
): Outcome<SymmetryIndex, 'not-finite' | 'not-positive'> {
  const numbers = [right.value, right.uncertainty, left.value, left.uncertainty];
  if (!numbers.every(Number.isFinite)) return refused('not-finite');
  if (right.value < 0 || left.value < 0 || right.value + left.value <= 0) return refused('not-positive');
  const sum = right.value + left.value;
  return ok({
    percent: (200 * (right.value - left.value)) / sum,
    uncertainty:
      (400 * Math.hypot(left.value * right.uncertainty, right.value * left.uncertainty)) / sum ** 2,
  });
}
