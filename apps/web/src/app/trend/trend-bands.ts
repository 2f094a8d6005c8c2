import type { Target } from '@stillstroke/contract/targets';
import type { Trend } from '@stillstroke/contract/trend';
import { figureAgainstBand } from '@stillstroke/geometry/targets/band';
import { onScreen } from '../ui/figure/format-figure';
import { sayBand, sayRelation, targetArmWords, targetFor } from '../ui/target/target-words';

/** A target of the shown measure, ends on the screen's scale, in words, with where the latest sessions lie. */
export interface TrendBand {
  readonly id: string;
  readonly low: number | null;
  readonly high: number | null;
  /** `Target, both arms: up to 35 %` */
  readonly text: string;
  /** The coach's own. */
  readonly words: string;
  /** `Latest: left inside the band; right above the band by 4 points ± 2`; empty where nothing is measured. */
  readonly latest: string;
}

export function trendBands(targets: readonly Target[], { measure, unit, arms }: Trend): TrendBand[] {
  const end = (value: number | null) => (value === null ? null : onScreen(value, unit));
  return targets
    .filter((target) => target.measure === measure)
    .map((target) => {
      const latest = arms.flatMap(({ arm, points }) => {
        const point = points.at(-1);
        if (!point || arm === 'both' || targetFor(targets, target.measure, arm) !== target) return [];
        const found = figureAgainstBand(point.mean, point.uncertainty, target);
        return found.ok ? [`${arm} ${sayRelation(found.value, unit, point.uncertainty)}`] : [];
      });
      return {
        id: target.id,
        low: end(target.low),
        high: end(target.high),
        text: `Target, ${targetArmWords[target.arm]}: ${sayBand(target)}`,
        words: target.words,
        latest: latest.length > 0 ? `Latest: ${latest.join('; ')}` : '',
      };
    });
}
