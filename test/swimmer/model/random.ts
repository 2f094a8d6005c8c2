/** A seeded stream of numbers: the same seed gives the same swimmer, film and marks on every machine. */
export interface RandomStream {
  /** Uniform in [0, 1). */
  readonly next: () => number;
  /** Normal with mean 0 and the given spread, cut at ±2.5 spreads so that no stroke turns grotesque. */
  readonly normal: (spread: number) => number;
}

export function randomStream(seed: number): RandomStream {
  let state = seed >>> 0;
  const next = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  };
  const normal = (spread: number): number => {
    const radius = Math.sqrt(-2 * Math.log(1 - next()));
    const value = radius * Math.cos(2 * Math.PI * next());
    return spread * Math.min(2.5, Math.max(-2.5, value));
  };
  return { next, normal };
}
