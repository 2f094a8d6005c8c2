import type { ArmAnglesDeg } from './marks';
import type { Measure } from './measures';

/** The name of each measure as it stands on pages and in what is kept of them. */
export const measureNames: Readonly<Record<Measure, string>> = {
  verticalAt: 'Vertical at',
  peakDrop: 'Largest elbow drop',
  elbowAtMidPull: 'Elbow at mid-pull',
  entryAndCatch: 'Entry and catch',
  pull: 'Pull',
  push: 'Push',
  recovery: 'Recovery',
  strokeRate: 'Stroke rate',
  strokeLength: 'Stroke length',
  strokeIndex: 'Stroke index',
};

/** The name of each angle that a mark gives. */
export const angleNames: Readonly<Record<keyof ArmAnglesDeg, string>> = {
  forearmDeg: 'Forearm',
  upperArmDeg: 'Upper arm',
  elbowDeg: 'Elbow',
  elbowDropDeg: 'Elbow drop',
};
