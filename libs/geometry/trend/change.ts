import { type Outcome, ok } from '../outcome';
import { FEWEST_STROKES } from '../statistics/compare-arms';
import { Z95 } from '../statistics/normal';
import { t95 } from '../statistics/distributions';
import { welchOf } from '../statistics/welch';
import type { Interval } from '../uncertainty/elbow-interval';
import { minimalChange } from './minimal-change';
import type { SessionMean } from './session-mean';

export type ChangeVerdict =
  | 'changed'
  | 'not-more-than-marking-could-produce'
  /** More than marking, yet within what the strokes of a session differ among themselves. */
  | 'not-more-than-strokes-vary'
  | 'too-few';

/** A measure in one session against the same in an earlier one. */
export interface SessionChange {
  /** Later minus earlier. */
  readonly change: number;
  /** 95 % interval of the change; null with too few strokes. */
  readonly interval: Interval | null;
  /** Minimal detectable change from marking and set-up alone. */
  readonly minimalChange: number;
  readonly verdict: ChangeVerdict;
}

/** Fewer than three strokes in a session give no verdict. Only for sessions of the same view and stroke kind. */
export function sessionChange(
  before: SessionMean,
  after: SessionMean,
): Outcome<SessionChange, 'bad-uncertainty'> {
  const smallest = minimalChange(before.marking, after.marking);
  if (!smallest.ok) return smallest;
  const change = after.mean - before.mean;
  const known = { change, minimalChange: smallest.value };
  if (Math.min(before.count, after.count) < FEWEST_STROKES)
    return ok({ ...known, interval: null, verdict: 'too-few' });
  const half = Math.max(smallest.value, strokesHalfWidth(before, after));
  const interval = { low: change - half, high: change + half };
  return ok({ ...known, interval, verdict: verdictOf(Math.abs(change), smallest.value, half) });
}

function verdictOf(size: number, marking: number, half: number): ChangeVerdict {
  if (size <= marking) return 'not-more-than-marking-could-produce';
  return size <= half ? 'not-more-than-strokes-vary' : 'changed';
}

/** Half-width from the strokes' own spread, with the set-up that all strokes of a session share. */
function strokesHalfWidth(before: SessionMean, after: SessionMean): number {
  const setUp = Math.hypot(before.setUp, after.setUp);
  const strokes = welchOf(before, after, setUp);
  return strokes.ok ? t95(strokes.value.degreesOfFreedom) * strokes.value.standard : Z95 * setUp;
}
