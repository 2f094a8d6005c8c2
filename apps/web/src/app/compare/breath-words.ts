import type { BreathComparison } from '@stillstroke/contract/comparison';
import { formatDifference, formatInterval } from '../ui/figure/format-figure';
import { measureWords } from '../ui/figure/measure-words';
import { sayUnsettled } from './comparison-sentence';

/** The verdict of breathing strokes against the others, and how sure it is. */
export function sayBreathVerdict(row: BreathComparison): { verdict: string; detail: string } {
  switch (row.verdict) {
    case 'breathing-larger':
    case 'others-larger': {
      const amount = formatDifference(row.difference ?? 0, row.unit);
      const moved = measureWords[row.measure].moved(row.verdict === 'breathing-larger', amount);
      const range = row.interval ? `95 %: ${formatInterval(row.interval, row.unit)}; ` : '';
      return {
        verdict: `Breathing strokes: ${moved}`,
        detail: `${range}more than marking could produce`,
      };
    }
    case 'not-distinguishable':
      return { verdict: 'Not distinguishable', detail: sayUnsettled(row) };
    case 'too-few':
      return {
        verdict: 'Too few strokes',
        detail: `${row.breathing.count} breathing and ${row.others.count} other strokes measured; three of either kind are needed`,
      };
  }
}
