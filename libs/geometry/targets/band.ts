import { ok, refused, type Outcome } from '../outcome';
import { Z95 } from '../statistics/normal';

/** A band of values, both ends included; null = open on that side, never on both. */
export interface Band {
  readonly low: number | null;
  readonly high: number | null;
}

export type BandReason = 'not-finite' | 'open-on-both-sides' | 'ends-crossed';

/** A band from its ends: at least one of them, finite, the low one below the high one. */
export function band(low: number | null, high: number | null): Outcome<Band, BandReason> {
  if (![low, high].every((end) => end === null || Number.isFinite(end))) return refused('not-finite');
  if (low === null && high === null) return refused('open-on-both-sides');
  if (low !== null && high !== null && low >= high) return refused('ends-crossed');
  return ok({ low, high });
}

/**
 * Where a measured value lies against a band, by its 95 % interval:
 * - `inside`: the whole interval is in the band
 * - `below`, `above`: the whole interval is beyond the end; `by` is from the value to that end, positive
 * - `at-edge`: an end lies within the interval, so that value and end cannot be told apart
 */
export type BandRelation =
  | { readonly kind: 'inside' }
  | { readonly kind: 'below' | 'above'; readonly by: number }
  | { readonly kind: 'at-edge'; readonly edges: readonly ('low' | 'high')[] };

export type RelationReason = 'not-finite' | 'interval-crossed';

/** @param interval 95 % interval of the value, in the unit of the band; contains the value */
export function relationToBand(
  value: number,
  interval: { readonly low: number; readonly high: number },
  { low, high }: Band,
): Outcome<BandRelation, RelationReason> {
  if (![value, interval.low, interval.high].every(Number.isFinite)) return refused('not-finite');
  if (interval.low > value || interval.high < value) return refused('interval-crossed');
  if (low !== null && interval.high < low) return ok({ kind: 'below', by: low - value });
  if (high !== null && interval.low > high) return ok({ kind: 'above', by: value - high });
  const edges: ('low' | 'high')[] = [];
  if (low !== null && interval.low < low) edges.push('low');
  if (high !== null && interval.high > high) edges.push('high');
  return ok(edges.length === 0 ? { kind: 'inside' } : { kind: 'at-edge', edges });
}

/** The same for a value with its standard uncertainty, both in the unit of the band; the interval is ± 1.96 of it. */
export function figureAgainstBand(
  value: number,
  uncertainty: number,
  target: Band,
): Outcome<BandRelation, RelationReason> {
  const spread = Z95 * uncertainty;
  return relationToBand(value, { low: value - spread, high: value + spread }, target);
}
