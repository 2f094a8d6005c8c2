import { type Outcome, ok, refused } from '../outcome';

declare const microsecondsBrand: unique symbol;

/** Time in microseconds: whole where it is the time of a frame, fractional where it is computed between frames. */
export type Microseconds = number & { readonly [microsecondsBrand]: true };

export function microseconds(value: number): Outcome<Microseconds, 'not-finite'> {
  return Number.isFinite(value) ? ok(value as Microseconds) : refused('not-finite');
}

/** World seconds of a stretch of file time: slow-motion files play slower than the world moved. */
export function worldSeconds(fileUs: number, captureRateFactor: number): number {
  return (fileUs / 1e6) * captureRateFactor;
}
