import type { Arm } from '@stillstroke/contract/strokes';
import type { Measure } from '@stillstroke/contract/measures';
import type { Target, TargetArm } from '@stillstroke/contract/targets';
import type { BandRelation } from '@stillstroke/geometry/targets/band';
import {
  fixed,
  formatDifference,
  formatUncertainty,
  onScreen,
  unitOf,
  type Unit,
} from '../figure/format-figure';

/** The target that counts for a measure and arm: the arm's own before that for both. */
export function targetFor(targets: readonly Target[], measure: Measure, arm: Arm): Target | null {
  const those = targets.filter((target) => target.measure === measure);
  return those.find((target) => target.arm === arm) ?? those.find((target) => target.arm === 'both') ?? null;
}

export const targetArmWords: Readonly<Record<TargetArm, string>> = {
  both: 'both arms',
  left: 'left arm',
  right: 'right arm',
};

/** An end as a coach would type it: at most one decimal, two of metres, percent for shares. */
export function endOnScreen(end: number, unit: Unit): string {
  const shown = onScreen(end, unit);
  if (unit === 'm' || unit === 'm2PerS') return fixed(shown, 2);
  return fixed(shown, Math.abs(shown - Math.round(shown)) < 0.05 ? 0 : 1);
}

const units: Readonly<Record<string, string>> = {
  share: ' %',
  deg: '°',
  perMinute: ' a minute',
  m: ' m',
  m2PerS: ' m²/s',
};

/** `up to 35 %`, `from 90°`, `90 to 110°`. */
export function sayBand({ low, high, measure }: Pick<Target, 'low' | 'high' | 'measure'>): string {
  const unit = unitOf[measure];
  const sign = units[unit] ?? '';
  if (low === null) return high === null ? 'open' : `up to ${endOnScreen(high, unit)}${sign}`;
  if (high === null) return `from ${endOnScreen(low, unit)}${sign}`;
  return `${endOnScreen(low, unit)} to ${endOnScreen(high, unit)}${sign}`;
}

/**
 * Where a value lies against the band, without judging it: `inside the band`, `above it by 4° ± 2°`.
 *
 * @param uncertainty standard uncertainty of the value in its unit; null = left out
 */
export function sayRelation(relation: BandRelation, unit: Unit, uncertainty: number | null): string {
  switch (relation.kind) {
    case 'inside':
      return 'inside the band';
    case 'at-edge':
      return relation.edges.length === 2
        ? 'cannot be told apart from either edge of the band'
        : 'cannot be told apart from the band’s edge';
    case 'below':
    case 'above': {
      const spread = uncertainty === null ? '' : ` ${formatUncertainty(uncertainty, unit).replace(' %', '')}`;
      return `${relation.kind} the band by ${formatDifference(relation.by, unit)}${spread}`;
    }
  }
}
