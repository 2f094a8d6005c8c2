import type { FindingArm, FindingKind, FindingPhase } from '@stillstroke/contract/reviews';
import type { EarlierReading, ReadingStand } from '@stillstroke/contract/review-readings';
import type { Still, StillLayout } from '@stillstroke/contract/stills';
import { formatDifference, formatFigure, formatUncertainty } from '../ui/figure/format-figure';
import { sayMoved } from '../ui/figure/measure-words';
import { sayReason } from '../ui/figure/reason-words';
import { sayDate } from '../ui/say-date';

/** What findings, readings and stills are, in words: the same for those who write and those who read. */

export const kindWords: Readonly<Record<FindingKind, string>> = {
  good: 'Good: keep it',
  'to-work-on': 'To work on',
};
export const armWords: Readonly<Record<FindingArm, string>> = {
  left: 'Left arm',
  right: 'Right arm',
  both: 'Both arms',
  none: 'No arm in particular',
};
export const phaseWords: Readonly<Record<FindingPhase, string>> = {
  'entry-and-catch': 'Entry and catch',
  pull: 'Pull',
  push: 'Push',
  recovery: 'Recovery',
  whole: 'Whole stroke',
};
export const layoutWords: Readonly<Record<StillLayout, string>> = {
  single: 'One frame',
  'left-right': 'Left and right',
  'then-now': 'Then and now',
  'breathing-other': 'With a breath and without',
};

interface Told {
  readonly arm: FindingArm;
  readonly phase: FindingPhase;
  readonly observation: { readonly name: string } | null;
}

/** `Right arm · Pull · Body roll`, as far as it says something. */
export function sayWhere({ arm, phase, observation }: Told): string {
  return [
    ...(arm === 'none' ? [] : [armWords[arm]]),
    ...(phase === 'whole' ? [] : [phaseWords[phase]]),
    ...(observation ? [observation.name] : []),
  ].join(' · ');
}

const goneWords: Readonly<Record<string, string>> = {
  gone: 'the film or stroke it was read from is gone',
  'not-marked': 'not marked on this frame',
};

/** Angles whose sign has a meaning are written with it. */
const isSigned = ({ measure, angle }: Pick<ReadingStand, 'measure' | 'angle'>) =>
  measure === 'peakDrop' || (angle !== null && angle !== 'elbowDeg');

/** `58 %`, `+46°`; the reason in words where there is none. */
export function sayValue(stand: ReadingStand): string {
  const { value, uncertainty, unit, reason } = stand;
  if (value === null) return goneWords[reason ?? ''] ?? sayReason(reason);
  return formatFigure(value, unit, uncertainty, isSigned(stand));
}

/** `± 3 %`, or nothing. */
export function sayPlusMinus({ value, uncertainty, unit }: ReadingStand): string {
  return value === null || uncertainty === null ? '' : formatUncertainty(uncertainty, unit);
}

const verdictWords: Readonly<Record<EarlierReading['verdict'], string>> = {
  changed: 'more than marking could produce',
  'not-more-than-marking': 'no more than marking could produce',
  'not-more-than-strokes-vary': 'no more than your strokes differ among themselves',
  'too-few': 'too few strokes to tell whether it moved',
};

/** Then and now of one's own, in a sentence: `2 Mar: 70 %. Now 45 %: earlier by 25 points, more than marking could produce.` */
export function sayThenAndNow(stand: ReadingStand): string | null {
  const { earlier, value, unit, uncertainty, measure } = stand;
  if (!earlier || value === null) return null;
  const then = formatFigure(earlier.value, unit, earlier.uncertainty, isSigned(stand));
  const now = formatFigure(value, unit, uncertainty, isSigned(stand));
  const moved = measure ? sayMoved(measure, earlier.change) : `by ${formatDifference(earlier.change, unit)}`;
  return `${sayDate(earlier.date)}: ${then}. Now ${now}: ${moved}, ${verdictWords[earlier.verdict]}.`;
}

/** What a picture shows, for those who do not see it. */
export function sayStill({ words, layout, parts, overlays }: Still): string {
  if (words) return words;
  const frames = parts.map(({ frame }) => frame).join(' and ');
  return `${layoutWords[layout]}, frame ${frames}${overlays ? ', with the marked arms and their angles' : ''}`;
}
