import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import type { Measure } from '@stillstroke/contract/measures';
import type { Coordination } from '@stillstroke/geometry/events/coordination';
import type { StrokeMeasures } from '@stillstroke/geometry/measures/stroke-measures';
import type { Outcome } from '@stillstroke/geometry/outcome';
import type { Explain } from '../../ui/explain/explanation';
import { How } from '../../ui/explain/how';
import { formatFigure, formatUncertainty, type Unit } from '../../ui/figure/format-figure';
import { sayReason } from '../../ui/figure/reason-words';
import { sayCoordination } from '../../ui/figure/say-coordination';
import type { DeskExplainer } from './desk-explainer';

/** Times of the stroke that the frame lies in, and what both arms of the clip do together. */
@Component({
  selector: 'st-timing-readings',
  imports: [How],
  template: `
    @if (rows(); as shown) {
      <section aria-labelledby="timing-title">
        <h2 id="timing-title">Timing of this stroke</h2>
        <dl>
          @for (row of shown; track row.name) {
            <div>
              <dt>{{ row.name }}</dt>
              @if (row.value !== null) {
                <dd>
                  <strong>{{ row.value }}</strong> <span class="quiet">{{ row.spread }}</span>
                  <st-how [about]="row.name" [explain]="row.explain" />
                </dd>
              } @else {
                <dd class="quiet why">{{ row.why }}</dd>
              }
            </div>
          }
        </dl>
      </section>
    }
    <section aria-labelledby="both-arms-title">
      <h2 id="both-arms-title">Both arms, this clip</h2>
      <p>
        {{ together().headline }}
        @if (coordination().ok) {
          <st-how about="Index of coordination" [explain]="explainCoordination" />
        }
      </p>
      <p class="quiet">{{ together().detail }}</p>
      @if (passages().length > 0) {
        <p class="quiet">
          From the exits on
          @for (frame of passages(); track frame) {
            <button type="button" class="link" (click)="goTo.emit(frame)">frame {{ frame }}</button
            >{{ $last ? '.' : ', ' }}
          }
        </p>
      }
    </section>
  `,
  styleUrl: './timing-readings.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TimingReadings {
  readonly measures = input.required<StrokeMeasures | null>();
  readonly coordination = input.required<Outcome<Coordination>>();

  readonly explainer = input<DeskExplainer | null>(null);

  readonly goTo = output<number>();

  protected readonly explainCoordination: Explain = () => this.explainer()?.coordination() ?? null;

  protected readonly rows = computed(() => {
    const measures = this.measures();
    if (!measures) return null;
    const { strokeRate, strokeLength, strokeIndex } = measures;
    const rate = strokeRate.ok ? { ...strokeRate.value, value: strokeRate.value.cyclesPerMinute } : null;
    return [
      row(
        'Stroke rate',
        'perMinute',
        rate,
        strokeRate.ok ? '' : strokeRate.reason,
        this.explain('strokeRate'),
      ),
      row(
        'Stroke length',
        'm',
        strokeLength.ok ? strokeLength.value : null,
        strokeLength.ok ? '' : strokeLength.reason,
        this.explain('strokeLength'),
      ),
      row(
        'Stroke index',
        'm2PerS',
        strokeIndex.ok ? strokeIndex.value : null,
        strokeIndex.ok ? '' : strokeIndex.reason,
        this.explain('strokeIndex'),
      ),
    ];
  });
  protected readonly together = computed(() => {
    const read = this.coordination();
    if (!read.ok) {
      return { headline: 'Index of coordination: not measured', detail: `${sayReason(read.reason)}.` };
    }
    const { index, uncertainty, mode, cycles } = read.value;
    // On pages the index is a share like the phases.
    return sayCoordination({
      value: index / 100,
      uncertainty: uncertainty / 100,
      mode,
      count: cycles.length,
    });
  });
  protected readonly passages = computed(() => {
    const read = this.coordination();
    return read.ok ? read.value.cycles.map(({ frames }) => frames[0]) : [];
  });

  private explain(measure: Measure): Explain {
    return () => this.explainer()?.measure(measure) ?? null;
  }
}

function row(
  name: string,
  unit: Unit,
  measured: { readonly value: number; readonly uncertainty: number } | null,
  reason: string,
  explain: Explain,
) {
  if (!measured) return { name, value: null, spread: '', why: sayReason(reason), explain };
  return {
    name,
    value: formatFigure(measured.value, unit, measured.uncertainty),
    spread: formatUncertainty(measured.uncertainty, unit),
    why: '',
    explain,
  };
}
