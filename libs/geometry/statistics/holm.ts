import { type Outcome, ok, refused } from '../outcome';

/**
 * Holm's step-down correction: p values adjusted for having looked at all of them, in the order given. Compare with the
 * same 0.05 as before. S. Holm (1979), Scand. J. Statist. 6:65–70 (citation from memory).
 */
export function holm(pValues: readonly number[]): Outcome<readonly number[], 'bad-probability'> {
  if (pValues.some((p) => !(p >= 0 && p <= 1))) return refused('bad-probability');
  const order = pValues.map((p, at) => ({ p, at })).sort((a, b) => a.p - b.p);
  const adjusted = new Array<number>(pValues.length).fill(1);
  let floor = 0;
  for (const [rank, { p, at }] of order.entries()) {
    floor = Math.max(floor, Math.min(1, p * (pValues.length - rank)));
    adjusted[at] = floor;
  }
  return ok(adjusted);
}
