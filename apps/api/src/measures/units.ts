import type { Measure, unitSchema } from '@stillstroke/contract/measures';
import type { z } from 'zod';

/** The unit of each measure. */
export const unitOf: Readonly<Record<Measure, z.infer<typeof unitSchema>>> = {
  verticalAt: 'share',
  peakDrop: 'deg',
  elbowAtMidPull: 'deg',
  entryAndCatch: 'share',
  pull: 'share',
  push: 'share',
  recovery: 'share',
  strokeRate: 'perMinute',
  strokeLength: 'm',
  strokeIndex: 'm2PerS',
};
