import { measureNames } from '@stillstroke/contract/measure-names';
import type { Measure } from '@stillstroke/contract/measures';
import type { TrendMeasure } from '@stillstroke/contract/trend';
import { formatDifference, unitOf } from './format-figure';

interface MeasureWords {
  readonly name: string;
  /** What it is, in a few words under the name. */
  readonly explains: string;
  /** Sentence for the arm whose value is larger, without amount: `The right forearm comes to vertical later`. */
  readonly larger: (arm: 'left' | 'right') => string;
  /** The same with the amount: `Right later by 24 points`. */
  readonly largerBy: (arm: 'Left' | 'Right', amount: string) => string;
  /** A change of one arm over time: `later by 8 points` for larger, its opposite for smaller. */
  readonly moved: (larger: boolean, amount: string) => string;
}

const share = (name: string, explains: string, what: string): MeasureWords => ({
  name,
  explains,
  larger: (arm) => `The ${arm} arm takes longer for ${what}`,
  largerBy: (arm, amount) => `${arm} longer by ${amount}`,
  moved: (larger, amount) => `${larger ? 'longer' : 'shorter'} by ${amount}`,
});

/** Names and sentences of every measure, one place for every page. */
export const measureWords: Readonly<Record<Measure, MeasureWords>> = {
  verticalAt: {
    name: measureNames.verticalAt,
    explains: 'share of the pull, catch to exit',
    larger: (arm) => `The ${arm} forearm comes to vertical later`,
    largerBy: (arm, amount) => `${arm} later by ${amount}`,
    moved: (larger, amount) => `${larger ? 'later' : 'earlier'} by ${amount}`,
  },
  peakDrop: {
    name: measureNames.peakDrop,
    explains: 'elbow behind the line shoulder to hand',
    larger: (arm) => `The ${arm} elbow drops more`,
    largerBy: (arm, amount) => `${arm} drops ${amount} more`,
    moved: (larger, amount) => `drops ${amount} ${larger ? 'more' : 'less'}`,
  },
  elbowAtMidPull: {
    name: measureNames.elbowAtMidPull,
    explains: '180° is a straight arm; projected',
    larger: (arm) => `The ${arm} arm is straighter at mid-pull`,
    largerBy: (arm, amount) => `${arm} straighter by ${amount}`,
    moved: (larger, amount) => `${larger ? 'straighter' : 'more bent'} by ${amount}`,
  },
  entryAndCatch: share(measureNames.entryAndCatch, 'share of the cycle', 'entry and catch'),
  pull: share(measureNames.pull, 'share of the cycle, catch to mid-pull', 'the pull'),
  push: share(measureNames.push, 'share of the cycle, mid-pull to exit', 'the push'),
  recovery: share(measureNames.recovery, 'share of the cycle', 'the recovery'),
  strokeRate: {
    name: measureNames.strokeRate,
    explains: 'cycles a minute; a cycle is two arm strokes',
    larger: (arm) => `The ${arm} arm turns over quicker`,
    largerBy: (arm, amount) => `${arm} quicker by ${amount}`,
    moved: (larger, amount) => `${larger ? 'quicker' : 'slower'} by ${amount}`,
  },
  strokeLength: {
    name: 'Stroke length',
    explains: 'metres a cycle; the clip’s mean speed by the rate',
    larger: (arm) => `The ${arm} arm’s cycles are longer`,
    largerBy: (arm, amount) => `${arm} longer by ${amount}`,
    moved: (larger, amount) => `${larger ? 'longer' : 'shorter'} by ${amount}`,
  },
  strokeIndex: {
    name: 'Stroke index',
    explains: 'speed × stroke length; within one stroke kind only',
    larger: (arm) => `The ${arm} arm’s stroke index is higher`,
    largerBy: (arm, amount) => `${arm} higher by ${amount}`,
    moved: (larger, amount) => `${larger ? 'higher' : 'lower'} by ${amount}`,
  },
};

/** Order in which measures are listed and looked at for the sentence of a page. */
export const measuresInOrder = Object.keys(measureWords) as readonly Measure[];

/** Of both arms together; Trend follows it beside the measures of an arm. */
export const coordinationWords = {
  name: 'Index of coordination',
  explains: 'share of the cycle; − gap between the arms’ pulls, + overlap',
  moved: (larger: boolean, amount: string) => `${amount} ${larger ? 'less gap' : 'more gap'}`,
};

/** The name of whatever Trend follows. */
export function nameOf(measure: TrendMeasure): string {
  return measure === 'coordination' ? coordinationWords.name : measureWords[measure].name;
}

/** `later by 8 points`, for a change given in the unit of the measure. */
export function sayMoved(measure: TrendMeasure, change: number): string {
  if (measure === 'coordination') {
    return coordinationWords.moved(change > 0, formatDifference(change, 'share'));
  }
  return measureWords[measure].moved(change > 0, formatDifference(change, unitOf[measure]));
}
