import erfc from '@stdlib/math-base-special-erfc';
import erfcinv from '@stdlib/math-base-special-erfcinv';
import studentCdf from '@stdlib/stats-base-dists-t-cdf';
import studentQuantile from '@stdlib/stats-base-dists-t-quantile';

/** Probability of a standard normal value below z. */
export function normalBelow(z: number): number {
  return erfc(-z / Math.SQRT2) / 2;
}

/** The z below which a standard normal value falls with this probability (0 to 1). */
export function normalAt(probability: number): number {
  return -Math.SQRT2 * erfcinv(2 * probability);
}

/** Probability of Student's t below this value; the degrees of freedom are positive and need not be whole. */
export function studentBelow(t: number, degreesOfFreedom: number): number {
  return studentCdf(t, degreesOfFreedom);
}

/** The t below which Student's t falls with this probability (0 to 1). */
export function studentAt(probability: number, degreesOfFreedom: number): number {
  return studentQuantile(probability, degreesOfFreedom);
}

/** z of a two-sided 95 % interval, 1.95996… */
export const Z95 = normalAt(0.975);

/** t of a two-sided 95 % interval. */
export function t95(degreesOfFreedom: number): number {
  return studentAt(0.975, degreesOfFreedom);
}
