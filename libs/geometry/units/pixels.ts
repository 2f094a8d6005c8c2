import { type Outcome, ok, refused } from '../outcome';

declare const pixelsBrand: unique symbol;

/** Length in pixels of the picture as shown. Finite, not negative. */
export type Pixels = number & { readonly [pixelsBrand]: true };

export function pixels(value: number): Outcome<Pixels, 'not-finite' | 'negative'> {
  if (!Number.isFinite(value)) return refused('not-finite');
  return value < 0 ? refused('negative') : ok(value as Pixels);
}
