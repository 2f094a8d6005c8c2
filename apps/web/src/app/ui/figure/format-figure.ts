import type { Measure, Unit as MeasureUnit } from '@stillstroke/contract/measures';

/** `mPerS` is a speed, which is shown but is no measure of its own. */
export type Unit = MeasureUnit | 'mPerS';

/** Unit in which a measure is counted; shares are 0–1 in data and percent on the screen. */
export const unitOf: Readonly<Record<Measure, MeasureUnit>> = {
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

const scaleOf: Readonly<Record<Unit, number>> = {
  share: 100,
  deg: 1,
  perMinute: 1,
  m: 1,
  m2PerS: 1,
  mPerS: 1,
};
/** What follows a number of the unit. */
export const signOf: Readonly<Record<Unit, string>> = {
  share: ' %',
  deg: '°',
  perMinute: ' a minute',
  m: ' m',
  m2PerS: ' m²/s',
  mPerS: ' m/s',
};
/** What follows a difference or an interval of one: percent become points. */
export const differenceSignOf: Readonly<Record<Unit, string>> = { ...signOf, share: ' points' };
/** Most decimals that make sense of a unit, whatever the uncertainty. */
const mostPlaces: Readonly<Record<Unit, number>> = {
  share: 1,
  deg: 1,
  perMinute: 1,
  m: 2,
  m2PerS: 2,
  mPerS: 2,
};

/** The number as people read it: percent for shares, otherwise as it is. */
export function onScreen(value: number, unit: Unit): number {
  return value * scaleOf[unit];
}

/**
 * Decimals that the uncertainty (on the screen's scale) can carry: one place of sense, none from about one unit on, and
 * no more than the unit has. Without an uncertainty whole numbers, hundredths where the unit is coarse.
 */
function decimals(uncertainty: number | null, unit: Unit): number {
  if (uncertainty === null) return mostPlaces[unit] === 2 ? 2 : 0;
  const carried = uncertainty >= 0.95 ? 0 : uncertainty >= 0.095 ? 1 : 2;
  return Math.min(carried, mostPlaces[unit]);
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
  const places = decimals(uncertainty === null ? null : onScreen(uncertainty, unit), unit);
  const text = fixed(onScreen(value, unit), places);
  return `${signed && !text.startsWith('−') && Number(text) !== 0 ? '+' : ''}${text}${signOf[unit]}`;
}

/** `± 2°`: the standard uncertainty with as many decimals as its value has. */
export function formatUncertainty(uncertainty: number, unit: Unit): string {
  const shown = onScreen(uncertainty, unit);
  const places = decimals(shown, unit);
  // An uncertainty is never shown as nothing.
  const least = 10 ** -places;
  return `± ${fixed(Math.max(shown, least), places)}${signOf[unit]}`;
}

/** A difference in words' units: points for shares, degrees, cycles a minute, metres; without sign. */
export function formatDifference(difference: number, unit: Unit): string {
  const shown = Math.abs(onScreen(difference, unit));
  const places = mostPlaces[unit] === 2 ? 2 : shown < 0.95 ? 1 : 0;
  const amount = fixed(shown, places);
  if (unit === 'share') return `${amount} ${amount === '1' ? 'point' : 'points'}`;
  return `${amount}${signOf[unit]}`;
}

/** Both ends of an interval of a difference, smaller amount first when it does not cross zero: `17 to 31`. */
export function formatInterval(interval: { low: number; high: number }, unit: Unit): string {
  const ends = [onScreen(interval.low, unit), onScreen(interval.high, unit)] as const;
  const narrow = Math.abs(ends[1] - ends[0]) < 3;
  const crosses = ends[0] < 0 && ends[1] > 0;
  const shown = crosses ? [...ends] : ends.map(Math.abs).sort((a, b) => a - b);
  const places = mostPlaces[unit] === 2 ? 2 : narrow ? 1 : 0;
  return shown.map((end) => fixed(end, places)).join(' to ');
}

/** Both ends of an interval with their signs, smaller first: `−16 to −5 points`, `52 to 64 %`. */
export function formatRange(
  interval: { low: number; high: number },
  unit: Unit,
  of: 'value' | 'difference' = 'value',
): string {
  const ends = [onScreen(interval.low, unit), onScreen(interval.high, unit)] as const;
  const places = mostPlaces[unit] === 2 ? 2 : Math.abs(ends[1] - ends[0]) < 3 ? 1 : 0;
  const sign = of === 'difference' && unit === 'share' ? ' points' : signOf[unit];
  return `${fixed(ends[0], places)} to ${fixed(ends[1], places)}${sign}`;
}

/** Fixed decimals with a true minus and no negative zero. */
export function fixed(value: number, places: number): string {
  const text = value.toFixed(places);
  return Number(text) === 0 ? (0).toFixed(places) : text.replace('-', '−');
}
