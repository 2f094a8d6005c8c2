/** Times are rounded twice, by the container's clock and to microseconds; this much is left for the second. */
const ROUNDING_US = 2;

/**
 * The rate of a clip whose frames are evenly spaced, as far as the container's clock can tell.
 *
 * @param timestampsUs ascending presentation times in microseconds
 * @param ticksPerSecond resolution of the container's clock, in hertz
 * @returns frames per second of file time; null when the spacing varies or there are fewer than two frames
 */
export function steadyRate(timestampsUs: readonly number[], ticksPerSecond: number): number | null {
  const first = timestampsUs[0];
  const last = timestampsUs.at(-1);
  if (first === undefined || last === undefined || last <= first) return null;
  const spacing = (last - first) / (timestampsUs.length - 1);
  const tolerance = Math.min(1e6 / ticksPerSecond, spacing / 2) + ROUNDING_US;
  const steady = timestampsUs.every((time, n) => Math.abs(time - (first + n * spacing)) <= tolerance);
  return steady ? settled(1e6 / spacing, tolerance / (last - first)) : null;
}

/** Whole rates and the 1000/1001 family are what cameras mean when the measured rate is within its own error of one. */
function settled(rate: number, relativeError: number): number {
  const distance = (candidate: number): number => Math.abs(rate / candidate - 1);
  const candidates = [Math.round(rate), (Math.ceil(rate) * 1000) / 1001, (Math.round(rate) * 1000) / 1001];
  const nearest = candidates
    .filter((candidate) => candidate > 0)
    .sort((a, b) => distance(a) - distance(b))[0];
  return nearest !== undefined && distance(nearest) <= Math.max(relativeError, 1e-6) ? nearest : rate;
}
