import { fixed, onScreen, type Unit } from '../figure/format-figure';
import type { ExplainedPartWords } from './explanation';

const words: Readonly<Record<string, string>> = {
  'shoulder-mark': 'placing the shoulder',
  'elbow-mark': 'placing the elbow',
  'wrist-mark': 'placing the wrist',
  roll: 'the plumb: the camera’s lean',
  'entry-frame': 'choosing the entry frame',
  'catch-frame': 'choosing the catch frame',
  'mid-pull': 'finding mid-pull between the marks',
  'exit-frame': 'choosing the exit frame',
  'next-entry-frame': 'choosing the next entry’s frame',
  distance: 'the known distance',
  time: 'the time taken',
  'first-place': 'placing one end',
  'second-place': 'placing the other end',
  scale: 'the scale: its points and its known lengths',
};

interface Part {
  readonly source: string;
  readonly alone: number;
  readonly share: number;
}

/**
 * The parts of an uncertainty in words, in the order given (largest first). `named` says what a part is called here, for
 * sources whose name depends on the place.
 */
export function sayParts(
  parts: readonly Part[],
  unit: Unit,
  named: Readonly<Record<string, string>> = {},
): ExplainedPartWords[] {
  return parts.map(({ source, alone, share }) => ({
    name: named[source] ?? words[source] ?? source.replaceAll('-', ' '),
    alone: sayAlone(alone, unit),
    share,
  }));
}

const signs: Readonly<Record<string, string>> = {
  share: ' points',
  deg: '°',
  perMinute: ' a minute',
  m: ' m',
  m2PerS: ' m²/s',
};

/** `± 1.2°`; two digits at least, so that small parts can be told apart. */
export function sayAlone(alone: number, unit: Unit): string {
  const shown = onScreen(alone, unit);
  if (shown > 0 && shown < 0.005) return `under 0.01${signs[unit] ?? ''}`;
  return `± ${fixed(shown, shown < 1 ? 2 : 1)}${signs[unit] ?? ''}`;
}
