import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatButtonToggleModule } from '@angular/material/button-toggle';
import { Router, RouterLink } from '@angular/router';
import { getClip } from '@stillstroke/contract/clips';
import { getAgreement, listClipRounds, startRound } from '@stillstroke/contract/repeatability';
import { Api, apiResource } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { LoadingLines } from '../ui/loading-lines';
import { ProblemMessage } from '../ui/problem-message';
import { AgreementCard } from './agreement-card';
import { RoundsList } from './rounds-list';

/** Before a round on a clip: what it is for, how many frames; and how those agree who have marked it. */
@Component({
  selector: 'st-start-page',
  imports: [
    AgreementCard,
    LoadingLines,
    MatButtonModule,
    MatButtonToggleModule,
    ProblemMessage,
    RouterLink,
    RoundsList,
  ],
  templateUrl: './start-page.html',
  styleUrl: './start-page.scss',
  host: { class: 'st-page' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StartPage {
  private readonly api = inject(Api);
  private readonly router = inject(Router);

  readonly clipId = input.required<string>();

  protected readonly clip = apiResource(getClip, () => ({ params: { id: this.clipId() } }));
  protected readonly rounds = apiResource(listClipRounds, () => ({ params: { id: this.clipId() } }));
  protected readonly agreement = apiResource(getAgreement, () => ({ params: { id: this.clipId() } }));

  protected readonly counts = [5, 10, 20] as const;
  protected readonly frames = signal<number>(10);
  protected readonly starting = signal(false);
  protected readonly refused = signal<string | null>(null);
  protected readonly open = computed(() =>
    (this.rounds.hasValue() ? this.rounds.value().items : []).filter(({ finishedAt }) => finishedAt === null),
  );
  protected readonly pairs = computed(() => (this.agreement.hasValue() ? this.agreement.value().items : []));

  protected start(): void {
    this.starting.set(true);
    this.refused.set(null);
    this.api.call(startRound, { params: { id: this.clipId() }, body: { frames: this.frames() } }).subscribe({
      next: ({ id }) => void this.router.navigate(['/marking-rounds', id]),
      error: (error: unknown) => {
        this.starting.set(false);
        this.refused.set(problemOf(error).detail);
      },
    });
  }
}
