import type { ArmMark, Joint } from '../arm';
import { type Outcome, ok, refused } from '../outcome';
import { checkPoint } from '../points/video-point';
import type { JointUncertaintyPx } from '../uncertainty/joint-uncertainty';
import { Z95 } from './normal';
import { meanOf, sumOfSquares, total } from './sample';

export type RepeatabilityReason = 'not-finite' | 'too-few-repeats';

/** Spread of repeated readings of the same things. */
export interface PooledSpread {
  /** Standard deviation of one reading, pooled over the groups, in the readings' unit. */
  readonly sd: number;
  readonly degreesOfFreedom: number;
  /** Groups with two readings or more. */
  readonly groups: number;
}

/** Pooled within-group SD: √(Σ squared distances from the group means / Σ(n − 1)). Groups of one reading do not count. */
export function pooledSpread(
  groups: readonly (readonly number[])[],
): Outcome<PooledSpread, RepeatabilityReason> {
  if (!groups.every((group) => group.every(Number.isFinite))) return refused('not-finite');
  const repeated = groups.filter((group) => group.length > 1);
  const degreesOfFreedom = total(repeated.map((group) => group.length - 1));
  if (degreesOfFreedom === 0) return refused('too-few-repeats');
  const squares = total(repeated.map((group) => sumOfSquares(group, meanOf(group))));
  return ok({ sd: Math.sqrt(squares / degreesOfFreedom), degreesOfFreedom, groups: repeated.length });
}

/** A coach's own repeatability of placing joints. */
export interface MarkingRepeatability {
  /** Per joint and coordinate, pixels: what replaces the default. */
  readonly jointUncertaintyPx: JointUncertaintyPx;
  /** Degrees of freedom behind each joint (x and y together). */
  readonly degreesOfFreedom: number;
  readonly frames: number;
}

/** Pooled within-frame spread of the joints over frames that were marked twice or more; x and y are pooled. */
export function markingRepeatability(
  frames: readonly (readonly ArmMark[])[],
): Outcome<MarkingRepeatability, RepeatabilityReason> {
  const all = frames.flat().flatMap(({ shoulder, elbow, wrist }) => [shoulder, elbow, wrist]);
  if (!all.every((point) => checkPoint(point).ok)) return refused('not-finite');
  const spread = (joint: Joint): Outcome<PooledSpread, RepeatabilityReason> =>
    pooledSpread(
      frames.flatMap((marks) => [marks.map((mark) => mark[joint].x), marks.map((mark) => mark[joint].y)]),
    );
  const shoulder = spread('shoulder');
  if (!shoulder.ok) return shoulder;
  const elbow = spread('elbow');
  if (!elbow.ok) return elbow;
  const wrist = spread('wrist');
  if (!wrist.ok) return wrist;
  return ok({
    jointUncertaintyPx: { shoulder: shoulder.value.sd, elbow: elbow.value.sd, wrist: wrist.value.sd },
    degreesOfFreedom: shoulder.value.degreesOfFreedom,
    frames: shoulder.value.groups / 2,
  });
}

/** Two rounds of readings of the same things. */
export interface TestRetest {
  /** Mean of first − second. */
  readonly bias: number;
  /** Technical error of measurement (Dahlberg): √(Σd²/2n). Holds the bias. */
  readonly technicalError: number;
  /** Typical error (Hopkins): SD of the differences/√2. Without the bias. */
  readonly typicalError: number;
  /** 1.96·√2·technical error. */
  readonly repeatability: number;
  /** Minimal detectable change at 95 %: 1.96·√2·typical error. */
  readonly minimalChange: number;
}

/** Error figures of readings taken twice; a differing length or fewer than two pairs is refused. */
export function testRetest(
  first: readonly number[],
  second: readonly number[],
): Outcome<TestRetest, RepeatabilityReason | 'unequal-length'> {
  if (first.length !== second.length) return refused('unequal-length');
  if (first.length < 2) return refused('too-few-repeats');
  const differences = first.map((value, i) => value - (second[i] ?? NaN));
  if (!differences.every(Number.isFinite)) return refused('not-finite');
  const n = differences.length;
  const bias = meanOf(differences);
  const technicalError = Math.sqrt(sumOfSquares(differences, 0) / (2 * n));
  const typicalError = Math.sqrt(sumOfSquares(differences, bias) / (2 * (n - 1)));
  const widen = Z95 * Math.SQRT2;
  return ok({
    bias,
    technicalError,
    typicalError,
    repeatability: widen * technicalError,
    minimalChange: widen * typicalError,
  });
}
