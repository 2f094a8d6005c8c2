import erfc from '@stdlib/math-base-special-erfc';
import erfcinv from '@stdlib/math-base-special-erfcinv';

/**
 * The normal distribution, apart from Student's t: the Desk needs only this one.
 */

/** Probability of a standard normal value below z. */
export function normalBelow(z: number): number {
  return erfc(-z / Math.SQRT2) / 2;
}

/** The z below which a standard normal value falls with this probability (0 to 1). */
export function normalAt(probability: number): number {
  return -Math.SQRT2 * erfcinv(2 * probability);
}

/** z of a two-sided 95 % interval, 1.95996… */
export const Z95 = normalAt(0.975);
