import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { createReview, listReviews, type ReviewSummary } from '@stillstroke/contract/reviews';
import { Api, apiResource } from '../../core/api/api';
import { problemOf } from '../../core/api/problem-of';
import { Notices } from '../../core/notices';
import { SignInState } from '../../core/sign-in/sign-in-state';
import { ProblemMessage } from '../../ui/problem-message';
import { sayDate } from '../../ui/say-date';

/** Reviews of an athlete, or of one session: what is a draft, what was sent, what is unread or waits for an answer. */
@Component({
  selector: 'st-review-list',
  imports: [MatButtonModule, ProblemMessage, RouterLink],
  template: `
    @if (shows()) {
      <div class="head">
        <h2 [id]="headingId">
          Reviews
          @if (unread() > 0) {
            <span class="mark">{{ unread() }} unread</span>
          }
        </h2>
        @if (writes() && sessionId()) {
          <button matButton="outlined" type="button" [disabled]="busy()" (click)="begin()">
            Write a review
          </button>
        }
      </div>
      @if (read.error()) {
        <st-problem-message [error]="read.error()" (retry)="read.reload()" />
      } @else if (items().length > 0) {
        <ul class="st-card" [attr.aria-labelledby]="headingId">
          @for (item of items(); track item.id) {
            <li>
              <a [routerLink]="item.address">{{ item.name }}</a>
              @if (item.mark) {
                <span class="mark">{{ item.mark }}</span>
              }
              <span class="st-quiet st-small">{{ item.facts }}</span>
              @if (item.focus) {
                <span class="focus">{{ item.focus }}</span>
              }
            </li>
          }
        </ul>
      } @else if (read.hasValue()) {
        <p class="st-quiet none">
          {{ sessionId() ? 'No review of this session yet.' : 'No review yet.' }}
        </p>
      }
    }
  `,
  styles: `
    :host {
      display: block;
    }

    .head {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      justify-content: space-between;
      gap: 8px;
      margin-top: 22px;
    }

    h2 {
      margin: 0;
      font-size: 1.125rem;
      font-weight: 600;
    }

    .mark {
      display: inline-block;
      padding: 1px 10px;
      border-radius: 10px;
      background: var(--st-deep-water);
      color: #fff;
      font-size: 0.8125rem;
      font-weight: 600;
    }

    ul {
      margin: 10px 0 0;
      padding-block: 4px;
      list-style: none;
    }

    li {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 0 10px;
      min-height: 44px;
      padding: 4px 0;
    }

    li + li {
      border-top: 1px solid var(--st-card-edge);
    }

    a {
      color: var(--st-deep-water);
      font-weight: 600;
      text-underline-offset: 3px;
    }

    .focus {
      overflow: hidden;
      flex: 1 1 100%;
      max-width: 100%;
      text-overflow: ellipsis;
      white-space: nowrap;
    }

    .none {
      margin: 6px 0 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ReviewList {
  private readonly api = inject(Api);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);
  private readonly user = inject(SignInState).user;

  readonly athleteId = input.required<string>();
  readonly sessionId = input<string>();

  protected readonly headingId = 'reviews-heading';
  protected readonly busy = signal(false);
  protected readonly read = apiResource(listReviews, () => ({
    params: { id: this.athleteId() },
    query: { limit: 50, sessionId: this.sessionId() },
  }));
  protected readonly writes = computed(() => ['admin', 'coach'].includes(this.user()?.role ?? ''));
  private readonly own = computed(() => this.user()?.athleteId === this.athleteId());
  private readonly list = computed(() => (this.read.hasValue() ? this.read.value() : null));
  protected readonly unread = computed(() =>
    this.own() ? (this.list()?.items.filter(({ unread }) => unread).length ?? 0) : 0,
  );
  /** To a reader without any there is nothing to say on a session's page. */
  protected readonly shows = computed(
    () => this.writes() || !this.sessionId() || (this.list()?.total ?? 0) > 0,
  );
  protected readonly items = computed(() => (this.list()?.items ?? []).map((item) => this.row(item)));

  protected begin(): void {
    const sessionId = this.sessionId();
    if (!sessionId) return;
    this.busy.set(true);
    const id = crypto.randomUUID();
    this.api.call(createReview, { params: { id: this.athleteId() }, body: { sessionId, id } }).subscribe({
      next: () => void this.router.navigate(['/reviews', id, 'write']),
      error: (error: unknown) => {
        this.busy.set(false);
        this.notices.warn(problemOf(error).detail);
      },
    });
  }

  private row(item: ReviewSummary) {
    const { id, state, sessionDate, findingCount, authorName, sentAt, createdAt, readAt } = item;
    const draft = state === 'draft';
    const day = sayDate((sentAt ?? createdAt).slice(0, 10));
    const of = sessionDate && !this.sessionId() ? ` of ${sayDate(sessionDate)}` : '';
    const findings = findingCount === 1 ? '1 finding' : `${findingCount} findings`;
    return {
      id,
      address: draft ? ['/reviews', id, 'write'] : ['/reviews', id],
      name: draft ? `Draft${of}` : `Review${of}`,
      mark: this.markOf(item),
      focus: item.mainFocus,
      facts: [
        draft ? `begun ${day}` : `sent ${day}`,
        ...(authorName ? [authorName] : []),
        findings,
        ...(draft || this.own() ? [] : [readAt ? 'opened' : 'not opened yet']),
      ].join(' · '),
    };
  }

  private markOf({ unread, openQuestions }: ReviewSummary): string | null {
    if (this.own()) return unread ? 'Unread' : null;
    if (openQuestions === 0) return null;
    return openQuestions === 1 ? '1 question' : `${openQuestions} questions`;
  }
}
