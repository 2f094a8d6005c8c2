import type { Measure } from '@stillstroke/contract/measures';

export type Unit = 'share' | 'deg' | 'perMinute';

/** Unit in which a measure is counted; shares are 0–1 in data and percent on the screen. */
export const unitOf: Readonly<Record<Measure, Unit>> = {
  verticalAt: 'share',
  peakDrop: 'deg',
  elbowAtMidPull: 'deg',
  entryAndCatch: 'share',
  pull: 'share',
  push: 'share',
  recovery: 'share',
  strokeRate: 'perMinute',
};

const scaleOf: Readonly<Record<Unit, number>> = { share: 100, deg: 1, perMinute: 1 };
const signOf: Readonly<Record<Unit, string>> = { share: ' %', deg: '°', perMinute: ' a minute' };

/** The number as people read it: percent for shares, otherwise as it is. */
export function onScreen(value: number, unit: Unit): number {
  return value * scaleOf[unit];
}

/** Decimals that the uncertainty (on the screen's scale) can carry: none from about one unit on, else one. */
function decimals(uncertainty: number | null): number {
  return uncertainty !== null && uncertainty < 0.95 ? 1 : 0;
}

/**
 * A value with its unit and no more digits than its uncertainty carries, e.g. `46°`, `58 %`.
 *
 * @param uncertainty standard uncertainty in the unit of the value; null = whole numbers
 * @param signed writes a plus before positive values, for angles whose sign has a meaning
 */
export function formatFigure(
  value: number,
  unit: Unit,
  uncertainty: number | null = null,
  signed = false,
): string {
  const places = decimals(uncertainty === null ? null : onScreen(uncertainty, unit));
  const text = fixed(onScreen(value, unit), places);
  return `${signed && !text.startsWith('−') && Number(text) !== 0 ? '+' : ''}${text}${signOf[unit]}`;
}

/** `± 2°`: the standard uncertainty with as many decimals as its value has. */
export function formatUncertainty(uncertainty: number, unit: Unit): string {
  const shown = onScreen(uncertainty, unit);
  const places = decimals(shown);
  // An uncertainty is never shown as nothing.
  const least = places === 0 ? 1 : 0.1;
  return `± ${fixed(Math.max(shown, least), places)}${signOf[unit]}`;
}

/** A difference in words' units: points for shares, degrees, cycles a minute; without sign. */
export function formatDifference(difference: number, unit: Unit): string {
  const amount = fixed(
    Math.abs(onScreen(difference, unit)),
    Math.abs(onScreen(difference, unit)) < 0.95 ? 1 : 0,
  );
  if (unit === 'share') return `${amount} ${amount === '1' ? 'point' : 'points'}`;
  return unit === 'deg' ? `${amount}°` : `${amount} a minute`;
}

/** Both ends of an interval of a difference, smaller amount first when it does not cross zero: `17 to 31`. */
export function formatInterval(interval: { low: number; high: number }, unit: Unit): string {
  const ends = [onScreen(interval.low, unit), onScreen(interval.high, unit)] as const;
  const narrow = Math.abs(ends[1] - ends[0]) < 3;
  const crosses = ends[0] < 0 && ends[1] > 0;
  const shown = crosses ? [...ends] : ends.map(Math.abs).sort((a, b) => a - b);
  return shown.map((end) => fixed(end, narrow ? 1 : 0)).join(' to ');
}

/** Both ends of an interval with their signs, smaller first: `−16 to −5 points`, `52 to 64 %`. */
export function formatRange(
  interval: { low: number; high: number },
  unit: Unit,
  of: 'value' | 'difference' = 'value',
): string {
  const ends = [onScreen(interval.low, unit), onScreen(interval.high, unit)] as const;
  const places = Math.abs(ends[1] - ends[0]) < 3 ? 1 : 0;
  const sign = of === 'difference' && unit === 'share' ? ' points' : signOf[unit];
  return `${fixed(ends[0], places)} to ${fixed(ends[1], places)}${sign}`;
}

/** Fixed decimals with a true minus and no negative zero. */
export function fixed(value: number, places: number): string {
  const text = value.toFixed(places);
  return Number(text) === 0 ? (0).toFixed(places) : text.replace('-', '−');
}
