import { combine, type CombinedUncertainty, type UncertaintySource } from './parts';

/** A number that goes into a result, with its standard uncertainty. */
export interface UncertainInput {
  readonly source: UncertaintySource;
  readonly value: number;
  readonly standard: number;
}

/** Share of an input's uncertainty by which it is moved to find the slope. */
const STEP = 0.05;

/**
 * First-order propagation of independent inputs, slopes by central differences: u² = Σ (∂f/∂x)² u²(x), JCGM 100:2008,
 * eq. (10). One input that enters in several places is listed once, so that its covariance is counted.
 */
export function propagate(
  inputs: readonly UncertainInput[],
  result: (values: readonly number[]) => number,
): CombinedUncertainty {
  const values = inputs.map((input) => input.value);
  const contributions = inputs.map(({ source, standard }, at) => {
    if (standard === 0) return { source, alone: 0 };
    const value = values[at] ?? 0;
    values[at] = value + STEP * standard;
    const above = result(values);
    values[at] = value - STEP * standard;
    const rise = above - result(values);
    values[at] = value;
    return { source, alone: Math.abs(rise) / (2 * STEP) };
  });
  return combine(contributions);
}
