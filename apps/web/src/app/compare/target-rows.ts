import type { MeasureComparison } from '@stillstroke/contract/comparison';
import type { Arm } from '@stillstroke/contract/strokes';
import type { Target } from '@stillstroke/contract/targets';
import { figureAgainstBand, relationToBand, type Band } from '@stillstroke/geometry/targets/band';
import { onScreen } from '../ui/figure/format-figure';
import type { RailBand } from '../ui/rail/arm-rail';
import { sayBand, sayRelation, targetFor } from '../ui/target/target-words';

/** The band of an arm on the rail's scale; null where none is set. */
export function bandOn(
  targets: readonly Target[],
  { measure, unit }: MeasureComparison,
  arm: Arm,
): RailBand | null {
  const target = targetFor(targets, measure, arm);
  if (!target) return null;
  const end = (value: number | null) => (value === null ? null : onScreen(value, unit));
  return { low: end(target.low), high: end(target.high) };
}

/** A line an arm that has a target: where the mean of its strokes lies against it, by the mean's 95 % interval. */
export function sayTargets(
  targets: readonly Target[],
  row: MeasureComparison,
): { arm: Arm; text: string; words: string }[] {
  const said = (['left', 'right'] as const).flatMap((arm) => {
    const target = targetFor(targets, row.measure, arm);
    return target ? [{ arm, target }] : [];
  });
  return said.map(({ arm, target }, at) => ({
    arm,
    text: `Target ${sayBand(target)}: ${arm} ${relation(row, arm, target)}`,
    // The words of one target for both arms stand once, after the last line.
    words: said[at + 1]?.target === target ? '' : target.words,
  }));
}

function relation(row: MeasureComparison, arm: Arm, band: Band): string {
  const { mean, interval, marking } = row[arm];
  if (mean === null) return 'not measured';
  const found = interval
    ? relationToBand(mean, interval, band)
    : // One stroke: only what its marking leaves open is known.
      marking !== null && figureAgainstBand(mean, marking, band);
  return found && found.ok ? sayRelation(found.value, row.unit, null) : 'not measured well enough to say';
}
