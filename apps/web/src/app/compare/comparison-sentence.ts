import type { Comparison, MeasureComparison } from '@stillstroke/contract/comparison';
import { formatDifference, formatFigure, formatInterval } from '../ui/figure/format-figure';
import { measureWords, measuresInOrder } from '../ui/figure/measure-words';

/** The page's first two lines: what differs most to the point, then by how much and over how many strokes. */
export interface ComparisonSentence {
  readonly headline: string;
  readonly detail: string;
}

/** Says what the comparison carries and nothing more: a difference, none that the marks can tell, or too few strokes. */
export function sayComparison(splits: Comparison['splits']): ComparisonSentence {
  const settled = inOrder(splits.all).find(
    ({ verdict }) => verdict === 'left-larger' || verdict === 'right-larger',
  );
  if (settled) return sayDifference(settled, splits);
  const compared = splits.all.filter(({ verdict }) => verdict === 'not-distinguishable');
  if (compared.length > 0) {
    return {
      headline: 'Left and right cannot be told apart',
      detail: `No difference that these marks can carry, over ${strokesOf(splits.all)}.`,
    };
  }
  const most = splits.all.reduce((seen, { left, right }) => Math.max(seen, left.count + right.count), 0);
  return {
    headline: most === 0 ? 'Nothing to compare yet' : 'Too few strokes to compare',
    detail:
      most === 0
        ? 'Set the events of a stroke on each arm and mark its frames; the comparison appears here.'
        : `A verdict needs three measured strokes on each arm; there are ${strokesOf(splits.all)}.`,
  };
}

function sayDifference(row: MeasureComparison, splits: Comparison['splits']): ComparisonSentence {
  const arm = row.verdict === 'left-larger' ? 'left' : 'right';
  const words = measureWords[row.measure];
  const value = (mean: number | null) => (mean === null ? 'not measured' : formatFigure(mean, row.unit));
  const larger = arm === 'left' ? row.left : row.right;
  const smaller = arm === 'left' ? row.right : row.left;
  const amount = formatDifference(row.difference ?? 0, row.unit);
  const interval = row.interval ? ` (95 %: ${formatInterval(row.interval, row.unit)})` : '';
  return {
    headline: words.larger(arm),
    detail:
      `${capital(arm)} ${value(larger.mean)}, ${arm === 'left' ? 'right' : 'left'} ${value(smaller.mean)}: ` +
      `${amount} apart${interval}, over ${larger.count} and ${smaller.count} strokes${sayBreath(row, splits)}.`,
  };
}

/** Where the difference sits, when one side of the split has it and the other has not. */
function sayBreath(row: MeasureComparison, splits: Comparison['splits']): string {
  const of = (rows: readonly MeasureComparison[]) =>
    rows.find(({ measure }) => measure === row.measure)?.difference;
  const [breathing, other] = [of(splits.breathing), of(splits.notBreathing)];
  if (breathing == null || other == null) return '';
  if (Math.abs(breathing) > 2 * Math.abs(other)) return ', most of it on breathing strokes';
  if (Math.abs(other) > 2 * Math.abs(breathing)) return ', most of it on strokes without a breath';
  return '';
}

/** The verdict of one row: what to say, and how sure. */
export function sayVerdict(row: MeasureComparison): { verdict: string; detail: string } {
  const amount = formatDifference(row.difference ?? 0, row.unit);
  switch (row.verdict) {
    case 'left-larger':
    case 'right-larger':
      return {
        verdict: measureWords[row.measure].largerBy(row.verdict === 'left-larger' ? 'Left' : 'Right', amount),
        detail: row.interval
          ? `95 %: ${formatInterval(row.interval, row.unit)}; more than marking could produce`
          : '',
      };
    case 'not-distinguishable':
      return { verdict: 'Not distinguishable', detail: sayUnsettled(row) };
    case 'too-few':
      return {
        verdict: 'Too few strokes',
        detail: `${row.left.count} left and ${row.right.count} right measured; three a side are needed`,
      };
  }
}

/** A difference that is not settled: its interval, and what would settle it. */
export function sayUnsettled({
  difference,
  interval,
  moreStrokes,
  unit,
}: Pick<MeasureComparison, 'difference' | 'interval' | 'moreStrokes' | 'unit'>): string {
  if (!interval) return '';
  const range = `95 %: ${formatInterval(interval, unit)}`;
  if (moreStrokes === null) {
    const crosses = interval.low <= 0 && interval.high >= 0;
    return crosses ? range : `${range}; among so many measures one such comes by chance`;
  }
  const amount = formatDifference(difference ?? 0, unit);
  return moreStrokes > 200
    ? `${range}; no reasonable number of strokes would settle ${amount}`
    : `${range}; about ${moreStrokes} more ${moreStrokes === 1 ? 'stroke' : 'strokes'} a side would settle ${amount}`;
}

function strokesOf(rows: readonly MeasureComparison[]): string {
  const count = (arm: 'left' | 'right') => rows.reduce((most, row) => Math.max(most, row[arm].count), 0);
  return `${count('left')} left and ${count('right')} right strokes`;
}

function inOrder(rows: readonly MeasureComparison[]): MeasureComparison[] {
  return [...rows].sort((a, b) => measuresInOrder.indexOf(a.measure) - measuresInOrder.indexOf(b.measure));
}

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1);
