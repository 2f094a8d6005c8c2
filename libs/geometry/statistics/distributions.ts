import studentCdf from '@stdlib/stats-base-dists-t-cdf';
import studentQuantile from '@stdlib/stats-base-dists-t-quantile';

import { normalAt, normalBelow } from './normal';

export { normalAt, normalBelow, Z95 } from './normal';

/** With more degrees of freedom than this, t is normal to twelve digits. */
const AS_GOOD_AS_NORMAL = 1e12;

/** Probability of Student's t below this value; the degrees of freedom are positive, need not be whole and may be Infinity. */
export function studentBelow(t: number, degreesOfFreedom: number): number {
  return degreesOfFreedom < AS_GOOD_AS_NORMAL ? studentCdf(t, degreesOfFreedom) : normalBelow(t);
}

/** The t below which Student's t falls with this probability (0 to 1). */
export function studentAt(probability: number, degreesOfFreedom: number): number {
  return degreesOfFreedom < AS_GOOD_AS_NORMAL
    ? studentQuantile(probability, degreesOfFreedom)
    : normalAt(probability);
}

/** t of a two-sided 95 % interval. */
export function t95(degreesOfFreedom: number): number {
  return studentAt(0.975, degreesOfFreedom);
}
