import { normalBelow } from '../statistics/distributions';

/** How the largest of several uncertain readings relates to the largest true value. */
export interface LargestOf {
  /** By how much the largest reading is expected to exceed the largest true value, 0 or more. */
  readonly excess: number;
  /** Standard uncertainty of the largest reading. */
  readonly standard: number;
}

const SLICES = 200;
const REACH = 6;

/**
 * Mean and spread of the largest of independent normal readings N(value, standard), by integrating its distribution
 * function Π Φ((x − value)/standard), with the readings standing in for the true values.
 */
export function largestOf(
  readings: readonly { readonly value: number; readonly standard: number }[],
): LargestOf {
  const spread = readings.filter(({ standard }) => standard > 0);
  const top = Math.max(...readings.map(({ value }) => value));
  if (spread.length < 2) return { excess: 0, standard: spread[0]?.standard ?? 0 };
  const widest = Math.max(...spread.map(({ standard }) => standard));
  const from = top - REACH * widest;
  const step = (2 * REACH * widest) / SLICES;
  const below = (x: number): number =>
    readings.reduce(
      (p, { value, standard }) =>
        p * (standard > 0 ? normalBelow((x - value) / standard) : Number(x >= value)),
      1,
    );
  // E[X] = b − ∫F, E[X²] = b² − 2∫xF over [a, b]; midpoint rule, taken about the top reading.
  let area = 0;
  let moment = 0;
  for (let i = 0; i < SLICES; i += 1) {
    const x = from + (i + 0.5) * step;
    const p = below(x) * step;
    area += p;
    moment += (x - top) * p;
  }
  const end = REACH * widest;
  const excess = end - area;
  const variance = end * end - 2 * moment - excess * excess;
  return { excess: Math.max(0, excess), standard: Math.sqrt(Math.max(0, variance)) };
}
