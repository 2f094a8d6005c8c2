import { ChangeDetectionStrategy, Component, computed, input, linkedSignal } from '@angular/core';
import { swimSpeed } from '@stillstroke/geometry/events/known-distance';
import { formatFigure, formatUncertainty } from '../../ui/figure/format-figure';
import { sayReason } from '../../ui/figure/reason-words';
import type { DeskState } from '../state/desk-state';

interface Draft {
  readonly metres: number | null;
  readonly uncertaintyM: number;
  readonly fromFrame: number | null;
  readonly toFrame: number | null;
}

/** Where nobody says otherwise: markings of a pool are painted more exactly than they are seen passing. */
const USUAL_UNCERTAINTY_M = 0.05;

/** How far the swimmer travelled between two frames: gives speed, stroke length and stroke index. Can be left out. */
@Component({
  selector: 'st-known-distance',
  templateUrl: './known-distance.html',
  styleUrl: './known-distance.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class KnownDistancePart {
  readonly state = input.required<DeskState>();

  protected readonly stored = computed(() => this.state().setUp.distance());
  /** What is entered so far; follows undo. */
  protected readonly draft = linkedSignal<Draft>(
    () =>
      this.stored() ?? {
        metres: null,
        uncertaintyM: USUAL_UNCERTAINTY_M,
        fromFrame: null,
        toFrame: null,
      },
  );
  protected readonly ends = computed(() => {
    const { fromFrame, toFrame } = this.draft();
    return [
      { key: 'fromFrame' as const, name: 'First frame', frame: fromFrame },
      { key: 'toFrame' as const, name: 'Second frame', frame: toFrame },
    ];
  });
  protected readonly says = computed(() => {
    const [distance, state] = [this.stored(), this.state()];
    if (!distance) return 'Not set: no stroke length and stroke index.';
    const { captureRateFactor } = state.setUp.facts();
    const speed = swimSpeed(distance, state.frameTimesUs(), { captureRateFactor });
    if (!speed.ok) return `No speed: ${sayReason(speed.reason)}.`;
    const { metresPerSecond, standard, durationS } = speed.value;
    return `${formatFigure(metresPerSecond, 'mPerS', standard)} ${formatUncertainty(standard, 'mPerS')}, over ${durationS.toFixed(2)} s of the water.`;
  });

  protected setHere(end: 'fromFrame' | 'toFrame'): void {
    this.enter({ [end]: this.state().frame() });
  }

  protected setMetres(which: 'metres' | 'uncertaintyM', event: Event): void {
    const text = (event.target as HTMLInputElement).value.trim();
    this.enter({ [which]: text === '' ? (which === 'metres' ? null : USUAL_UNCERTAINTY_M) : Number(text) });
  }

  protected takeAway(): void {
    this.state().setUp.setDistance(null);
  }

  /** Saved as soon as all of it is there and can be used; until then it is only here. */
  private enter(part: Partial<Draft>): void {
    const draft = { ...this.draft(), ...part };
    this.draft.set(draft);
    const { metres, uncertaintyM, fromFrame, toFrame } = draft;
    if (metres === null || fromFrame === null || toFrame === null) return;
    this.state().setUp.setDistance({ metres, uncertaintyM, fromFrame, toFrame });
  }
}
