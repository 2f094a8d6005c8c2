import { studentAt } from './distributions';
import type { SampleSummary } from './sample';

/** A difference that is not settled yet. */
export interface OpenDifference {
  readonly difference: number;
  readonly left: SampleSummary;
  readonly right: SampleSummary;
  /** Standard uncertainty of the difference from marking alone with the present strokes, the common part included. */
  readonly marking: number;
  /** The part of it that more strokes do not lessen. */
  readonly common: number;
}

/** How often a true difference of this size shall be recognised. */
const POWER = 0.8;
/** Beyond this many strokes a side it is not worth saying a number. */
const MOST_STROKES = 200;

/**
 * Further strokes a side (both sides brought to the same number) after which a true difference of this size would be
 * recognised at 95 % in four cases of five: (t.975 + t.8)·SE ≤ |difference|. Null beyond 200 strokes a side.
 */
export function strokesToSettle(open: OpenDifference): number | null {
  const have = Math.min(open.left.count, open.right.count);
  const random = Math.max((open.left.sd ?? 0) ** 2 + (open.right.sd ?? 0) ** 2, markingPerStroke(open));
  const settledBy = (strokes: number): boolean => {
    const standard = Math.hypot(Math.sqrt(random / strokes), open.common);
    const freedom = 2 * (strokes - 1);
    return (studentAt(0.975, freedom) + studentAt(POWER, freedom)) * standard <= Math.abs(open.difference);
  };
  if (!settledBy(MOST_STROKES)) return null;
  // The reach shrinks with every stroke: halve the range down to the first number that settles it.
  let unsettled = Math.max(open.left.count, open.right.count);
  let settled = MOST_STROKES;
  while (settled - unsettled > 1) {
    const middle = (unsettled + settled) >> 1;
    if (settledBy(middle)) settled = middle;
    else unsettled = middle;
  }
  return settled - have;
}

/** Marking variance of one stroke a side, left and right together. */
function markingPerStroke({ marking, common, left, right }: OpenDifference): number {
  return (marking * marking - common * common) * Math.min(left.count, right.count);
}
