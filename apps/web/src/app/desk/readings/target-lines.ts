import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { listTargets } from '@stillstroke/contract/targets';
import type { Measure } from '@stillstroke/contract/measures';
import { measuredByName } from '@stillstroke/geometry/measures/measured-by-name';
import { relationToBand, type Band } from '@stillstroke/geometry/targets/band';
import { apiResource } from '../../core/api/api';
import { unitOf } from '../../ui/figure/format-figure';
import { measuresInOrder, measureWords } from '../../ui/figure/measure-words';
import { sayBand, sayRelation, targetFor } from '../../ui/target/target-words';
import type { DeskState } from '../state/desk-state';
import { isWhole } from '../state/desk-stroke';

/** The coach's targets for the current arm, each with where the current stroke lies against it. Nothing where none is set. */
@Component({
  selector: 'st-target-lines',
  template: `
    @if (lines().length > 0) {
      <section aria-labelledby="targets-title">
        <h2 id="targets-title">Targets, {{ state().arm() }} arm</h2>
        <ul>
          @for (line of lines(); track line.measure) {
            <li>
              <p>
                {{ line.name }} <strong>{{ line.band }}</strong>: {{ line.says }}
              </p>
              <p class="quiet">“{{ line.words }}”</p>
            </li>
          }
        </ul>
      </section>
    } @else if (read.error()) {
      <p class="quiet">Targets could not be read.</p>
    }
  `,
  styleUrl: './target-lines.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TargetLines {
  readonly state = input.required<DeskState>();

  private readonly athleteId = computed(() => this.state().clip().athleteId);
  protected readonly read = apiResource(listTargets, () => ({ params: { id: this.athleteId() } }));
  protected readonly lines = computed(() => {
    const targets = this.read.hasValue() ? this.read.value().items : [];
    return measuresInOrder.flatMap((measure) => {
      const target = targetFor(targets, measure, this.state().arm());
      if (!target) return [];
      const { name } = measureWords[measure];
      return [
        { measure, name, band: sayBand(target), words: target.words, says: this.relation(measure, target) },
      ];
    });
  });

  private relation(measure: Measure, band: Band): string {
    const state = this.state();
    const stroke = state.currentStroke();
    const measures = stroke && state.readings.measures().get(stroke.id);
    if (!stroke || !isWhole(stroke) || !measures) return 'no stroke of this arm here';
    const measured = measuredByName(measure, measures);
    if (!measured.ok) return 'not measured on this stroke';
    const { value, uncertainty, interval } = measured.value;
    const relation = relationToBand(value, interval, band);
    return relation.ok
      ? sayRelation(relation.value, unitOf[measure], uncertainty)
      : 'not measured on this stroke';
  }
}
