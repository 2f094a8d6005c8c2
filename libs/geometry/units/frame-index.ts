import { type Outcome, ok, refused } from '../outcome';

declare const frameIndexBrand: unique symbol;

/** 0-based index of a frame in presentation order. */
export type FrameIndex = number & { readonly [frameIndexBrand]: true };

export type FrameReason = 'frame-not-whole' | 'frame-outside-clip';

/** `frameCount` unknown: only the lower end is checked. */
export function frameIndex(value: number, frameCount = Infinity): Outcome<FrameIndex, FrameReason> {
  if (!Number.isInteger(value)) return refused('frame-not-whole');
  return value < 0 || value >= frameCount ? refused('frame-outside-clip') : ok(value as FrameIndex);
}
