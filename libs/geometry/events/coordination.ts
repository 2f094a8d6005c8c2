import type { ArmSide } from '../arm';
import { type Outcome, ok, refused } from '../outcome';
import { Z95 } from '../statistics/normal';
import { meanOf } from '../statistics/sample';
import { type Interval, normalInterval } from '../uncertainty/elbow-interval';
import { combine, type UncertaintyPart } from '../uncertainty/parts';
import { eventInput, type EventOptions } from './event-moment';
import type { FrameTimesUs } from './frame-times';
import { checkOrder, type OrderReason, type StrokeEvents } from './stroke';

/** Catch-up: a gap between the arms' propulsion; superposition: an overlap; undetermined: neither can be told. */
export type CoordinationMode = 'catch-up' | 'opposition' | 'superposition' | 'undetermined';

/** One passage from an arm to the other and back. */
export interface CoordinationCycle<T extends StrokeEvents = StrokeEvents> {
  /** Percent of the cycle: from the other arm's catch to this arm's exit, + overlap. */
  readonly lag1: number;
  /** Percent: from this arm's next catch to the other arm's exit, + overlap. */
  readonly lag2: number;
  /** Mean of the two. */
  readonly index: number;
  /** Standard uncertainty from choosing the four event frames. */
  readonly uncertainty: number;
  readonly parts: readonly UncertaintyPart[];
  /** Exit, other's catch, other's exit, next catch. */
  readonly frames: readonly [number, number, number, number];
  /** The stroke that begins, the other arm's, and the next of the first arm. */
  readonly strokes: readonly [T, T, T];
}

/** The mean of some passages, with its mode. */
export interface CoordinationSummary {
  /** Percent of the mean cycle; − gap, + overlap. */
  readonly index: number;
  /** Standard uncertainty from choosing the event frames, of the mean over the cycles. */
  readonly uncertainty: number;
  readonly interval: Interval;
  readonly mode: CoordinationMode;
}

/** Index of coordination (Chollet, Chalies and Chatard 2000), percent of the mean cycle. */
export interface Coordination<T extends StrokeEvents = StrokeEvents> extends CoordinationSummary {
  readonly parts: readonly UncertaintyPart[];
  /** The arm that begins the first passage. */
  readonly from: ArmSide;
  readonly cycles: readonly CoordinationCycle<T>[];
}

export type CoordinationReason =
  OrderReason | 'too-few-strokes' | 'arms-do-not-alternate' | 'no-complete-cycle';

/**
 * Index of coordination over all passages arm – other arm – arm, along the clip and without an event in two of them. For
 * one passage with exit₁, catch′, exit′, catch₂ and the mean cycle T: ½[(exit₁ − catch′) + (exit′ − catch₂)]/T. A share,
 * so the capture rate matters only to the uncertainty of events chosen by the wrist.
 */
export function indexOfCoordination<T extends StrokeEvents>(
  arms: Readonly<Record<ArmSide, readonly T[]>>,
  times: FrameTimesUs,
  options: EventOptions = {},
): Outcome<Coordination<T>, CoordinationReason> {
  const placed = (['left', 'right'] as const).flatMap((arm) => arms[arm].map((stroke) => ({ arm, stroke })));
  for (const { stroke } of placed) {
    const order = checkOrder(stroke, times.length);
    if (!order.ok) return order;
  }
  if (arms.left.length === 0 || arms.right.length === 0 || placed.length < 3)
    return refused('too-few-strokes');
  const passages = passagesAlong(placed.sort((a, b) => a.stroke.entry - b.stroke.entry));
  const [first] = passages;
  if (!first) return refused('arms-do-not-alternate');
  const cycleUs = meanCycle(
    placed.map(({ stroke }) => stroke),
    passages,
    times,
  );
  if (!(cycleUs > 0)) return refused('no-complete-cycle');
  const cycles = passages.map((passage) => cycleOf(passage, cycleUs, times, options));
  const { parts } = combine(
    cycles.flatMap((cycle) =>
      cycle.parts.map(({ source, alone }) => ({ source, alone: alone / cycles.length })),
    ),
  );
  return ok({ ...summariseCoordination(cycles), parts, from: first.arm, cycles });
}

/** Mean of one or more passages, and the mode that it and its uncertainty allow. Passages share no event. */
export function summariseCoordination(
  cycles: readonly Pick<CoordinationCycle, 'index' | 'uncertainty'>[],
): CoordinationSummary {
  const index = meanOf(cycles.map((cycle) => cycle.index));
  const uncertainty = Math.hypot(...cycles.map((cycle) => cycle.uncertainty)) / cycles.length;
  return {
    index,
    uncertainty,
    interval: normalInterval(index, uncertainty),
    mode: modeOf(index, uncertainty),
  };
}

interface Placed<T> {
  readonly arm: ArmSide;
  readonly stroke: T;
}

interface Passage<T> {
  readonly arm: ArmSide;
  readonly first: T;
  readonly other: T;
  readonly second: T;
}

/**
 * Goes along the strokes by entry: three in a row of alternating arms are a passage when the third is the one that the
 * first is known to lead to (or nothing else is known), and the next passage may begin with its last stroke.
 */
function passagesAlong<T extends StrokeEvents>(placed: readonly Placed<T>[]): Passage<T>[] {
  const passages: Passage<T>[] = [];
  let at = 0;
  while (at + 2 < placed.length) {
    const [first, other, second] = placed.slice(at, at + 3);
    if (!first || !other || !second) break;
    const { nextEntry } = first.stroke;
    const alternate = first.arm === second.arm && other.arm !== first.arm;
    const follows = nextEntry === null || nextEntry === second.stroke.entry;
    const fits = alternate && follows;
    if (fits) {
      passages.push({ arm: first.arm, first: first.stroke, other: other.stroke, second: second.stroke });
    }
    at += fits ? 2 : 1;
  }
  return passages;
}

/** Mean duration of the cycles that are complete, by a next entry or by the next stroke's entry. */
function meanCycle<T extends StrokeEvents>(
  strokes: readonly T[],
  passages: readonly Passage<T>[],
  times: FrameTimesUs,
): number {
  const lasting = (from: number, to: number): number => (times[to] ?? NaN) - (times[from] ?? NaN);
  const known = strokes.flatMap(({ entry, nextEntry }) =>
    nextEntry === null ? [] : [lasting(entry, nextEntry)],
  );
  const followed = passages.flatMap(({ first, second }) =>
    first.nextEntry === null ? [lasting(first.entry, second.entry)] : [],
  );
  return meanOf([...known, ...followed]);
}

function cycleOf<T extends StrokeEvents>(
  { first, other, second }: Passage<T>,
  cycleUs: number,
  times: FrameTimesUs,
  options: EventOptions,
): CoordinationCycle<T> {
  const events = [
    eventInput(first, 'exit', times, options),
    eventInput(other, 'catch', times, options),
    eventInput(other, 'exit', times, options),
    eventInput(second, 'catch', times, options),
  ] as const;
  const percent = (us: number): number => (100 * us) / cycleUs;
  const [exit1, catch1, exit2, catch2] = events;
  const lag1 = percent(exit1.value - catch1.value);
  const lag2 = percent(exit2.value - catch2.value);
  // Each event moves one of two lags that are averaged: slope ½ over the cycle.
  const u = combine(events.map(({ source, standard }) => ({ source, alone: percent(standard) / 2 })));
  return {
    lag1,
    lag2,
    index: (lag1 + lag2) / 2,
    uncertainty: u.standard,
    parts: u.parts,
    frames: [first.exit, other.catch, other.exit, second.catch],
    strokes: [first, other, second],
  };
}

/** Exact opposition never happens on film: within 1.96 u of zero the mode is undetermined. */
function modeOf(index: number, standard: number): CoordinationMode {
  if (index === 0 && standard === 0) return 'opposition';
  if (Math.abs(index) < Z95 * standard) return 'undetermined';
  return index < 0 ? 'catch-up' : 'superposition';
}
