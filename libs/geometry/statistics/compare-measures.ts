import { type ArmComparison, verdictOf } from './compare-arms';
import { holm } from './holm';

/** A comparison judged together with those of other measures. */
export interface ComparedTogether extends ArmComparison {
  /** Adjusted by Holm's correction; null with too few strokes. */
  readonly pTogether: number | null;
}

/**
 * Comparisons of several measures looked at together: the verdicts hold for all of them at once. Those with too few
 * strokes stay as they are and do not count.
 */
export function compareTogether<K extends string>(
  comparisons: Readonly<Record<K, ArmComparison>>,
): Record<K, ComparedTogether> {
  const entries = Object.entries(comparisons) as [K, ArmComparison][];
  const tested = entries.filter(([, { p }]) => p !== null);
  const adjusted = holm(tested.map(([, { p }]) => p ?? 1));
  const pOf = new Map(tested.map(([key], at) => [key, adjusted.ok ? adjusted.value[at] : undefined]));
  const judged = entries.map(([key, comparison]): [K, ComparedTogether] => {
    const pTogether = pOf.get(key) ?? null;
    const { difference } = comparison;
    const verdict =
      pTogether === null || difference === null ? comparison.verdict : verdictOf(difference, pTogether);
    return [key, { ...comparison, verdict, pTogether }];
  });
  return Object.fromEntries(judged) as Record<K, ComparedTogether>;
}
