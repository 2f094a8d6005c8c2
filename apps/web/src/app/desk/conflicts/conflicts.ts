import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Notices } from '../../core/notices';
import { problemOf } from '../../core/api/problem-of';
import { DeskSaving } from '../saving/desk-saving';
import type { Held } from '../saving/outbox';
import type { DeskState } from '../state/desk-state';
import { frameOfHeld, nameHeld, sayVersion } from './held-words';

/** What could not be saved as it is: both versions side by side, and the coach decides. Nothing is overwritten unseen. */
@Component({
  selector: 'st-conflicts',
  template: `
    @for (one of shown(); track one.held.change.thing) {
      <section [attr.aria-label]="one.name">
        <h2>{{ one.name }}</h2>
        <p>{{ one.held.words }}</p>
        <dl>
          <div>
            <dt>Yours</dt>
            <dd>{{ one.mine }}</dd>
          </div>
          @if (one.theirs !== null) {
            <div>
              <dt>Theirs</dt>
              <dd>{{ one.theirs }}</dd>
            </div>
          }
        </dl>
        <p class="ways">
          @if (one.frame !== null) {
            <button type="button" (click)="state().goTo(one.frame)">Go to frame {{ one.frame }}</button>
          }
          <button type="button" class="main" (click)="saving.keepMine(one.held)">
            {{ one.theirs === null ? 'Send again' : 'Keep yours' }}
          </button>
          <button type="button" (click)="takeTheirs(one.held)">
            {{ one.theirs === null ? 'Give the change up' : 'Take theirs' }}
          </button>
        </p>
      </section>
    }
  `,
  styleUrl: './conflicts.scss',
  host: { role: 'region', 'aria-label': 'Changes to decide' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Conflicts {
  protected readonly saving = inject(DeskSaving);
  private readonly notices = inject(Notices);

  readonly state = input.required<DeskState>();

  protected readonly shown = computed(() =>
    this.saving.held().map((held) => ({
      held,
      name: nameHeld(held, this.state()),
      frame: frameOfHeld(held),
      mine: sayVersion(held.change.wanted, this.state()),
      theirs: held.theirs && sayVersion(held.theirs.wanted, this.state()),
    })),
  );

  protected takeTheirs(held: Held): void {
    this.saving.takeTheirs(held).catch((error: unknown) => this.notices.warn(problemOf(error).detail));
  }
}
