import { sourceOf } from '@stillstroke/geometry/events/event-moment';
import type { EventSources } from '@stillstroke/geometry/events/stroke';
import type { StripWindow } from './strip-window';

export type StripArm = 'left' | 'right';

/** A stroke as the strip draws it; events that are not set yet are null. Frames. */
export interface StripStroke extends EventSources {
  readonly id: string;
  readonly arm: StripArm;
  readonly entry: number;
  readonly catch: number | null;
  readonly midPull: number | null;
  readonly exit: number | null;
  readonly nextEntry: number | null;
  readonly breath: boolean;
  /** Forearm over its marked frames, degrees. */
  readonly curve: readonly { readonly frame: number; readonly deg: number }[];
}

export interface StripMark {
  readonly arm: StripArm;
  readonly frame: number;
}

export interface StripContent {
  readonly timesUs: readonly number[];
  readonly strokes: readonly StripStroke[];
  readonly marks: readonly StripMark[];
}

export interface Size {
  readonly width: number;
  readonly height: number;
}

export type PhaseName = 'entryAndCatch' | 'pull' | 'push' | 'recovery';

/** One phase of one stroke as a bar; CSS pixels. */
export interface PhaseBar {
  readonly arm: StripArm;
  readonly phase: PhaseName;
  readonly x: number;
  readonly width: number;
}

/** Everything to draw for one window, in CSS pixels of the strip, without colours. */
export interface StripScene {
  readonly ticks: readonly { readonly x: number; readonly label: string | null }[];
  readonly lanes: Readonly<Record<StripArm, Lane>>;
  readonly bars: readonly PhaseBar[];
  /** `byWrist`: the wrist stands in for the hand there. */
  readonly events: readonly { readonly arm: StripArm; readonly x: number; readonly byWrist: boolean }[];
  readonly marks: readonly { readonly arm: StripArm; readonly x: number; readonly frame: number }[];
  readonly curves: readonly {
    readonly arm: StripArm;
    readonly points: readonly (readonly [number, number])[];
  }[];
  readonly breaths: readonly { readonly arm: StripArm; readonly x: number }[];
}

/** Heights within the strip: the middle of the bars, and where the forearm curve has 90° and −90°. */
export interface Lane {
  readonly middle: number;
  readonly curveTop: number;
  readonly curveBottom: number;
}

export const rulerHeight = 20;
export const nameWidth = 62;

/** Where a time lies on the strip. */
export function xOf(timeUs: number, window: StripWindow, { width }: Size): number {
  return nameWidth + ((timeUs - window.fromUs) / (window.toUs - window.fromUs)) * (width - nameWidth);
}

/** The time at a place on the strip. */
export function timeAt(x: number, window: StripWindow, { width }: Size): number {
  return window.fromUs + ((x - nameWidth) / (width - nameWidth)) * (window.toUs - window.fromUs);
}

/** Lays out what is in view; what lies outside the window is left out, so that long clips cost what is seen. */
export function layOut(content: StripContent, window: StripWindow, size: Size): StripScene {
  const x = (frame: number) => xOf(content.timesUs[frame] ?? 0, window, size);
  const inView = (frame: number) => x(frame) >= nameWidth - 1 && x(frame) <= size.width + 1;
  const lanes = lanesOf(size);
  const strokes = content.strokes.filter(
    (stroke) => x(lastFrame(stroke)) >= nameWidth && x(stroke.entry) <= size.width,
  );
  return {
    ticks: ticksOf(content.timesUs, window, size),
    lanes,
    bars: strokes.flatMap((stroke) => barsOf(stroke, x, size)),
    events: strokes.flatMap((stroke) =>
      (['entry', 'catch', 'exit'] as const).flatMap((event) => {
        const frame = stroke[event];
        if (frame === null || !inView(frame)) return [];
        return [{ arm: stroke.arm, x: x(frame), byWrist: sourceOf(stroke, event) === 'wrist-proxy' }];
      }),
    ),
    marks: content.marks
      .filter(({ frame }) => inView(frame))
      .map(({ arm, frame }) => ({ arm, frame, x: x(frame) })),
    curves: strokes
      .filter(({ curve }) => curve.length > 1)
      .map(({ arm, curve }) => ({
        arm,
        points: curve.map(({ frame, deg }) => [x(frame), curveY(deg, lanes[arm])] as const),
      })),
    breaths: strokes
      .filter(({ breath }) => breath)
      .map((stroke) => ({ arm: stroke.arm, x: Math.max(nameWidth + 8, x(stroke.entry) + 8) })),
  };
}

function lanesOf({ height }: Size): Record<StripArm, Lane> {
  const lane = (height - rulerHeight) / 2;
  const at = (top: number): Lane => ({
    middle: top + lane - 14,
    curveTop: top + 6,
    curveBottom: top + lane - 26,
  });
  return { left: at(rulerHeight), right: at(rulerHeight + lane) };
}

/** 90° ahead at the top of the lane, 90° behind at its bottom; steeper readings stay at the edge. */
function curveY(deg: number, lane: Lane): number {
  const share = (90 - Math.max(-90, Math.min(90, deg))) / 180;
  return lane.curveTop + share * (lane.curveBottom - lane.curveTop);
}

function lastFrame({ entry, catch: caught, exit, nextEntry }: StripStroke): number {
  return nextEntry ?? exit ?? caught ?? entry;
}

function barsOf(stroke: StripStroke, x: (frame: number) => number, size: Size): PhaseBar[] {
  const bar = (phase: PhaseName, from: number | null, to: number | null): PhaseBar[] => {
    if (from === null || to === null) return [];
    const left = Math.max(nameWidth, x(from));
    const right = Math.min(size.width, x(to));
    return right > left ? [{ arm: stroke.arm, phase, x: left, width: right - left }] : [];
  };
  return [
    ...bar('entryAndCatch', stroke.entry, stroke.catch),
    // Without a mid-pull the whole way from catch to exit is shown as the pull.
    ...bar('pull', stroke.catch, stroke.midPull ?? stroke.exit),
    ...bar('push', stroke.midPull, stroke.exit),
    ...bar('recovery', stroke.exit, stroke.nextEntry),
  ];
}

const tickSteps = [1, 2, 5, 10, 20, 50, 100, 200, 500, 1000, 2000, 5000, 10_000, 20_000, 50_000];

function ticksOf(timesUs: readonly number[], window: StripWindow, size: Size): StripScene['ticks'] {
  const perFrame = ((size.width - nameWidth) / (window.toUs - window.fromUs)) * frameLength(timesUs);
  const labelled = tickSteps.find((step) => step * perFrame >= 72) ?? 100_000;
  const small = Math.max(1, labelled / 5);
  const ticks = [];
  const first = firstVisible(timesUs, window);
  for (let frame = Math.ceil(first / small) * small; frame < timesUs.length; frame += small) {
    const x = xOf(timesUs[frame] ?? 0, window, size);
    if (x > size.width) break;
    if (x >= nameWidth) ticks.push({ x, label: frame % labelled === 0 ? String(frame) : null });
  }
  return ticks;
}

function frameLength(timesUs: readonly number[]): number {
  return timesUs.length > 1 ? ((timesUs.at(-1) ?? 0) - (timesUs[0] ?? 0)) / (timesUs.length - 1) : 1;
}

/** First frame in the window, found by halving since clips may have 72,000 frames. */
function firstVisible(timesUs: readonly number[], { fromUs }: StripWindow): number {
  let [low, high] = [0, timesUs.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((timesUs[middle] ?? 0) < fromUs) low = middle + 1;
    else high = middle;
  }
  return low;
}
