import { DatePipe } from '@angular/common';
import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { deleteRound, type MarkingRound } from '@stillstroke/contract/repeatability';
import { Api } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { Notices } from '../core/notices';
import { Ask } from '../ui/ask/ask';
import { sayRound } from './marking-words';

/** Rounds of marking again: those to go on with, and those that the figures come from. */
@Component({
  selector: 'st-rounds-list',
  imports: [DatePipe, MatButtonModule, RouterLink],
  template: `
    <ul>
      @for (round of rounds(); track round.id) {
        <li>
          <div>
            <p>
              {{ round.createdAt | date: 'd MMM y' }},
              <a [routerLink]="['/clips', round.clipId]">{{ round.clipName }}</a>
              <span class="st-quiet"> of {{ round.athleteName }}</span>
            </p>
            <p class="st-small st-quiet">{{ sayRound(round) }}</p>
          </div>
          <div class="acts">
            @if (round.finishedAt === null) {
              <a matButton="outlined" [routerLink]="['/marking-rounds', round.id]">Go on</a>
            }
            <button
              matButton
              type="button"
              [attr.aria-label]="'Throw away the round on ' + round.clipName"
              (click)="drop(round)"
            >
              Throw away
            </button>
          </div>
        </li>
      }
    </ul>
  `,
  styles: `
    ul {
      margin: 10px 0 0;
      padding: 0;
      list-style: none;
    }

    li {
      display: flex;
      flex-wrap: wrap;
      gap: 4px 16px;
      align-items: center;
      justify-content: space-between;
      padding: 10px 0;
      border-top: 1px solid var(--st-card-edge);
    }

    p {
      margin: 0;
      overflow-wrap: anywhere;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RoundsList {
  private readonly api = inject(Api);
  private readonly ask = inject(Ask);
  private readonly notices = inject(Notices);

  readonly rounds = input.required<readonly MarkingRound[]>();
  readonly changed = output();

  protected readonly sayRound = sayRound;

  protected async drop(round: MarkingRound): Promise<void> {
    const counts = round.finishedAt !== null;
    const sure = await this.ask.confirm({
      title: 'Throw this round away?',
      words: counts
        ? 'Its frames no longer count, and the uncertainties of your clips follow. The marks on the clip stay.'
        : 'What you have marked again in it is lost. The marks on the clip stay.',
      action: 'Throw away',
    });
    if (!sure) return;
    this.api.call(deleteRound, { params: { id: round.id } }).subscribe({
      next: () => this.changed.emit(),
      error: (error: unknown) => this.notices.warn(problemOf(error).detail),
    });
  }
}
