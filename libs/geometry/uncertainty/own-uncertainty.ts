import type { ArmMark } from '../arm';
import { armAngles, type ClipAxes, signedElbow } from '../angles/arm-angles';
import { type Outcome, ok, refused } from '../outcome';
import { checkPoint } from '../points/video-point';
import {
  markingRepeatability,
  type MarkingRepeatability,
  type RepeatabilityReason,
  testRetest,
} from '../statistics/repeatability';
import { wrapDegrees } from '../units/angle';
import { pictureScale, type JointUncertaintyPx, type PictureSize } from './joint-uncertainty';

/**
 * With fewer frames marked twice the default stays. Ten frames give 20 degrees of freedom for each joint, so that the
 * spread itself is known to about 1/√(2·20) = 16 % (common practice, no source for the number ten).
 */
export const OWN_UNCERTAINTY_FRAMES = 10;

/** Marks are kept to fractions of a pixel, but what is seen ends somewhere: no own spread counts as smaller than this. */
const LEAST_PX = 0.25;

/** One arm on one frame, placed twice by the same coach without seeing the first. */
export interface PlacedTwice {
  readonly size: PictureSize;
  readonly axes: ClipAxes;
  readonly first: ArmMark;
  readonly again: ArmMark;
}

/** Spread of a coach's placing in a picture of 1080 lines: pooled within-frame SD per joint, x and y together. */
export function ownRepeatability(
  placed: readonly PlacedTwice[],
): Outcome<MarkingRepeatability, RepeatabilityReason> {
  const all = placed.flatMap(({ first, again }) => [first, again]);
  const points = all.flatMap(({ shoulder, elbow, wrist }) => [shoulder, elbow, wrist]);
  if (!points.every((point) => checkPoint(point).ok)) return refused('not-finite');
  return markingRepeatability(
    placed.map(({ size, first, again }) => {
      const scale = pictureScale(size);
      return [at1080(first, scale), at1080(again, scale)];
    }),
  );
}

/** A spread found at 1080 lines, in pixels of a picture of this size. */
export function ownUncertaintyPx(size: PictureSize, found: JointUncertaintyPx): JointUncertaintyPx {
  const scale = pictureScale(size);
  const px = (spread: number) => Math.max(LEAST_PX, spread * scale);
  return { shoulder: px(found.shoulder), elbow: px(found.elbow), wrist: px(found.wrist) };
}

export const ANGLES = ['forearmDeg', 'upperArmDeg', 'elbowDeg', 'elbowDropDeg'] as const;
export type AngleName = (typeof ANGLES)[number];

/** An angle read twice on the same frame, degrees; the second is unwrapped, so that they can be subtracted. */
export interface ReadTwice {
  readonly first: number;
  readonly second: number;
}

/**
 * The four angles of marks placed twice, in the order given; null where one of the two cannot be read. The elbow is the
 * signed one, 0 to 360 with 180 straight, which does not fold at a straight arm.
 */
export function anglesTwice(placed: PlacedTwice): Readonly<Record<AngleName, ReadTwice>> | null {
  const first = readAngles(placed.first, placed.axes);
  const again = readAngles(placed.again, placed.axes);
  if (!first || !again) return null;
  const pair = (name: AngleName): ReadTwice => ({
    first: first[name],
    second: first[name] + wrapDegrees(again[name] - first[name]),
  });
  return {
    forearmDeg: pair('forearmDeg'),
    upperArmDeg: pair('upperArmDeg'),
    elbowDeg: pair('elbowDeg'),
    elbowDropDeg: pair('elbowDropDeg'),
  };
}

/** Typical error of one reading, SD of the differences/√2 (Hopkins 2000), with its minimal detectable change, degrees. */
export interface TypicalError {
  readonly typicalErrorDeg: number;
  /** 1.96·√2·typical error: a single reading against another has to differ by more. */
  readonly minimalChangeDeg: number;
  /** Mean of first − second; far from 0 when the coach has begun to place joints elsewhere. */
  readonly biasDeg: number;
  readonly frames: number;
}

export function typicalErrors(
  placed: readonly PlacedTwice[],
): Outcome<Readonly<Record<AngleName, TypicalError>>, RepeatabilityReason> {
  const read = placed.flatMap((one) => anglesTwice(one) ?? []);
  const of = (name: AngleName) =>
    testRetest(
      read.map((pair) => pair[name].first),
      read.map((pair) => pair[name].second),
    );
  const found = Object.fromEntries(ANGLES.map((name) => [name, of(name)]));
  const errors: Partial<Record<AngleName, TypicalError>> = {};
  for (const name of ANGLES) {
    const one = found[name];
    if (!one?.ok) return refused(one?.reason === 'not-finite' ? 'not-finite' : 'too-few-repeats');
    const { typicalError, minimalChange, bias } = one.value;
    errors[name] = {
      typicalErrorDeg: typicalError,
      minimalChangeDeg: minimalChange,
      biasDeg: bias,
      frames: read.length,
    };
  }
  return ok(errors as Record<AngleName, TypicalError>);
}

function at1080(mark: ArmMark, scale: number): ArmMark {
  const point = ({ x, y }: ArmMark['elbow']) => ({ x: x / scale, y: y / scale });
  return { shoulder: point(mark.shoulder), elbow: point(mark.elbow), wrist: point(mark.wrist) };
}

function readAngles(mark: ArmMark, axes: ClipAxes): Record<AngleName, number> | null {
  const angles = armAngles(mark, axes);
  if (!angles.ok) return null;
  const { forearmDeg, upperArmDeg, elbowDropDeg } = angles.value;
  return { forearmDeg, upperArmDeg, elbowDropDeg, elbowDeg: signedElbow(forearmDeg, upperArmDeg) };
}
