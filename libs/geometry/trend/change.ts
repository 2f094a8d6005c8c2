import { type Outcome, ok } from '../outcome';
import { FEWEST_STROKES } from '../statistics/compare-arms';
import { Z95 } from '../statistics/normal';
import { type MeanDifference, welchOf } from '../statistics/welch';
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
  /** The strokes' own test, set-up included; null with too few strokes, or when no stroke differs from another. */
  readonly welch: MeanDifference | null;
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
    return ok({ ...known, interval: null, verdict: 'too-few', welch: null });
  const setUp = Math.hypot(before.setUp, after.setUp);
  const strokes = welchOf(before, after, setUp);
  const half = Math.max(smallest.value, strokes.ok ? halfWidth(strokes.value) : Z95 * setUp);
  const interval = { low: change - half, high: change + half };
  const verdict = verdictOf(Math.abs(change), smallest.value, half);
  return ok({ ...known, interval, verdict, welch: strokes.ok ? strokes.value : null });
}

function verdictOf(size: number, marking: number, half: number): ChangeVerdict {
  if (size <= marking) return 'not-more-than-marking-could-produce';
  return size <= half ? 'not-more-than-strokes-vary' : 'changed';
}

/** Half-width from the strokes' own spread, with the set-up that all strokes of a session share. */
function halfWidth({ quantile, standard }: MeanDifference): number {
  return quantile * standard;
}
