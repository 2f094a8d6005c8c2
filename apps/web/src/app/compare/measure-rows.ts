import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { MeasureComparison, Sample } from '@stillstroke/contract/comparison';
import { getStrokeExplanation } from '@stillstroke/contract/explanation';
import type { Measure, Unit } from '@stillstroke/contract/measures';
import type { Target } from '@stillstroke/contract/targets';
import { firstValueFrom } from 'rxjs';
import { Api } from '../core/api/api';
import { explainMeasure } from '../ui/explain/explain-measure';
import type { Explain } from '../ui/explain/explanation';
import { How } from '../ui/explain/how';
import { formatFigure, onScreen, signOf } from '../ui/figure/format-figure';
import { measureWords } from '../ui/figure/measure-words';
import { ArmRail, type RailBand, type RailValue } from '../ui/rail/arm-rail';
import { bandOn, sayTargets } from './target-rows';
import { sayVerdict } from './comparison-sentence';
import { explainDifference } from './explain-difference';

/** Distance between round numbers on a rail. */
const steps: Readonly<Record<Unit, number>> = { share: 10, deg: 20, perMinute: 10, m: 0.5, m2PerS: 0.5 };

/** One row a measure: its name, left and right on a rail, and the verdict in words with its strokes behind it. */
@Component({
  selector: 'st-measure-rows',
  imports: [ArmRail, How, RouterLink],
  templateUrl: './measure-rows.html',
  styleUrl: './measure-rows.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MeasureRows {
  private readonly api = inject(Api);

  readonly rows = input.required<readonly MeasureComparison[]>();

  /** The coach's bands for this athlete. */
  readonly targets = input<readonly Target[]>([]);

  protected readonly shown = computed(() =>
    this.rows()
      .filter(isShown)
      .map((row) => {
        const [left, right] = [railValue(row, 'left'), railValue(row, 'right')];
        const [leftBand, rightBand] = [
          bandOn(this.targets(), row, 'left'),
          bandOn(this.targets(), row, 'right'),
        ];
        const against = sayTargets(this.targets(), row);
        return {
          row,
          words: measureWords[row.measure],
          left,
          right,
          leftBand,
          rightBand,
          against,
          domain: domainOf(
            [left, right],
            [leftBand, rightBand],
            steps[row.unit],
            row.measure === 'elbowAtMidPull' ? 180 : Infinity,
          ),
          suffix: row.unit === 'perMinute' ? '' : signOf[row.unit],
          said: sayVerdict(row),
          settled: row.verdict === 'left-larger' || row.verdict === 'right-larger',
          label: `${measureWords[row.measure].name}: left ${sayMean(row, 'left')}, right ${sayMean(row, 'right')}${against.map(({ text }) => `. ${text}`).join('')}`,
          samples: (['left', 'right'] as const).flatMap((arm) =>
            row[arm].samples.map((sample) => ({
              arm,
              ...sample,
              explain: this.explain(sample, row.measure),
            })),
          ),
          explain: () => explainDifference(row),
        };
      }),
  );

  protected readonly format = formatFigure;

  private explain({ strokeId }: Sample, measure: Measure): Explain {
    return async () =>
      explainMeasure(
        await firstValueFrom(
          this.api.call(getStrokeExplanation, { params: { id: strokeId }, query: { measure } }),
        ),
      );
  }
}

/** Length and index are listed once a distance makes them, the others always, so that one sees what could be measured. */
function isShown({ measure, left, right }: MeasureComparison): boolean {
  const needsDistance = measure === 'strokeLength' || measure === 'strokeIndex';
  return !needsDistance || left.count + right.count > 0;
}

function railValue(row: MeasureComparison, arm: 'left' | 'right'): RailValue | null {
  const { mean, interval } = row[arm];
  if (mean === null) return null;
  const shown = interval && {
    low: onScreen(interval.low, row.unit),
    high: onScreen(interval.high, row.unit),
  };
  return { value: onScreen(mean, row.unit), interval: shown };
}

/** Both ends of the rail, rounded outwards to the step, with room around what is drawn. */
function domainOf(
  values: readonly (RailValue | null)[],
  bands: readonly (RailBand | null)[],
  step: number,
  most: number,
): readonly [number, number] {
  const ends = values.flatMap((value) =>
    value ? [value.value, value.interval?.low ?? value.value, value.interval?.high ?? value.value] : [],
  );
  ends.push(...bands.flatMap((band) => [band?.low ?? [], band?.high ?? []].flat()));
  if (ends.length === 0) return [0, step * 2];
  const low = Math.floor(Math.min(...ends) / step) * step;
  const high = Math.ceil(Math.max(...ends) / step) * step;
  if (low === high) return [low - step, Math.min(most, high + step)];
  // An even number of steps puts the middle tick on a round number; room is added where there is some.
  const odd = ((high - low) / step) % 2 === 1;
  return odd && high + step > most ? [low - step, high] : [low, high + (odd ? step : 0)];
}

function sayMean(row: MeasureComparison, arm: 'left' | 'right'): string {
  const { mean, count } = row[arm];
  return mean === null ? 'not measured' : `${formatFigure(mean, row.unit)} over ${count} strokes`;
}
