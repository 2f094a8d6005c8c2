import type { Plumb, Point } from '@stillstroke/contract/clip-facts';
import type { Arm } from '@stillstroke/contract/strokes';
import { framesToMark } from '@stillstroke/geometry/events/stroke';
import type { FilmTruth, TrueStroke } from './film-truth';
import { spreadStream } from './placing-spread';

/** A stroke as a coach would enter it: events on whole frames. */
export interface DemoStroke {
  readonly arm: Arm;
  readonly entry: number;
  readonly catch: number;
  readonly exit: number;
  readonly nextEntry: number | null;
  readonly breath: boolean;
}

/** A mark as a coach would place it. */
export interface DemoMark {
  readonly arm: Arm;
  readonly frame: number;
  readonly shoulder: Point;
  readonly elbow: Point;
  readonly wrist: Point;
}

export interface DemoMarking {
  readonly plumb: Plumb;
  /** By arm and entry. */
  readonly strokes: readonly DemoStroke[];
  /** By arm and frame; no two of one arm on one frame. */
  readonly marks: readonly DemoMark[];
}

/** How a clip was marked. */
export interface MarkingPlan {
  readonly seed: number;
  /** Spread of each coordinate in pixels: of elbow and wrist; the shoulder, harder to see, has half as much again. 0: exact. */
  readonly spreadPx: number;
  /** Which strokes of each arm, counted in the film from 0: first and one past the last; all when left out. */
  readonly strokes?: readonly [from: number, to: number];
  /** False: the events alone, no joints. */
  readonly joints: boolean;
}

const SHOULDER_SPREAD = 1.5;

/**
 * The strokes and marks that a coach would have put on a rendered film: events on the frames nearest to their true times;
 * joints on every frame a stroke needs, and around the moments that the measures ask for (vertical, mid-pull, largest
 * drop), placed with a seeded spread. The same film and plan give the same marking.
 */
export function marksFromTruth(truth: FilmTruth, plan: MarkingPlan): DemoMarking {
  const spread = spreadStream(plan.seed);
  const near = (point: Point, spreadPx: number): Point => ({
    x: hundredth(point.x + spread() * spreadPx),
    y: hundredth(point.y + spread() * spreadPx),
  });
  const plumb = {
    top: near(truth.plumb.top, plan.spreadPx),
    bottom: near(truth.plumb.bottom, plan.spreadPx),
  };
  const chosen = (['left', 'right'] as const).flatMap((arm) =>
    truth.strokes.filter((stroke) => stroke.arm === arm).slice(...(plan.strokes ?? [])),
  );
  const strokes = chosen.map((stroke) => onFrames(stroke, truth));
  if (!plan.joints) return { plumb, strokes, marks: [] };
  const marks = (['left', 'right'] as const).flatMap((arm) => {
    const frames = chosen.flatMap((stroke, at) => {
      const events = strokes[at];
      return stroke.arm === arm && events ? markedFrames(stroke, events, truth) : [];
    });
    return [...new Set(frames)]
      .sort((a, b) => a - b)
      .map((frame): DemoMark => {
        const { shoulder, elbow, wrist } = trueJoints(truth, arm, frame);
        return {
          arm,
          frame,
          shoulder: near(shoulder, plan.spreadPx * SHOULDER_SPREAD),
          elbow: near(elbow, plan.spreadPx),
          wrist: near(wrist, plan.spreadPx),
        };
      });
  });
  return { plumb, strokes, marks };
}

/** True joints of an arm on a frame, picture pixels. Throws on a frame that the film does not have. */
export function trueJoints(
  truth: FilmTruth,
  arm: Arm,
  frame: number,
): Record<'shoulder' | 'elbow' | 'wrist', Point> {
  const row = truth.frames[arm][frame];
  const [shoulderX, shoulderY, elbowX, elbowY, wristX, wristY] = row ?? [];
  if (
    shoulderX === undefined ||
    shoulderY === undefined ||
    elbowX === undefined ||
    elbowY === undefined ||
    wristX === undefined ||
    wristY === undefined
  ) {
    throw new RangeError(`${truth.file} has no frame ${frame}.`);
  }
  return {
    shoulder: { x: shoulderX, y: shoulderY },
    elbow: { x: elbowX, y: elbowY },
    wrist: { x: wristX, y: wristY },
  };
}

function onFrames(stroke: TrueStroke, truth: FilmTruth): DemoStroke {
  const frame = (timeUs: number): number => frameNearest(truth, timeUs);
  return {
    arm: stroke.arm,
    entry: frame(stroke.entryUs),
    catch: frame(stroke.catchUs),
    exit: frame(stroke.exitUs),
    nextEntry: stroke.nextEntryUs === null ? null : frame(stroke.nextEntryUs),
    breath: stroke.breath,
  };
}

function markedFrames(stroke: TrueStroke, events: DemoStroke, truth: FilmTruth): number[] {
  const times = Array.from({ length: truth.frameCount }, (_, frame) => frameTimeUs(truth, frame));
  const needed = framesToMark(events, times, stroke.midPullUs);
  if (!needed.ok) throw new Error(`A stroke of ${truth.file} cannot be marked: ${needed.reason}.`);
  const frames = needed.value.map(({ frame }) => frame);
  const pull = stroke.exitUs - stroke.catchUs;
  const vertical = stroke.verticalAtShare === null ? [] : [stroke.catchUs + stroke.verticalAtShare * pull];
  const around = [...vertical, ...(stroke.midPullUs === null ? [] : [stroke.midPullUs])].flatMap((timeUs) => {
    const before = Math.floor((timeUs * truth.framesPerSecond) / 1e6);
    return [before, before + 1];
  });
  const peak = stroke.peakDrop === null ? [] : [frameNearest(truth, stroke.peakDrop.atUs)];
  return [...frames, ...[...around, ...peak].filter((frame) => frame > events.catch && frame < events.exit)];
}

function frameNearest(truth: FilmTruth, timeUs: number): number {
  return Math.min(truth.frameCount - 1, Math.max(0, Math.round((timeUs * truth.framesPerSecond) / 1e6)));
}

function frameTimeUs(truth: FilmTruth, frame: number): number {
  return Math.round((frame * 1e6) / truth.framesPerSecond);
}

function hundredth(value: number): number {
  return Math.round(value * 100) / 100;
}
