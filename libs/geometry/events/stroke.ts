import { type Outcome, ok, refused } from '../outcome';
import type { FrameReason } from '../units/frame-index';
import { type FrameTimesUs, frameTimeUs, nearestFrame } from './frame-times';

/** The hand itself was seen on the frame, or the wrist stands in for it. */
export type EventSource = 'hand-seen' | 'wrist-proxy';
export type EventName = 'entry' | 'catch' | 'exit' | 'nextEntry';

/** What each event was chosen by; the hand where nothing is said. */
export interface EventSources {
  readonly entrySource?: EventSource | undefined;
  readonly catchSource?: EventSource | undefined;
  readonly exitSource?: EventSource | undefined;
  readonly nextEntrySource?: EventSource | undefined;
}

/** The events of one arm's cycle, as 0-based frames in presentation order. */
export interface StrokeEvents extends EventSources {
  /** The hand enters the water. */
  readonly entry: number;
  /** The hand begins to move backward. */
  readonly catch: number;
  /** The hand leaves the water. */
  readonly exit: number;
  /** The same hand enters again; null while it is not known. */
  readonly nextEntry: number | null;
}

export type OrderReason =
  FrameReason | 'catch-not-after-entry' | 'exit-not-after-catch' | 'next-entry-not-after-exit';

/** Entry < catch < exit < next entry, all whole frames of the clip (`frameCount`, when given). */
export function checkOrder(stroke: StrokeEvents, frameCount = Infinity): Outcome<StrokeEvents, OrderReason> {
  const { entry, catch: caught, exit, nextEntry } = stroke;
  const frames = nextEntry === null ? [entry, caught, exit] : [entry, caught, exit, nextEntry];
  if (!frames.every(Number.isInteger)) return refused('frame-not-whole');
  if (frames.some((frame) => frame < 0 || frame >= frameCount)) return refused('frame-outside-clip');
  if (caught <= entry) return refused('catch-not-after-entry');
  if (exit <= caught) return refused('exit-not-after-catch');
  if (nextEntry !== null && nextEntry <= exit) return refused('next-entry-not-after-exit');
  return ok(stroke);
}

/** A stroke's pull in time. */
export interface PullSpan {
  readonly catchUs: number;
  readonly exitUs: number;
  readonly lengthUs: number;
}

export type PullReason = OrderReason | 'no-duration';

/** The time from catch to exit; refused when the events are out of order or the frames carry no time between them. */
export function pullSpan(stroke: StrokeEvents, times: FrameTimesUs): Outcome<PullSpan, PullReason> {
  const order = checkOrder(stroke, times.length);
  if (!order.ok) return order;
  const catchUs = frameTimeUs(times, stroke.catch);
  if (!catchUs.ok) return catchUs;
  const exitUs = frameTimeUs(times, stroke.exit);
  if (!exitUs.ok) return exitUs;
  const lengthUs = exitUs.value - catchUs.value;
  if (lengthUs <= 0) return refused('no-duration');
  return ok({ catchUs: catchUs.value, exitUs: exitUs.value, lengthUs });
}

/** What a frame of a stroke is marked for. */
export type MarkNeed = 'entry' | 'catch' | 'one-third' | 'mid-pull' | 'two-thirds' | 'exit';

export interface NeededFrame {
  readonly need: MarkNeed;
  /** 0-based; two needs of a very short stroke may fall on one frame, which is then listed once, under the first need. */
  readonly frame: number;
}

/**
 * The frames to mark of a stroke, in presentation order: entry, catch, one third of the pull, mid-pull, two thirds and
 * exit. Thirds are taken by time. Mid-pull is where `midPullUs` puts it, half the pull's time while it is not known.
 */
export function framesToMark(
  stroke: StrokeEvents,
  times: FrameTimesUs,
  midPullUs: number | null = null,
): Outcome<readonly NeededFrame[], PullReason> {
  const span = pullSpan(stroke, times);
  if (!span.ok) return span;
  const at = (timeUs: number): number => nearestFrame(times, timeUs, stroke.catch, stroke.exit);
  const { catchUs, lengthUs } = span.value;
  const wanted: NeededFrame[] = [
    { need: 'entry', frame: stroke.entry },
    { need: 'catch', frame: stroke.catch },
    { need: 'exit', frame: stroke.exit },
    { need: 'one-third', frame: at(catchUs + lengthUs / 3) },
    { need: 'two-thirds', frame: at(catchUs + (2 * lengthUs) / 3) },
    { need: 'mid-pull', frame: at(midPullUs ?? catchUs + lengthUs / 2) },
  ];
  const taken = new Set<number>();
  const needed = wanted.filter(({ frame }) => !taken.has(frame) && taken.add(frame));
  return ok(needed.sort((a, b) => a.frame - b.frame));
}

/**
 * Of the frames to mark, those that are not marked yet. Mid-pull moves a little with each mark made near it: a marked
 * frame as near as `MID_PULL_REACH` of the pull's frames (at least one frame) meets that need.
 */
export function framesStillToMark(
  needed: readonly NeededFrame[],
  marked: readonly number[],
): readonly NeededFrame[] {
  const frames = new Set(marked);
  const caught = needed.find(({ need }) => need === 'catch')?.frame ?? 0;
  const exit = needed.find(({ need }) => need === 'exit')?.frame ?? 0;
  const reach = Math.max(1, Math.floor(MID_PULL_REACH * (exit - caught)));
  return needed.filter(({ need, frame }) => {
    if (frames.has(frame)) return false;
    return need !== 'mid-pull' || !marked.some((other) => Math.abs(other - frame) <= reach);
  });
}

const MID_PULL_REACH = 0.05;
