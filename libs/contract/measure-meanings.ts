import type * as z from 'zod';
import type { Measure, unitSchema } from './measures';

export type Unit = z.infer<typeof unitSchema>;

interface MeasureMeaning {
  readonly unit: Unit;
  /** One sentence without a number of ours in it: what is measured, between which events. */
  readonly meaning: string;
}

/** What every measure is, for whoever reads exported figures; the data dictionary is made from this. */
export const measureMeanings: Readonly<Record<Measure, MeasureMeaning>> = {
  verticalAt: {
    unit: 'share',
    meaning:
      'Share of the pull, catch to exit by time, at which the forearm first comes within the tolerance of vertical (15° unless said otherwise), interpolated between marked frames',
  },
  peakDrop: {
    unit: 'deg',
    meaning:
      'Largest signed angle at the shoulder from the line shoulder to wrist to the line shoulder to elbow during the pull: + elbow on the lower, trailing side (dropped), − on the leading side (high elbow)',
  },
  elbowAtMidPull: {
    unit: 'deg',
    meaning: 'Interior angle at the elbow when the hand passes under the shoulder; 180 is a straight arm',
  },
  entryAndCatch: { unit: 'share', meaning: 'Share of the cycle from entry to catch' },
  pull: { unit: 'share', meaning: 'Share of the cycle from catch to mid-pull' },
  push: { unit: 'share', meaning: 'Share of the cycle from mid-pull to exit' },
  recovery: { unit: 'share', meaning: 'Share of the cycle from exit to the next entry' },
  strokeRate: {
    unit: 'perMinute',
    meaning: 'Cycles a minute of world time, from entry to the next entry of the same hand',
  },
  strokeLength: {
    unit: 'm',
    meaning: 'Metres in one cycle: mean speed over the known distance of the clip by the stroke rate',
  },
  strokeIndex: {
    unit: 'm2PerS',
    meaning: 'Speed times stroke length; to be compared within one stroke kind only',
  },
};

/** How a unit ends a column's name, and how it is said. */
export const unitNames: Readonly<Record<Unit, { readonly suffix: string; readonly words: string }>> = {
  share: { suffix: 'share', words: 'share, 0–1' },
  deg: { suffix: 'deg', words: 'degrees' },
  perMinute: { suffix: 'per_min', words: 'a minute' },
  m: { suffix: 'm', words: 'metres' },
  m2PerS: { suffix: 'm2_per_s', words: 'square metres a second' },
};
