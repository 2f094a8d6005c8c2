import { type Curve, curveThrough, type Key, slopeOf } from './curve';
import type { ModelStroke } from './stroke-times';
import { DROP_SHARES } from './style';

/** Metres, of an adult; projected lengths in the plane seen from the side, which stay the same all through the stroke. */
export const UPPER_ARM_M = 0.29;
export const FOREARM_M = 0.26;
export const HAND_M = 0.18;
/** Wrist to the knuckles: what is taken as the hand where it enters and leaves the water. */
export const KNUCKLES_M = 0.09;

export const VERTICAL_DEG = 15;

/**
 * Point beside the swimmer in metres: f ahead, d down from the still surface, r to the swimmer's right of the midline.
 */
export interface BodyPoint {
  readonly f: number;
  readonly d: number;
  readonly r: number;
}

export interface ArmPose {
  /** As in the product: 0 straight down, + ahead; upper arm and forearm, (−180, 180]. */
  readonly upperArmDeg: number;
  readonly forearmDeg: number;
  readonly handDeg: number;
  readonly shoulder: BodyPoint;
  readonly elbow: BodyPoint;
  readonly wrist: BodyPoint;
  readonly fingertips: BodyPoint;
}

const RAD = Math.PI / 180;
const EXIT_FOREARM_DEG = -97;
const ENTRY = { upperArmDeg: 116, forearmDeg: 74 };
/** Slope of the forearm at the catch, degrees per second: it has hardly begun to turn. */
const CATCH_TURN = -35;

/** Curves of one arm over one cycle, entry to next entry, by time in seconds. */
interface CycleCurves {
  readonly stroke: ModelStroke;
  readonly upperArm: Curve;
  readonly forearm: Curve;
  readonly reach: Curve;
  readonly shoulderDepth: Curve;
  readonly elbowOut: Curve;
  readonly wristOut: Curve;
}

/** The pose of one arm at any time of its planned strokes. */
export function armMotion(strokes: readonly ModelStroke[]): (timeS: number) => ArmPose {
  const cycles = strokes.map(cycleCurves);
  return (timeS) => {
    const cycle = cycles.findLast(({ stroke }) => stroke.entryS <= timeS) ?? cycles[0];
    if (!cycle) throw new RangeError('An arm needs at least one planned stroke.');
    return poseAt(cycle, timeS);
  };
}

function poseAt(cycle: CycleCurves, timeS: number): ArmPose {
  const side = cycle.stroke.arm === 'right' ? 1 : -1;
  const upperArmDeg = wrapped(cycle.upperArm(timeS));
  const forearmDeg = wrapped(cycle.forearm(timeS));
  const handDeg = wrapped(forearmDeg + handBend(cycle.stroke, timeS));
  const shoulder = { f: cycle.reach(timeS), d: cycle.shoulderDepth(timeS), r: 0.185 * side };
  const elbow = along(shoulder, upperArmDeg, UPPER_ARM_M, side * (0.185 + cycle.elbowOut(timeS)));
  const wristR = side * (0.185 + cycle.wristOut(timeS));
  const wrist = along(elbow, forearmDeg, FOREARM_M, wristR);
  const fingertips = along(wrist, handDeg, HAND_M, wristR + (wristR - elbow.r) * 0.3);
  return { upperArmDeg, forearmDeg, handDeg, shoulder, elbow, wrist, fingertips };
}

function along(from: BodyPoint, deg: number, length: number, r: number): BodyPoint {
  return { f: from.f + length * Math.sin(deg * RAD), d: from.d + length * Math.cos(deg * RAD), r };
}

/** The hand carries on the forearm's line under water and trails level through the recovery. */
function handBend({ exitS, nextEntryS }: ModelStroke, timeS: number): number {
  const share = (timeS - exitS) / (nextEntryS - exitS);
  return share <= 0
    ? 0
    : 26 * Math.sin(Math.PI * share) * (share < 0.3 ? -0.6 : 1) * Math.min(1, Math.abs(share - 0.3) * 6);
}

export function wrapped(deg: number): number {
  const turned = ((deg % 360) + 360) % 360;
  return turned > 180 ? turned - 360 : turned;
}

/**
 * Upper arm direction that, with this forearm direction, gives this elbow drop. With w the direction from shoulder to
 * wrist, drop = w − upper arm and a·sin(drop) = b·sin(forearm − w).
 */
export function upperArmFor(forearmDeg: number, dropDeg: number): number {
  const turn = Math.asin((UPPER_ARM_M / FOREARM_M) * Math.sin(dropDeg * RAD)) / RAD;
  return forearmDeg - turn - dropDeg;
}

function cycleCurves(stroke: ModelStroke): CycleCurves {
  const { entryS, catchS, exitS, nextEntryS, shape } = stroke;
  const at = (share: number): number => catchS + share * (exitS - catchS);
  const after = (share: number): number => exitS + share * (nextEntryS - exitS);
  const pullForearm = curveThrough([
    { at: catchS, value: shape.catchForearmDeg, slope: CATCH_TURN },
    { at: at(shape.verticalAt), value: VERTICAL_DEG },
    { at: at(shape.verticalAt + 0.46 * (1 - shape.verticalAt)), value: -30 },
    { at: exitS, value: EXIT_FOREARM_DEG, slope: -150 },
  ]);
  const drop = curveThrough(
    DROP_SHARES.map((share, index) => ({ at: at(share), value: shape.dropDeg[index] ?? 0 })),
  );
  const pullUpperArm: Curve = (timeS) => upperArmFor(pullForearm(timeS), drop(timeS));
  const inner = 2e-6;
  const upperArmAt = (timeS: number, side: 1 | -1): Key => ({
    at: timeS,
    value: pullUpperArm(timeS),
    slope: slopeOf(pullUpperArm, timeS + side * inner),
  });
  const glideUpperArm = curveThrough([
    { at: entryS, value: ENTRY.upperArmDeg, slope: -80 },
    upperArmAt(catchS, 1),
  ]);
  const glideForearm = curveThrough([
    { at: entryS, value: ENTRY.forearmDeg, slope: 60 },
    { at: entryS + 0.5 * (catchS - entryS), value: Math.max(82, shape.catchForearmDeg + 3) },
    { at: catchS, value: shape.catchForearmDeg, slope: CATCH_TURN },
  ]);
  const backUpperArm = curveThrough([
    upperArmAt(exitS, -1),
    { at: after(0.36), value: -134 },
    { at: after(0.66), value: -194 },
    { at: nextEntryS, value: ENTRY.upperArmDeg - 360, slope: -80 },
  ]);
  const backForearm = curveThrough([
    { at: exitS, value: EXIT_FOREARM_DEG, slope: -150 },
    { at: after(0.1), value: -100 },
    { at: after(0.36), value: -66 },
    { at: after(0.66), value: 46 },
    { at: nextEntryS, value: ENTRY.forearmDeg, slope: 60 },
  ]);
  const pick =
    (glide: Curve, pull: Curve, back: Curve): Curve =>
    (timeS) =>
      timeS < catchS ? glide(timeS) : timeS <= exitS ? pull(timeS) : back(timeS);
  const upperArm = pick(glideUpperArm, pullUpperArm, backUpperArm);
  const forearm = pick(glideForearm, pullForearm, backForearm);
  return {
    stroke,
    upperArm,
    forearm,
    reach: reachCurve(stroke, upperArm, forearm),
    shoulderDepth: shoulderDepthCurve(stroke, upperArm, forearm),
    ...outwardCurves(stroke),
  };
}

/** How far the shoulder reaches ahead. At the catch its speed cancels the arm's own, so that the wrist is at its foremost. */
function reachCurve(
  { entryS, catchS, exitS, nextEntryS }: ModelStroke,
  upperArm: Curve,
  forearm: Curve,
): Curve {
  const armReach: Curve = (timeS) =>
    UPPER_ARM_M * Math.sin(upperArm(timeS) * RAD) + FOREARM_M * Math.sin(forearm(timeS) * RAD);
  const cancel = -slopeOf(armReach, catchS + 2e-6);
  const pull = exitS - catchS;
  return curveThrough([
    { at: entryS, value: 0.015, slope: 0.12 },
    { at: catchS, value: 0.065, slope: cancel },
    { at: catchS + 0.45 * pull, value: 0.01 },
    { at: exitS, value: -0.045, slope: -0.03 },
    { at: exitS + 0.45 * (nextEntryS - exitS), value: -0.03 },
    { at: nextEntryS, value: 0.015, slope: 0.12 },
  ]);
}

/** Depth of the shoulder: deep while this arm pulls; at entry and exit just such that the knuckles are at the surface. */
function shoulderDepthCurve(stroke: ModelStroke, upperArm: Curve, forearm: Curve): Curve {
  const { entryS, catchS, exitS, nextEntryS } = stroke;
  const atSurface = (upperArmDeg: number, forearmDeg: number): number =>
    -(UPPER_ARM_M * Math.cos(upperArmDeg * RAD) + (FOREARM_M + KNUCKLES_M) * Math.cos(forearmDeg * RAD));
  const entryDepth = atSurface(ENTRY.upperArmDeg, ENTRY.forearmDeg);
  return curveThrough([
    { at: entryS, value: entryDepth, slope: 0.35 },
    { at: catchS, value: 0.16 },
    { at: catchS + 0.4 * (exitS - catchS), value: 0.19 },
    { at: exitS, value: atSurface(upperArm(exitS), forearm(exitS)), slope: -0.45 },
    { at: exitS + 0.4 * (nextEntryS - exitS), value: -0.08 },
    { at: nextEntryS, value: entryDepth, slope: 0.35 },
  ]);
}

/** Sideways places of elbow and wrist, metres outward from the shoulder's own line: seen from the front only. */
function outwardCurves({
  entryS,
  catchS,
  exitS,
  nextEntryS,
}: ModelStroke): Pick<CycleCurves, 'elbowOut' | 'wristOut'> {
  const at = (share: number): number => catchS + share * (exitS - catchS);
  const through = (entry: number, caught: number, middle: number, exit: number, back: number): Curve =>
    curveThrough([
      { at: entryS, value: entry },
      { at: catchS, value: caught },
      { at: at(0.5), value: middle },
      { at: exitS, value: exit },
      { at: exitS + 0.5 * (nextEntryS - exitS), value: back },
      { at: nextEntryS, value: entry },
    ]);
  return {
    elbowOut: through(0.03, 0.04, 0.15, 0.06, 0.16),
    wristOut: through(-0.02, 0.02, -0.07, 0.03, 0.14),
  };
}
