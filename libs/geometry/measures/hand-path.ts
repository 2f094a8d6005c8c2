import { checkArmMark, type FrameMark, type Joint } from '../arm';
import { type MeasuredDistance, readOff } from '../calibration/measured-distance';
import type { FittedScale } from '../calibration/picture-scale';
import type { PlaneReason, PlaneVector } from '../calibration/plane-vector';
import { cameraRoll, rollUncertaintyDeg } from '../calibration/plumb';
import type { StrokeEvents } from '../events/stroke';
import { type Outcome, ok, refused } from '../outcome';
import type { MarkingContext } from '../uncertainty/arm-uncertainty';
import { combine, type UncertaintySource } from '../uncertainty/parts';

/** A distance of the arm with the frame that shows it. */
export interface HandReading extends MeasuredDistance {
  readonly frame: number;
  readonly frames: readonly number[];
}

export type HandReason =
  PlaneReason | 'scale-of-other-plane' | 'entry-not-marked' | 'too-few-marks' | 'plumb-unusable';

/** What a scale in the swimmer's plane adds to a stroke, metres. */
export interface HandPath {
  /** How far the wrist is ahead of the shoulder on the entry's frame, across the plumb, + in the travel direction. */
  readonly reachAtEntry: Outcome<HandReading, HandReason>;
  /** The greatest depth of the wrist below the shoulder of the same frame, along the plumb, catch to exit. */
  readonly handDepth: Outcome<HandReading, HandReason>;
}

/**
 * Both are read within one frame, so that a camera that moves along does no harm. A scale of another plane gives none: an
 * arm nearer to the camera than the wall would come out too long.
 */
export function handPath(
  scale: FittedScale,
  stroke: StrokeEvents,
  marks: readonly FrameMark[],
  context: MarkingContext,
): HandPath {
  if (scale.plane !== 'swimmer') {
    const none = refused('scale-of-other-plane');
    return { reachAtEntry: none, handDepth: none };
  }
  const usable = marks.filter((mark) => checkArmMark(mark).ok);
  const entry = usable.find(({ frame }) => frame === stroke.entry);
  const ahead = context.travel === 'right' ? 1 : -1;
  return {
    reachAtEntry: entry
      ? fromShoulder(scale, entry, context, (vector) => ahead * vector.across)
      : refused('entry-not-marked'),
    handDepth: deepest(
      usable
        .filter(({ frame }) => frame >= stroke.catch && frame <= stroke.exit)
        .map((mark) => fromShoulder(scale, mark, context, (vector) => vector.along)),
    ),
  };
}

function deepest(readings: readonly Outcome<HandReading, HandReason>[]): Outcome<HandReading, HandReason> {
  const [first] = readings;
  if (!first || readings.length < 2) return refused('too-few-marks');
  const read = readings.flatMap((reading) => (reading.ok ? [reading.value] : []));
  const [one, ...others] = read;
  if (!one) return first;
  const found = others.reduce((most, next) => (next.metres > most.metres ? next : most), one);
  return ok({ ...found, frames: read.map(({ frame }) => frame) });
}

/** What the two places of a distance are here. */
const PLACES: Partial<Record<UncertaintySource, UncertaintySource>> = {
  'first-place': 'shoulder-mark',
  'second-place': 'wrist-mark',
};

/** From shoulder to wrist, with the plumb's own uncertainty, which turns the vector: u = other component · u(ρ). */
function fromShoulder(
  scale: FittedScale,
  mark: FrameMark,
  context: MarkingContext,
  component: (vector: PlaneVector) => number,
): Outcome<HandReading, HandReason> {
  const joints = context.jointUncertaintyPx;
  const plumbPx = context.plumbPointUncertaintyPx ?? joints.elbow;
  const [roll, rollStandard] = [cameraRoll(context.plumb), rollUncertaintyDeg(context.plumb, plumbPx)];
  if (!roll.ok || !rollStandard.ok) return refused('plumb-unusable');
  const px = (joint: Joint): number => joints[joint];
  const placing = { from: px('shoulder'), to: px('wrist') };
  const points = [mark.shoulder, mark.wrist] as const;
  const at = (rollDeg: number) => readOff(scale, points, placing, component, downAt(rollDeg));
  const [rollDeg, u] = [roll.value.rollDeg, rollStandard.value];
  const [value, above, below] = [at(rollDeg), at(rollDeg + u / 2), at(rollDeg - u / 2)];
  if (!value.ok) return value;
  const turning = above.ok && below.ok ? above.value.metres - below.value.metres : 0;
  const { standard, parts } = combine([
    ...value.value.parts.map(({ source, alone }) => ({ source: PLACES[source] ?? source, alone })),
    { source: 'roll', alone: Math.abs(turning) },
  ]);
  const { metres } = value.value;
  return ok({ metres, uncertaintyM: standard, parts, frame: mark.frame, frames: [mark.frame] });
}

/** Plumb-down in the picture for a roll: + leans the lower end to the right. */
function downAt(rollDeg: number): { readonly x: number; readonly y: number } {
  const rad = (rollDeg * Math.PI) / 180;
  return { x: Math.sin(rad), y: Math.cos(rad) };
}
