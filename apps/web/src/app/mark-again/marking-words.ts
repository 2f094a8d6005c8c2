import type {
  Agreements,
  MarkingFigures,
  MarkingRound,
  MeasureAgreement,
} from '@stillstroke/contract/repeatability';
import { fixed } from '../ui/figure/format-figure';

type Figures = NonNullable<MarkingFigures['figures']>;
type Pair = Agreements['items'][number];
export type AngleName = keyof NonNullable<Figures['typicalErrors']>;

export const angleNames: Readonly<Record<AngleName, string>> = {
  forearmDeg: 'Forearm',
  upperArmDeg: 'Upper arm',
  elbowDeg: 'Elbow',
  elbowDropDeg: 'Elbow drop',
};

export const anglesInOrder: readonly AngleName[] = ['forearmDeg', 'upperArmDeg', 'elbowDeg', 'elbowDropDeg'];

export function degrees(value: number): string {
  return `${fixed(value, 1)}°`;
}

/** The main sentence of the page: how closely the marks repeat, or what is still missing. */
export function sayRepeatability({ figures, framesNeeded }: MarkingFigures): string {
  if (!figures) return 'How closely you repeat your own marks is not known yet.';
  const { shoulder, elbow, wrist } = figures.spreadAt1080;
  const px = (value: number) => fixed(value, 1);
  const spread = `Your marks repeat within about ${px(shoulder)} px at the shoulder, ${px(elbow)} px at the elbow and ${px(wrist)} px at the wrist`;
  if (!figures.inUse) {
    const missing = framesNeeded - figures.frames;
    return `${spread}, as far as ${sayFrames(figures.frames)} can tell; ${sayFrames(missing)} more and it counts.`;
  }
  const forearm = figures.typicalErrors?.forearmDeg.typicalErrorDeg;
  return forearm === undefined
    ? `${spread}.`
    : `${spread}: a forearm angle within about ${degrees(forearm)}.`;
}

export function sayFrames(count: number): string {
  return count === 1 ? '1 frame' : `${count} frames`;
}

/** What a round came to: `10 frames, finished`, `4 of 10 frames`. */
export function sayRound({ frames, marked, own, finishedAt }: MarkingRound): string {
  const far = finishedAt === null ? `${marked} of ${sayFrames(frames)}` : `${sayFrames(frames)}, finished`;
  if (own === frames) return far;
  return own === 0 ? `${far}; first marked by others` : `${far}; ${own} of them first marked by you`;
}

/** From fewer frames than this, limits are told with a warning. */
const FRAMES_FOR_LIMITS = 10;

/** Whether two coaches differ steadily in an angle, and how far single readings lie apart. */
export function sayAgreement(pair: Pair, angle: AngleName): string {
  const found = pair.measures?.[angle];
  const who = `${pair.first.name} and ${pair.second.name}`;
  if (!found) {
    return `${who} have both marked ${sayFrames(pair.frames)} of this clip: too few to say how they agree; three are the least.`;
  }
  const { bias, biasInterval, limits } = found;
  const interval = `95 % interval ${degrees(biasInterval.low)} to ${degrees(biasInterval.high)}`;
  const name = angleNames[angle].toLowerCase();
  const steady =
    biasInterval.low <= 0 && biasInterval.high >= 0
      ? `no steady difference can be told at the ${name} (${interval})`
      : `${bias > 0 ? pair.first.name : pair.second.name} reads the ${name} ${degrees(Math.abs(bias))} larger on average (${interval})`;
  const rough = pair.frames < FRAMES_FOR_LIMITS ? ` From so few frames these limits are rough.` : '';
  return `On ${sayFrames(pair.frames)} ${steady}${againstMarking[found.verdict](degrees(found.marking))}. Of single readings 95 in 100 are expected to differ by ${degrees(limits.low)} to ${degrees(limits.high)}.${rough}`;
}

/** A steady difference against what placing the same joints twice leaves open. */
const againstMarking: Readonly<Record<MeasureAgreement['verdict'], (marking: string) => string>> = {
  'no-shift': () => '',
  small: (marking) => `, which is small: placing the joints twice alone leaves ± ${marking}`,
  large: (marking) =>
    `, more than placing the joints twice leaves (± ${marking}): agree on where they are before you compare`,
};
