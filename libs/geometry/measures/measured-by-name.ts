import type { Phase } from '../events/phases';
import { type Outcome, ok, refused } from '../outcome';
import type { Measured } from './measured';
import type { StrokeMeasures } from './stroke-measures';

/** Measures of one stroke that are one number with an uncertainty, by name. Shares 0 to 1, degrees, cycles a minute, metres, m²/s. */
export const strokeMeasureNames = [
  'verticalAt',
  'peakDrop',
  'elbowAtMidPull',
  'entryAndCatch',
  'pull',
  'push',
  'recovery',
  'strokeRate',
  'strokeLength',
  'strokeIndex',
] as const;
export type StrokeMeasureName = (typeof strokeMeasureNames)[number];

/** One measure out of a stroke's, with its interval, its parts (largest first) and the frames it came from. */
export function measuredByName(name: StrokeMeasureName, measures: StrokeMeasures): Outcome<Measured> {
  switch (name) {
    case 'verticalAt':
    case 'peakDrop':
    case 'elbowAtMidPull':
    case 'strokeLength':
    case 'strokeIndex':
      return measures[name];
    case 'strokeRate':
      return rate(measures);
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

function rate({ strokeRate }: StrokeMeasures): Outcome<Measured> {
  if (!strokeRate.ok) return strokeRate;
  const { cyclesPerMinute: value, uncertainty, interval, parts, frames } = strokeRate.value;
  return ok({ value, uncertainty, interval, parts, frame: frames[0] ?? 0, frames });
}
