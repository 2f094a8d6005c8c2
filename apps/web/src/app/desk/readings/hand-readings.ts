import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import type { HandPath, HandReading } from '@stillstroke/geometry/measures/hand-path';
import type { Outcome } from '@stillstroke/geometry/outcome';
import type { Explain } from '../../ui/explain/explanation';
import { How } from '../../ui/explain/how';
import { sayReason } from '../../ui/figure/reason-words';
import { sayMetres } from '../../ui/figure/say-metres';
import type { DeskExplainer } from './desk-explainer';

/** Reach and depth of the hand of the current stroke in metres, where the clip has a scale. */
@Component({
  selector: 'st-hand-readings',
  imports: [How],
  template: `
    <h2>In metres</h2>
    @for (row of rows(); track row.name) {
      <p>
        {{ row.name }}
        @if (row.read; as read) {
          <button type="button" class="link" (click)="goTo.emit(read.frame)">
            {{ row.text }} at frame {{ read.frame }}
          </button>
          <st-how [about]="row.name" [explain]="row.explain" />
        } @else {
          <span class="quiet">{{ row.text }}</span>
        }
      </p>
    }
    <p class="quiet">
      From the shoulder, in the plane of the scale. Nearer or farther than that plane, lengths are off by a
      few percent: not for setting left against right.
    </p>
  `,
  styleUrl: './hand-readings.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HandReadings {
  readonly path = input.required<HandPath>();

  readonly explainer = input<DeskExplainer | null>(null);

  readonly goTo = output<number>();

  protected readonly rows = computed(() => [
    { ...rowOf('Reach ahead at the entry', this.path().reachAtEntry), explain: this.explain('reachAtEntry') },
    { ...rowOf('Deepest hand', this.path().handDepth), explain: this.explain('handDepth') },
  ]);

  private explain(name: 'reachAtEntry' | 'handDepth'): Explain {
    return () => this.explainer()?.hand(name) ?? null;
  }
}

function rowOf(name: string, found: Outcome<HandReading>) {
  if (!found.ok) return { name, read: null, text: sayReason(found.reason) };
  return { name, read: found.value, text: sayMetres(found.value.metres, found.value.uncertaintyM) };
}
