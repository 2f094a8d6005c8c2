import type { CautionCode, CautionSummary } from '@stillstroke/contract/view-cautions';
import { ASSUMED_FIELD_OF_VIEW } from '@stillstroke/geometry/view/port-bending';
import { ASSUMED_DISTANCE_M, nearFarLengthShare } from '@stillstroke/geometry/view/near-arm';
import type { AffectedReading, ViewCaution } from '@stillstroke/geometry/view/caution';
import { fixed } from './format-figure';

const shortWords: Readonly<Record<CautionCode, string>> = {
  foreshortened: 'Out of the picture’s plane',
  'far-arm': 'Far arm',
  'plumb-assumed': 'Plumb assumed',
  'plumb-short': 'Short plumb',
  'camera-leans': 'Camera leans',
  'flat-port': 'Off the camera’s axis',
};

const readingWords: Readonly<Record<AffectedReading, string>> = {
  forearm: 'the forearm',
  upperArm: 'the upper arm',
  elbow: 'the elbow',
  elbowDrop: 'the elbow drop',
  verticalAt: 'the forearm behind “vertical at”',
  peakDrop: 'the largest drop',
  elbowAtMidPull: 'the elbow at mid-pull',
};

/** `Far arm, up to 4°` */
export function sayCautionShort({ code, sizeDeg }: Pick<ViewCaution, 'code' | 'sizeDeg'>): string {
  return `${shortWords[code]}, up to ${degrees(sizeDeg)}`;
}

/** The whole of it: what is seen, what it may do and how much, and what that rests on. */
export function sayCaution(caution: ViewCaution): string {
  const cause = caution.causeDeg === null ? '' : degrees(caution.causeDeg);
  const may = `${sayAffected(caution)}.`;
  switch (caution.code) {
    case 'foreshortened':
      return (
        `A part of the ${caution.arm} arm looks shorter here than elsewhere in the stroke, as if it pointed at least ` +
        `${cause} towards the camera or away from it. In space, unlike in the picture, ${may}`
      );
    case 'far-arm':
      return (
        `The ${caution.arm} arm is the far one in this view: water, bubbles and the body lie before it, so its marks are ` +
        `less sure. If they are twice as loose as usual, ${may} Lengths on it look about ${lengthShare()} % shorter than on ` +
        `the near arm (camera taken to be ${ASSUMED_DISTANCE_M} m away): compare angles between the arms, not lengths.`
      );
    case 'plumb-assumed':
      return (
        `No plumb is set, so the vertical of the picture stands in for it. With a camera held by hand or on a pole, ${may} ` +
        'Elbow and elbow drop do not depend on it.'
      );
    case 'plumb-short':
      return `The plumb is short, so it tells the vertical no better than this: ${may} Draw it longer.`;
    case 'camera-leans':
      return (
        `The camera leans by ${cause}. The plumb takes that out; what is left of it is small: ${may} ` +
        'A camera that also looks up or down is not seen by a plumb.'
      );
    case 'flat-port':
      return (
        `The arm lies up to ${cause} off the camera’s axis, under water. Behind a flat port ${may} Behind a dome, or in a ` +
        `corrected picture, not at all.${caution.assumed ? ` ${assumedView()}` : ''}`
      );
  }
}

/** `the forearm may be off by up to 4°, the elbow by up to 12°`; equal sizes are said once. */
function sayAffected({ affects }: Pick<ViewCaution, 'affects'>): string {
  const bySize = new Map<string, string[]>();
  for (const { reading, sizeDeg } of affects) {
    const size = degrees(sizeDeg);
    bySize.set(size, [...(bySize.get(size) ?? []), readingWords[reading]]);
  }
  return [...bySize]
    .map(([size, names], at) => `${listed(names)} ${at === 0 ? 'may be off by' : 'by'} up to ${size}`)
    .join(', ');
}

/** One line over many strokes: `Far arm (left), up to 5°, 6 strokes`. */
export function sayCautionSummary({ code, arm, sizeDeg, strokes, assumed }: CautionSummary): string {
  const whose = arm ? ` (${arm} arm)` : '';
  const rests = assumed && code === 'flat-port' ? '; field of view assumed' : '';
  return `${shortWords[code]}${whose}: up to ${degrees(sizeDeg)} on ${strokes} ${strokes === 1 ? 'stroke' : 'strokes'}${rests}`;
}

/** Of cautions that differ only in the measure: the largest size, so that each is said once. */
export function inShort(cautions: readonly CautionSummary[]): readonly CautionSummary[] {
  const found = new Map<string, CautionSummary>();
  for (const caution of cautions) {
    const key = `${caution.code} ${caution.arm ?? ''}`;
    const before = found.get(key);
    if (!before || caution.sizeDeg > before.sizeDeg) {
      const strokes = Math.max(caution.strokes, before?.strokes ?? 0);
      found.set(key, { ...caution, strokes });
    } else {
      found.set(key, { ...before, strokes: Math.max(caution.strokes, before.strokes) });
    }
  }
  return [...found.values()].sort((a, b) => b.sizeDeg - a.sizeDeg);
}

/** Whole degrees from two on, else tenths; never nothing. */
function degrees(deg: number): string {
  return deg < 1.95 ? `${fixed(Math.max(deg, 0.1), 1)}°` : `${fixed(deg, 0)}°`;
}

function lengthShare(): string {
  // Shorter on the far arm: 1 − 1/(1 + s) of the share by which the near arm's are longer.
  return fixed(100 * (1 - 1 / (1 + nearFarLengthShare())), 0);
}

function assumedView(): string {
  return `The field of view was not said; ${ASSUMED_FIELD_OF_VIEW.deg}° across in ${ASSUMED_FIELD_OF_VIEW.medium} is taken.`;
}

function listed(names: readonly string[]): string {
  return names.length < 2 ? names.join('') : `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''}`;
}
