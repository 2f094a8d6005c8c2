import type { Measure } from '@stillstroke/contract/measures';
import type { ArmComparison } from '@stillstroke/geometry/statistics/compare-arms';
import { compareTogether, type ComparedTogether } from '@stillstroke/geometry/statistics/compare-measures';

export interface Judged {
  readonly compared: ComparedTogether;
  /** How many measures the verdict holds for at once. */
  readonly measuresTogether: number;
}

/**
 * Judges the comparisons of all measures together. Stroke length and index follow from the rate and the clip's speed:
 * they are judged along with all others, and the others without them, so that a known distance moves no other verdict.
 */
export function judgedTogether(alone: Readonly<Record<Measure, ArmComparison>>): Record<Measure, Judged> {
  const { strokeLength: _length, strokeIndex: _index, ...others } = alone;
  const all = judged(alone);
  return { ...all, ...judged(others) };
}

function judged<M extends Measure>(comparisons: Readonly<Record<M, ArmComparison>>): Record<M, Judged> {
  const together = compareTogether(comparisons);
  const entries = Object.entries(together) as [M, ComparedTogether][];
  const measuresTogether = entries.filter(([, { pTogether }]) => pTogether !== null).length;
  return Object.fromEntries(
    entries.map(([measure, compared]) => [measure, { compared, measuresTogether }]),
  ) as Record<M, Judged>;
}
