import { type Outcome, ok, refused } from '../outcome';
import type { CombinedUncertainty, UncertaintyPart } from '../uncertainty/parts';
import { propagate, type UncertainInput } from '../uncertainty/propagate';
import { type Interval, normalInterval } from '../uncertainty/elbow-interval';
import { worldSeconds } from '../units/microseconds';
import { eventInput, type EventOptions } from './event-moment';
import type { FrameTimesUs } from './frame-times';
import { checkOrder, type EventName, type OrderReason, type StrokeEvents } from './stroke';

/** One phase of an arm's cycle. */
export interface Phase {
  /** Share of the cycle, 0 to 1. */
  readonly share: number;
  /** Standard uncertainty of the share. */
  readonly uncertainty: number;
  readonly interval: Interval;
  /** What the uncertainty is made of, largest first. */
  readonly parts: readonly UncertaintyPart[];
  /** World seconds, with the capture rate factor. */
  readonly durationS: number;
  readonly durationUncertaintyS: number;
  /** First and last frame. */
  readonly frames: readonly [number, number];
}

/**
 * Phases of one arm's cycle, from entry to the next entry of the same hand (Chollet et al. 2000): entry and catch, pull
 * (catch to mid-pull), push (mid-pull to exit), recovery. Pull and push are null while mid-pull is not known. A kinematic
 * division: "propulsive" says that the hand moves backward, not that it propels.
 */
export interface Phases {
  readonly entryAndCatch: Phase;
  readonly pull: Phase | null;
  readonly push: Phase | null;
  /** Pull and push together: catch to exit. */
  readonly propulsive: Phase;
  readonly recovery: Phase;
  /** The whole cycle in world seconds. */
  readonly cycleS: number;
  readonly cycleUncertaintyS: number;
}

export type PhasesReason =
  OrderReason | 'no-next-entry' | 'no-duration' | 'bad-capture-rate' | 'mid-pull-outside-pull';

export interface PhaseOptions extends EventOptions {
  /** True: take the cycle's own duration as exact, as published formulas do. */
  readonly cycleExact?: boolean;
}

/** A mid-pull as far as phases need it. */
export interface MidPullTime {
  readonly timeUs: number;
  readonly uncertaintyUs: number;
  readonly frame: number;
}

interface Moment extends UncertainInput {
  readonly frame: number;
}

/** Phases of a stroke from its events, the frames' own times (variable rates included) and mid-pull, when known. */
export function strokePhases(
  stroke: StrokeEvents,
  mid: MidPullTime | null,
  times: FrameTimesUs,
  options: PhaseOptions = {},
): Outcome<Phases, PhasesReason> {
  const factor = options.captureRateFactor ?? 1;
  if (!(factor > 0 && Number.isFinite(factor))) return refused('bad-capture-rate');
  const order = checkOrder(stroke, times.length);
  if (!order.ok) return order;
  if (stroke.nextEntry === null) return refused('no-next-entry');
  const at = (event: EventName, frame: number): Moment => ({
    ...eventInput(stroke, event, times, options),
    frame,
  });
  const entry = at('entry', stroke.entry);
  const caught = at('catch', stroke.catch);
  const exit = at('exit', stroke.exit);
  const next = at('nextEntry', stroke.nextEntry);
  const cycleUs = next.value - entry.value;
  if (![entry, caught, exit, next].every(({ value }) => Number.isFinite(value)))
    return refused('frame-outside-clip');
  if (cycleUs <= 0) return refused('no-duration');
  if (mid && !(mid.timeUs >= caught.value && mid.timeUs <= exit.value))
    return refused('mid-pull-outside-pull');

  const cycle: Cycle = { entry, next, factor, exact: options.cycleExact ?? false };
  const middle: Moment | null = mid && {
    source: 'mid-pull',
    frame: mid.frame,
    value: mid.timeUs,
    standard: mid.uncertaintyUs,
  };
  return ok({
    entryAndCatch: phase(entry, caught, cycle),
    pull: middle && phase(caught, middle, cycle),
    push: middle && phase(middle, exit, cycle),
    propulsive: phase(caught, exit, cycle),
    recovery: phase(exit, next, cycle),
    cycleS: worldSeconds(cycleUs, factor),
    cycleUncertaintyS: worldSeconds(Math.hypot(entry.standard, next.standard), factor),
  });
}

interface Cycle {
  readonly entry: Moment;
  readonly next: Moment;
  readonly factor: number;
  readonly exact: boolean;
}

function phase(from: Moment, to: Moment, cycle: Cycle): Phase {
  const lengthUs = to.value - from.value;
  const cycleUs = cycle.next.value - cycle.entry.value;
  const share = lengthUs / cycleUs;
  const u = cycle.exact ? overExactCycle(from, to, cycleUs) : overOwnCycle(from, to, cycle);
  return {
    share,
    uncertainty: u.standard,
    interval: normalInterval(share, u.standard),
    parts: u.parts,
    durationS: worldSeconds(lengthUs, cycle.factor),
    durationUncertaintyS: worldSeconds(Math.hypot(from.standard, to.standard), cycle.factor),
    frames: [from.frame, to.frame],
  };
}

function overExactCycle(from: Moment, to: Moment, cycleUs: number): CombinedUncertainty {
  return propagate([from, to], ([start = 0, end = 0]) => (end - start) / cycleUs);
}

/** An event that bounds both the phase and the cycle is one input, so that its error counts once. */
function overOwnCycle(from: Moment, to: Moment, { entry, next }: Cycle): CombinedUncertainty {
  const moments = [...new Set([entry, from, to, next])];
  const places = [from, to, entry, next].map((moment) => moments.indexOf(moment));
  return propagate(moments, (values) => {
    const [start = 0, end = 0, first = 0, last = 0] = places.map((place) => values[place]);
    return (end - start) / (last - first);
  });
}
