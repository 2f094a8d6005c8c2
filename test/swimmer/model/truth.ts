import type { ArmPose } from './arm-motion';
import { type Camera, cameraDrift, type PicturePoint, project, rolled } from './camera';
import type { ArmSide, ModelStroke } from './stroke-times';
import type { SwimmerMotion } from './swimmer-motion';

/** What the numbers of a frame's row are, in order: joints in picture pixels, angles in degrees. */
export const FRAME_COLUMNS = [
  'shoulderX',
  'shoulderY',
  'elbowX',
  'elbowY',
  'wristX',
  'wristY',
  'forearmDeg',
  'upperArmDeg',
  'elbowDeg',
  'elbowDropDeg',
] as const;

export interface TrueStroke {
  readonly arm: ArmSide;
  /** Exact times of the events, whole microseconds of the film; the next entry is null after the film's end. */
  readonly entryUs: number;
  readonly catchUs: number;
  readonly exitUs: number;
  readonly nextEntryUs: number | null;
  readonly breath: boolean;
  /** The moment the wrist passes under the shoulder. Null for a front view, like the two that follow. */
  readonly midPullUs: number | null;
  /** Share of the pull at which the forearm comes within 15° of vertical. */
  readonly verticalAtShare: number | null;
  /** The largest elbow drop of the pull and its time. */
  readonly peakDrop: { readonly deg: number; readonly atUs: number } | null;
}

export interface FilmTruth {
  readonly version: 1;
  readonly file: string;
  readonly width: number;
  readonly height: number;
  readonly frameCount: number;
  readonly framesPerSecond: number;
  readonly view: Camera['view'];
  readonly travel: Camera['travel'];
  readonly rollDeg: number;
  /** The cord that hangs in the picture; its ends in picture pixels. */
  readonly plumb: { readonly top: PicturePoint; readonly bottom: PicturePoint };
  readonly strokes: readonly TrueStroke[];
  readonly columns: typeof FRAME_COLUMNS;
  /** One row a frame, in presentation order. */
  readonly frames: Readonly<Record<ArmSide, readonly (readonly number[])[]>>;
}

export interface TruthInput {
  readonly file: string;
  readonly motion: SwimmerMotion;
  readonly camera: Camera;
  readonly frameCount: number;
  readonly framesPerSecond: number;
  /** Level pixels from the picture's middle of the cord's lower end. */
  readonly cord: PicturePoint;
}

const DEG = 180 / Math.PI;

/** True joints, angles and events of a film, frame by frame. */
export function filmTruth({
  file,
  motion,
  camera,
  frameCount,
  framesPerSecond,
  cord,
}: TruthInput): FilmTruth {
  const rows = (arm: ArmSide): number[][] =>
    Array.from({ length: frameCount }, (_, frame) => {
      const timeS = frame / framesPerSecond;
      return frameRow(motion.poseAt(timeS).arms[arm], camera, cameraDrift(timeS));
    });
  const lastS = (frameCount - 1) / framesPerSecond;
  const topOfCord = { x: cord.x, y: -0.47 * camera.height };
  return {
    version: 1,
    file,
    width: camera.width,
    height: camera.height,
    frameCount,
    framesPerSecond,
    view: camera.view,
    travel: camera.travel,
    rollDeg: camera.rollDeg,
    plumb: { top: roundedPoint(rolled(camera, topOfCord)), bottom: roundedPoint(rolled(camera, cord)) },
    strokes: (['left', 'right'] as const).flatMap((arm) =>
      motion.plan.strokes[arm]
        .filter(({ entryS, exitS }) => entryS >= 0 && exitS <= lastS)
        .map((stroke) => trueStroke(stroke, motion, camera, lastS)),
    ),
    columns: FRAME_COLUMNS,
    frames: { left: rows('left'), right: rows('right') },
  };
}

function frameRow(pose: ArmPose, camera: Camera, drift: number): number[] {
  const points = [pose.shoulder, pose.elbow, pose.wrist].flatMap((joint) => {
    const { x, y } = project(camera, joint, drift);
    return [x, y];
  });
  const { upperArmDeg, forearmDeg } = camera.view === 'side-underwater' ? pose : seenFromFront(pose, camera);
  const elbowDeg = 180 - Math.abs(turn(forearmDeg - upperArmDeg));
  return [...points, forearmDeg, upperArmDeg, elbowDeg, dropOf(pose, camera)].map((value) => rounded(value));
}

/** Angles as a front view shows them: the swimmer's left lies to the right of the picture. */
function seenFromFront(pose: ArmPose, { travel }: Camera): { upperArmDeg: number; forearmDeg: number } {
  const sign = travel === 'right' ? -1 : 1;
  const angle = (from: ArmPose['elbow'], to: ArmPose['elbow']): number =>
    Math.atan2(sign * (to.r - from.r), to.d - from.d) * DEG;
  return { upperArmDeg: angle(pose.shoulder, pose.elbow), forearmDeg: angle(pose.elbow, pose.wrist) };
}

/** Direction to the wrist less direction to the elbow, both from the shoulder. */
function dropOf({ shoulder, elbow, wrist }: ArmPose, { view, travel }: Camera): number {
  const ahead = (to: ArmPose['elbow']): number =>
    view === 'side-underwater' ? to.f - shoulder.f : (travel === 'right' ? -1 : 1) * (to.r - shoulder.r);
  const toElbow = Math.atan2(ahead(elbow), elbow.d - shoulder.d) * DEG;
  const toWrist = Math.atan2(ahead(wrist), wrist.d - shoulder.d) * DEG;
  return turn(toWrist - toElbow);
}

function trueStroke(stroke: ModelStroke, motion: SwimmerMotion, camera: Camera, lastS: number): TrueStroke {
  const { arm, catchS, exitS, breath, shape } = stroke;
  const side = camera.view === 'side-underwater';
  const poseAt = (timeS: number): ArmPose => motion.poseAt(timeS).arms[arm];
  const times = Array.from({ length: 801 }, (_, step) => catchS + (step / 800) * (exitS - catchS));
  const drops = times.map((timeS) => dropOf(poseAt(timeS), camera));
  const peak = drops.indexOf(Math.max(...drops));
  const ahead = (timeS: number): number => {
    const { wrist, shoulder } = poseAt(timeS);
    return wrist.f - shoulder.f;
  };
  return {
    arm,
    entryUs: micros(stroke.entryS),
    catchUs: micros(catchS),
    exitUs: micros(exitS),
    nextEntryUs: stroke.nextEntryS <= lastS ? micros(stroke.nextEntryS) : null,
    breath,
    midPullUs: side ? micros(zeroOf(ahead, catchS, exitS)) : null,
    verticalAtShare: side ? rounded(shape.verticalAt, 5) : null,
    peakDrop: side ? { deg: rounded(drops[peak] ?? 0), atUs: micros(times[peak] ?? catchS) } : null,
  };
}

/** Where a falling function meets zero, by halving. */
function zeroOf(fn: (timeS: number) => number, fromS: number, toS: number): number {
  let low = fromS;
  let high = toS;
  for (let step = 0; step < 40; step += 1) {
    const middle = (low + high) / 2;
    if (fn(middle) > 0) low = middle;
    else high = middle;
  }
  return low;
}

function turn(deg: number): number {
  const whole = ((deg % 360) + 360) % 360;
  return whole > 180 ? whole - 360 : whole;
}

function micros(timeS: number): number {
  return Math.round(timeS * 1e6);
}

function rounded(value: number, digits = 3): number {
  const scale = 10 ** digits;
  return Math.round(value * scale) / scale + 0;
}

function roundedPoint({ x, y }: PicturePoint): PicturePoint {
  return { x: rounded(x), y: rounded(y) };
}
