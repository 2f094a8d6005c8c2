import { eventTimeUncertaintyUs, type FrameTimesUs } from '../events/frame-times';
import type { Phase } from '../events/phases';
import type { StrokeEvents } from '../events/stroke';
import { type Outcome, ok, refused } from '../outcome';
import { normalInterval } from '../uncertainty/elbow-interval';
import { combine, type UncertaintySource } from '../uncertainty/parts';
import type { Measured } from './measured';
import type { StrokeMeasures } from './stroke-measures';

/** Measures of one stroke that are one number with an uncertainty, by name. Shares 0 to 1, degrees, cycles a minute. */
export const strokeMeasureNames = [
  'verticalAt',
  'peakDrop',
  'elbowAtMidPull',
  'entryAndCatch',
  'pull',
  'push',
  'recovery',
  'strokeRate',
] as const;
export type StrokeMeasureName = (typeof strokeMeasureNames)[number];

/** One measure out of a stroke's, with its interval, its parts (largest first) and the frames it came from. */
export function measuredByName(
  name: StrokeMeasureName,
  stroke: StrokeEvents,
  measures: StrokeMeasures,
  times: FrameTimesUs,
): Outcome<Measured> {
  switch (name) {
    case 'verticalAt':
    case 'peakDrop':
    case 'elbowAtMidPull':
      return measures[name];
    case 'strokeRate':
      return strokeRate(stroke, measures, times);
    default:
      return phase(name, measures);
  }
}

function phase(
  name: 'entryAndCatch' | 'pull' | 'push' | 'recovery',
  { phases, midPull }: StrokeMeasures,
): Outcome<Measured> {
  if (!phases.ok) return phases;
  const found: Phase | null = phases.value[name];
  if (!found) return refused(midPull.ok ? 'mid-pull-outside-pull' : midPull.reason);
  const { share: value, uncertainty, interval, parts, frames } = found;
  return ok({ value, uncertainty, interval, parts, frame: frames[0], frames });
}

/** Cycles a minute of world time, f = 60/T; u(f) = f·u(T)/T, half of the variance from either entry at an even rate. */
function strokeRate(
  { entry, nextEntry }: StrokeEvents,
  { phases }: StrokeMeasures,
  times: FrameTimesUs,
): Outcome<Measured> {
  if (!phases.ok) return phases;
  const { cycleS, cycleUncertaintyS } = phases.value;
  const value = 60 / cycleS;
  const uncertainty = (value * cycleUncertaintyS) / cycleS;
  const frames = nextEntry === null ? [entry] : [entry, nextEntry];
  // The parts of u(T) as they are to each other, brought to the rate's own unit.
  const sources: readonly UncertaintySource[] = ['entry-frame', 'next-entry-frame'];
  const inTime = combine(
    frames.map((frame, at) => ({
      source: sources[at] ?? 'entry-frame',
      alone: eventTimeUncertaintyUs(times, frame),
    })),
  );
  const scale = inTime.standard > 0 ? uncertainty / inTime.standard : 0;
  const parts = inTime.parts.map((part) => ({ ...part, alone: part.alone * scale }));
  return ok({
    value,
    uncertainty,
    interval: normalInterval(value, uncertainty),
    parts,
    frame: entry,
    frames,
  });
}
