import { type Outcome, ok, refused } from '../outcome';

declare const shareBrand: unique symbol;

/** Part of a whole, 0 to 1 (shown as percent). */
export type Share = number & { readonly [shareBrand]: true };

export function share(value: number): Outcome<Share, 'not-finite' | 'outside-share'> {
  if (!Number.isFinite(value)) return refused('not-finite');
  return value < 0 || value > 1 ? refused('outside-share') : ok(value as Share);
}
