import {
  ChangeDetectionStrategy,
  Component,
  effect,
  inject,
  input,
  numberAttribute,
  signal,
  untracked,
} from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { getClip } from '@stillstroke/contract/clips';
import { createReview, listReviews, type ReviewSummary } from '@stillstroke/contract/reviews';
import { firstValueFrom } from 'rxjs';
import { Api } from '../../core/api/api';
import { problemOf } from '../../core/api/problem-of';
import { LoadingLines } from '../../ui/loading-lines';
import { ProblemMessage } from '../../ui/problem-message';
import { sayInstant } from '../../ui/say-date';

/** A frame of a clip is to go into a review: into the draft that there is, one of several, or one that is begun now. */
@Component({
  selector: 'st-use-frame-page',
  imports: [LoadingLines, MatButtonModule, ProblemMessage, RouterLink],
  template: `
    <div class="st-page">
      <h1>Use frame {{ frame() }} in a review</h1>
      @if (fault()) {
        <st-problem-message [error]="fault()" (retry)="open()" />
      } @else if (drafts(); as drafts) {
        @if (drafts.length > 0) {
          <p class="st-lead">This session has more than one draft. Which is it for?</p>
          <ul>
            @for (draft of drafts; track draft.id) {
              <li>
                <a matButton="outlined" [routerLink]="['/reviews', draft.id, 'still']" [queryParams]="place()"
                  >The draft of {{ draft.begun }}</a
                >
              </li>
            }
          </ul>
        } @else {
          <p class="st-lead">There is no draft for this session yet.</p>
          <button matButton="filled" type="button" (click)="begin()">Begin a review</button>
        }
        <p>
          <a matButton [routerLink]="['/clips', clip()]" [queryParams]="{ frame: frame() }"
            >Back to the Desk</a
          >
        </p>
      } @else {
        <div class="st-card"><st-loading-lines [count]="3" /></div>
      }
    </div>
  `,
  styles: `
    ul {
      display: grid;
      gap: 8px;
      justify-items: start;
      padding: 0;
      list-style: none;
    }

    .st-lead {
      margin-bottom: 14px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UseFramePage {
  private readonly api = inject(Api);
  private readonly router = inject(Router);

  readonly clip = input.required<string>();
  readonly frame = input(0, { transform: (value: unknown) => numberAttribute(value, 0) });

  protected readonly fault = signal<unknown>(null);
  protected readonly drafts = signal<readonly (ReviewSummary & { begun: string })[] | null>(null);
  private owner: { athleteId: string; sessionId: string } | null = null;

  constructor() {
    effect(() => {
      this.clip();
      untracked(() => void this.open());
    });
  }

  protected place() {
    return { clip: this.clip(), frame: this.frame() };
  }

  protected async open(): Promise<void> {
    this.fault.set(null);
    try {
      const { athleteId, sessionId } = await firstValueFrom(
        this.api.call(getClip, { params: { id: this.clip() } }),
      );
      this.owner = { athleteId, sessionId };
      const call = this.api.call(listReviews, { params: { id: athleteId }, query: { sessionId, limit: 50 } });
      const drafts = (await firstValueFrom(call)).items.filter(({ state }) => state === 'draft');
      const [only] = drafts;
      if (drafts.length === 1 && only) await this.goOn(only.id);
      else this.drafts.set(drafts.map((draft) => ({ ...draft, begun: sayInstant(draft.createdAt) })));
    } catch (error) {
      this.fault.set(error);
    }
  }

  protected async begin(): Promise<void> {
    const { owner } = this;
    if (!owner) return;
    const id = crypto.randomUUID();
    try {
      const params = { id: owner.athleteId };
      await firstValueFrom(this.api.call(createReview, { params, body: { sessionId: owner.sessionId, id } }));
      await this.goOn(id);
    } catch (error) {
      this.fault.set(problemOf(error).detail);
    }
  }

  private goOn(reviewId: string): Promise<boolean> {
    return this.router.navigate(['/reviews', reviewId, 'still'], {
      queryParams: this.place(),
      replaceUrl: true,
    });
  }
}
