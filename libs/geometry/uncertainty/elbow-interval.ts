import { normalBelow, Z95 } from '../statistics/normal';

/** The two ends of a 95 % interval. */
export interface Interval {
  readonly low: number;
  readonly high: number;
}

/** value ± 1.96 standard uncertainties. */
export function normalInterval(value: number, standard: number): Interval {
  return { low: value - Z95 * standard, high: value + Z95 * standard };
}

/**
 * 95 % interval of an interior elbow angle, degrees within 0 to 180. The angle cannot read more than 180, so a straight
 * arm always reads low and ± would be wrong there. The bend b = 180 − angle follows a folded normal distribution; the
 * interval is that of its inverted test: accept [max(0, b − z·u), c] with c chosen so that exactly 95 % fall within.
 * Far from straight it is the ordinary ± 1.96 u. Near fully folded (0°) the same is done from the other end.
 */
export function elbowInterval(elbowDeg: number, standardDeg: number): Interval {
  if (standardDeg <= 0) return { low: elbowDeg, high: elbowDeg };
  if (elbowDeg < 90) {
    const mirrored = straightEnd(elbowDeg / standardDeg);
    return { low: mirrored.low * standardDeg, high: Math.min(180, mirrored.high * standardDeg) };
  }
  const bend = straightEnd((180 - elbowDeg) / standardDeg);
  return { low: Math.max(0, 180 - bend.high * standardDeg), high: 180 - bend.low * standardDeg };
}

/** Interval of a non-negative quantity of which |N(quantity, 1)| was observed. */
function straightEnd(observed: number): Interval {
  return { low: lowerEnd(observed), high: observed + Z95 };
}

const FAR_FROM_FOLD = 6;
const HALVINGS = 32;

/** Smallest true bend whose acceptance region still holds the observed one. */
function lowerEnd(observed: number): number {
  if (observed <= Z95) return 0;
  if (observed > FAR_FROM_FOLD) return observed - Z95;
  let inside = observed;
  let outside = 0;
  for (let i = 0; i < HALVINGS; i += 1) {
    const middle = (inside + outside) / 2;
    const from = Math.max(0, middle - Z95);
    const below = foldedBelow(observed, middle) - foldedBelow(from, middle);
    if (below > 0.95) outside = middle;
    else inside = middle;
  }
  return inside;
}

/** Probability that |N(mean, 1)| is below x. */
function foldedBelow(x: number, mean: number): number {
  return normalBelow(x - mean) - normalBelow(-x - mean);
}
