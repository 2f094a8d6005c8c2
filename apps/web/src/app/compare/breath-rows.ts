import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { BreathComparison, Comparison } from '@stillstroke/contract/comparison';
import { How } from '../ui/explain/how';
import { formatFigure } from '../ui/figure/format-figure';
import { measureWords } from '../ui/figure/measure-words';
import { sayBreathVerdict } from './breath-words';
import { explainBreath } from './explain-difference';

const groups = [
  { whose: 'left', title: 'Left arm' },
  { whose: 'right', title: 'Right arm' },
  { whose: 'together', title: 'Both arms, each compared with itself' },
] as const;

/** Breathing strokes against the others: per measure what each arm shows, and both together. */
@Component({
  selector: 'st-breath-rows',
  imports: [How],
  templateUrl: './breath-rows.html',
  styleUrl: './breath-rows.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BreathRows {
  readonly breath = input.required<Comparison['breath']>();

  protected readonly measures = computed(() => {
    const breath = this.breath();
    return breath.together.map(({ measure }) => ({
      measure,
      words: measureWords[measure],
      rows: groups.flatMap(({ whose, title }) => {
        const row = breath[whose].find((each) => each.measure === measure);
        if (!row) return [];
        return [
          {
            title,
            means: sayMeans(row),
            said: sayBreathVerdict(row),
            settled: row.verdict === 'breathing-larger' || row.verdict === 'others-larger',
            about: `${measureWords[measure].name}, ${title.toLowerCase()}, breathing strokes against the others`,
            explain: () => explainBreath(row, whose),
          },
        ];
      }),
    }));
  });
}

function sayMeans({ breathing, others, unit }: BreathComparison): string {
  const say = ({ mean, count }: BreathComparison['others']) =>
    mean === null ? `${count}` : `${formatFigure(mean, unit)} over ${count}`;
  return `breathing ${say(breathing)}, others ${say(others)}`;
}
