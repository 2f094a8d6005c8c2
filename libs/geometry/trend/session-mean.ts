import { type Outcome, ok, refused } from '../outcome';
import { meanOf, type SampleReason, summarise } from '../statistics/sample';

/** A measure's mean over the strokes of one arm in one session. */
export interface SessionMean {
  readonly count: number;
  readonly mean: number;
  /** SD between strokes; null for one stroke. */
  readonly sd: number | null;
  /** Standard uncertainty of the mean: strokes and marking (whichever is larger, over √n) with the set-up added. */
  readonly uncertainty: number;
  /** The part of it that marking and set-up alone would leave. */
  readonly marking: number;
  /** The part that all strokes of the session share. */
  readonly setUp: number;
}

export interface SessionMeanOptions {
  /** Standard uncertainty of each stroke's value from marking, in the order of the values, or one for all. */
  readonly marking: number | readonly number[];
  /** Standard uncertainty shared by all strokes of the session (camera roll, set-up): more strokes do not lessen it. */
  readonly setUp?: number;
}

export function sessionMean(
  values: readonly number[],
  options: SessionMeanOptions,
): Outcome<SessionMean, SampleReason | 'bad-uncertainty'> {
  const summary = summarise(values);
  if (!summary.ok) return summary;
  const { count, mean, sd } = summary.value;
  const each = typeof options.marking === 'number' ? [options.marking] : options.marking;
  const setUp = options.setUp ?? 0;
  if (each.length === 0 || ![...each, setUp].every((u) => u >= 0 && Number.isFinite(u)))
    return refused('bad-uncertainty');
  const markingVariance = meanOf(each.map((u) => u * u));
  const spread = Math.max(sd === null ? 0 : sd * sd, markingVariance);
  return ok({
    count,
    mean,
    sd,
    uncertainty: Math.hypot(Math.sqrt(spread / count), setUp),
    marking: Math.hypot(Math.sqrt(markingVariance / count), setUp),
    setUp,
  });
}
