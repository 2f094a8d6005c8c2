/** A stream of normally spread numbers (mean 0, spread 1, within ±3) that is the same for the same seed. */
export function spreadStream(seed: number): () => number {
  let state = (Math.imul(seed, 0x9e3779b1) ^ 0x5bd1e995) >>> 0;
  const uniform = (): number => {
    // Marsaglia's xorshift, 32 bits (Journal of Statistical Software 8(14), 2003; shifts from memory).
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    state >>>= 0;
    return (state + 0.5) / 2 ** 32;
  };
  for (let skipped = 0; skipped < 8; skipped += 1) uniform();
  return () => {
    const value = Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
    return Math.max(-3, Math.min(3, value));
  };
}
