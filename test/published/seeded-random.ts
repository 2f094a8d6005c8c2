/** Random numbers that are the same in every run. */
export interface SeededRandom {
  /** Evenly in [0, 1). */
  readonly even: () => number;
  /** Standard normal. */
  readonly normal: () => number;
  /** Evenly in [low, high). */
  readonly between: (low: number, high: number) => number;
}

export function seededRandom(seed: number): SeededRandom {
  let state = seed >>> 0;
  const even = (): number => {
    state = (state + 0x9e3779b9) >>> 0;
    let z = state;
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    return ((z ^ (z >>> 16)) >>> 0) / 2 ** 32;
  };
  const normal = (): number => Math.sqrt(-2 * Math.log(1 - even())) * Math.cos(2 * Math.PI * even());
  return { even, normal, between: (low, high) => low + (high - low) * even() };
}
