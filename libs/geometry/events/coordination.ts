import type { ArmSide } from '../arm';
import { type Outcome, ok, refused } from '../outcome';
import { Z95 } from '../statistics/normal';
import { meanOf } from '../statistics/sample';
import { type Interval, normalInterval } from '../uncertainty/elbow-interval';
import type { UncertaintyPart } from '../uncertainty/parts';
import { combine } from '../uncertainty/parts';
import { propagate, type UncertainInput } from '../uncertainty/propagate';
import { eventTimeUncertaintyUs, type FrameTimesUs } from './frame-times';
import { checkOrder, type OrderReason, type StrokeEvents } from './stroke';

/** Catch-up: a gap between the arms' propulsion; superposition: an overlap; undetermined: neither can be told. */
export type CoordinationMode = 'catch-up' | 'opposition' | 'superposition' | 'undetermined';

/** One passage from an arm to the other and back. */
export interface CoordinationCycle {
  /** Percent of the cycle: from the other arm's catch to this arm's exit, + overlap. */
  readonly lag1: number;
  /** Percent: from this arm's next catch to the other arm's exit, + overlap. */
  readonly lag2: number;
  /** Mean of the two. */
  readonly index: number;
  readonly uncertainty: number;
  /** Exit, other's catch, other's exit, next catch. */
  readonly frames: readonly [number, number, number, number];
}

/** Index of coordination (Chollet, Chalies and Chatard 2000), percent of the mean cycle. */
export interface Coordination {
  readonly index: number;
  /** Standard uncertainty from choosing the event frames, of the mean over the cycles. */
  readonly uncertainty: number;
  readonly interval: Interval;
  readonly parts: readonly UncertaintyPart[];
  readonly mode: CoordinationMode;
  /** The arm that begins. */
  readonly from: ArmSide;
  readonly cycles: readonly CoordinationCycle[];
}

export type CoordinationReason =
  OrderReason | 'too-few-strokes' | 'arms-do-not-alternate' | 'no-complete-cycle';

export interface CoordinationOptions {
  /** See `EVENT_ERROR_FRAMES`. */
  readonly eventErrorFrames?: number;
}

/**
 * Index of coordination over all passages arm – other arm – arm. For one passage with exit₁, catch′, exit′, catch₂ and
 * the mean cycle T: ½[(exit₁ − catch′) + (exit′ − catch₂)]/T. A share: the capture rate does not matter.
 */
export function indexOfCoordination(
  arms: Readonly<Record<ArmSide, readonly StrokeEvents[]>>,
  times: FrameTimesUs,
  options: CoordinationOptions = {},
): Outcome<Coordination, CoordinationReason> {
  for (const stroke of [...arms.left, ...arms.right]) {
    const order = checkOrder(stroke, times.length);
    if (!order.ok) return order;
  }
  const left = byEntry(arms.left);
  const right = byEntry(arms.right);
  const [firstLeft, firstRight] = [left[0], right[0]];
  if (!firstLeft || !firstRight) return refused('too-few-strokes');
  const from: ArmSide = firstLeft.entry < firstRight.entry ? 'left' : 'right';
  const passages = from === 'left' ? passagesOf(left, right) : passagesOf(right, left);
  if (passages.length === 0)
    return refused(left.length + right.length < 3 ? 'too-few-strokes' : 'arms-do-not-alternate');
  const cycleUs = meanCycle(arms, passages, times);
  if (!(cycleUs > 0)) return refused('no-complete-cycle');
  return ok(summary(from, passages, cycleUs, times, options));
}

function byEntry(strokes: readonly StrokeEvents[]): StrokeEvents[] {
  return [...strokes].sort((a, b) => a.entry - b.entry);
}

interface Passage {
  readonly first: StrokeEvents;
  readonly other: StrokeEvents;
  readonly second: StrokeEvents;
}

/** Each pair of strokes of one arm that follow each other with exactly one stroke of the other arm entering between. */
function passagesOf(one: readonly StrokeEvents[], other: readonly StrokeEvents[]): Passage[] {
  return one.flatMap((first, i) => {
    const second = one[i + 1];
    if (!second || (first.nextEntry !== null && first.nextEntry !== second.entry)) return [];
    const between = other.filter(({ entry }) => entry > first.entry && entry < second.entry);
    const [only] = between;
    return only && between.length === 1 ? [{ first, other: only, second }] : [];
  });
}

/** Mean duration of the cycles that are complete, by a next entry or by the next stroke's entry. */
function meanCycle(
  arms: Readonly<Record<ArmSide, readonly StrokeEvents[]>>,
  passages: readonly Passage[],
  times: FrameTimesUs,
): number {
  const lasting = (from: number, to: number): number => (times[to] ?? NaN) - (times[from] ?? NaN);
  const known = [...arms.left, ...arms.right].flatMap(({ entry, nextEntry }) =>
    nextEntry === null ? [] : [lasting(entry, nextEntry)],
  );
  const followed = passages.flatMap(({ first, second }) =>
    first.nextEntry === null ? [lasting(first.entry, second.entry)] : [],
  );
  return meanOf([...known, ...followed]);
}

function summary(
  from: ArmSide,
  passages: readonly Passage[],
  cycleUs: number,
  times: FrameTimesUs,
  options: CoordinationOptions,
): Coordination {
  const read = passages.map((passage) => {
    const { first, other, second } = passage;
    const frames = [first.exit, other.catch, other.exit, second.catch] as const;
    const sources = ['exit-frame', 'catch-frame', 'exit-frame', 'catch-frame'] as const;
    const inputs = frames.map((frame, i): UncertainInput => ({
      source: sources[i] ?? 'exit-frame',
      value: times[frame] ?? NaN,
      standard: eventTimeUncertaintyUs(times, frame, options.eventErrorFrames),
    }));
    const percent = (us: number): number => (100 * us) / cycleUs;
    const index = ([exit1 = 0, catch1 = 0, exit2 = 0, catch2 = 0]: readonly number[]): number =>
      percent(exit1 - catch1 + exit2 - catch2) / 2;
    const [exit1 = 0, catch1 = 0, exit2 = 0, catch2 = 0] = inputs.map(({ value }) => value);
    const u = propagate(inputs, index);
    const lags = { lag1: percent(exit1 - catch1), lag2: percent(exit2 - catch2) };
    return {
      u,
      cycle: { ...lags, index: index([exit1, catch1, exit2, catch2]), uncertainty: u.standard, frames },
    };
  });
  const index = meanOf(read.map(({ cycle }) => cycle.index));
  const u = combine(
    read.flatMap(({ u }) => u.parts.map(({ source, alone }) => ({ source, alone: alone / read.length }))),
  );
  return {
    index,
    uncertainty: u.standard,
    interval: normalInterval(index, u.standard),
    parts: u.parts,
    mode: modeOf(index, u.standard),
    from,
    cycles: read.map(({ cycle }) => cycle),
  };
}

/** Exact opposition never happens on film: within 1.96 u of zero the mode is undetermined. */
function modeOf(index: number, standard: number): CoordinationMode {
  if (index === 0 && standard === 0) return 'opposition';
  if (Math.abs(index) < Z95 * standard) return 'undetermined';
  return index < 0 ? 'catch-up' : 'superposition';
}
