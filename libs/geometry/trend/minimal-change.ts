import { type Outcome, ok, refused } from '../outcome';
import { Z95 } from '../statistics/normal';

/**
 * Smallest change between two sessions that marking could not well produce, at 95 %: 1.96·√(u₁² + u₂²), with u the
 * marking (and set-up) part of each session's mean. With u = SEM in both this is Weir's 1.96·√2·SEM (2005).
 */
export function minimalChange(before: number, after: number): Outcome<number, 'bad-uncertainty'> {
  const change = Z95 * Math.hypot(before, after);
  return Number.isFinite(change) && before >= 0 && after >= 0 ? ok(change) : refused('bad-uncertainty');
}
