import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { Comparison } from '@stillstroke/contract/comparison';
import type { Explain } from '../ui/explain/explanation';
import { How } from '../ui/explain/how';
import { formatFigure, formatUncertainty } from '../ui/figure/format-figure';
import { sayCoordination } from '../ui/figure/say-coordination';
import { explainCoordination } from './explain-coordination';

const splitNames = {
  all: 'All passages',
  breathing: 'With a breath',
  notBreathing: 'Without a breath',
} as const;

/** What both arms do together: the index of coordination with its mode, apart by breath, and the passages behind it. */
@Component({
  selector: 'st-both-arms',
  imports: [How, RouterLink],
  template: `
    <h2>Both arms together</h2>
    <p class="says">
      {{ said().headline }}
      @if (rows().length > 0) {
        <st-how about="Index of coordination" [explain]="explain" />
      }
    </p>
    <p class="st-quiet">{{ said().detail }}</p>
    @if (rows().length > 0) {
      <dl>
        @for (row of rows(); track row.name) {
          <div>
            <dt>{{ row.name }}</dt>
            <dd>
              <strong>{{ row.value }}</strong> <span class="st-quiet">{{ row.spread }}, {{ row.mode }}</span>
            </dd>
          </div>
        }
      </dl>
      <details>
        <summary>The passages behind it</summary>
        <ul>
          @for (passage of passages(); track passage.strokeId) {
            <li>
              <a [routerLink]="['/clips', passage.clipId]" [queryParams]="{ frame: passage.frame }">
                {{ passage.text }}, from frame {{ passage.frame }}
              </a>
              @if (passage.breath) {
                <span class="st-quiet">with a breath</span>
              }
            </li>
          }
        </ul>
      </details>
    }
  `,
  styleUrl: './both-arms.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BothArms {
  readonly coordination = input.required<Comparison['coordination']>();

  protected readonly explain: Explain = () => explainCoordination(this.coordination().all);

  protected readonly said = computed(() => {
    const { value, uncertainty, mode, passages } = this.coordination().all;
    return sayCoordination(
      value === null || uncertainty === null || mode === null
        ? null
        : { value, uncertainty, mode, count: passages.length },
    );
  });
  protected readonly rows = computed(() => {
    const all = this.coordination();
    const split = all.breathing.value !== null && all.notBreathing.value !== null;
    const names = split ? (['all', 'breathing', 'notBreathing'] as const) : (['all'] as const);
    return names.flatMap((name) => {
      const { value, uncertainty, mode } = all[name];
      if (value === null || uncertainty === null || mode === null) return [];
      return {
        name: splitNames[name],
        value: formatFigure(value, 'share', uncertainty, true),
        spread: formatUncertainty(uncertainty, 'share'),
        mode,
      };
    });
  });
  protected readonly passages = computed(() =>
    this.coordination().all.passages.map((passage) => ({
      ...passage,
      text: `${formatFigure(passage.value, 'share', passage.uncertainty, true)} ${formatUncertainty(passage.uncertainty, 'share')}`,
    })),
  );
}
