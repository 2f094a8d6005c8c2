import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  untracked,
} from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { getReview, readReview, type Question } from '@stillstroke/contract/reviews';
import { deleteStill } from '@stillstroke/contract/stills';
import { Api, apiResource } from '../../core/api/api';
import { lastValue } from '../../core/api/last-value';
import { problemOf } from '../../core/api/problem-of';
import { Notices } from '../../core/notices';
import { PageTitle } from '../../core/page-title';
import { SignInState } from '../../core/sign-in/sign-in-state';
import { Ask } from '../../ui/ask/ask';
import { LoadingLines } from '../../ui/loading-lines';
import { ProblemMessage } from '../../ui/problem-message';
import { sayDate, sayInstant } from '../../ui/say-date';
import { CareNote } from '../care-note';
import { FindingView } from './finding-view';

/** A review as it is read: the main focus first, then the rest in the coach's order. Opening it marks it read. */
@Component({
  selector: 'st-reading-page',
  imports: [CareNote, FindingView, LoadingLines, MatButtonModule, ProblemMessage, RouterLink],
  templateUrl: './reading-page.html',
  styleUrl: './reading-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ReadingPage {
  private readonly api = inject(Api);
  private readonly ask = inject(Ask);
  private readonly notices = inject(Notices);
  private readonly title = inject(PageTitle);
  private readonly user = inject(SignInState).user;

  readonly reviewId = input.required<string>();

  protected readonly read = apiResource(getReview, () => ({ params: { id: this.reviewId() } }));
  private readonly last = lastValue(this.read);
  protected readonly review = computed(() => {
    const review = this.last();
    return review?.id === this.reviewId() ? review : null;
  });
  protected readonly own = computed(() => {
    const athleteId = this.user()?.athleteId;
    return athleteId != null && athleteId === this.review()?.athleteId;
  });
  protected readonly writes = computed(() => ['admin', 'coach'].includes(this.user()?.role ?? ''));
  protected readonly may = computed(() => {
    if (this.review()?.state !== 'sent') return 'look';
    return this.own() ? 'ask' : this.writes() ? 'answer' : 'look';
  });
  protected readonly main = computed(
    () => this.review()?.findings.find(({ mainFocus }) => mainFocus) ?? null,
  );
  protected readonly rest = computed(
    () => this.review()?.findings.filter(({ mainFocus }) => !mainFocus) ?? [],
  );
  protected readonly heading = computed(() => {
    const review = this.review();
    if (!review) return 'Review';
    if (!this.own()) return `Review for ${review.athleteName}`;
    return review.sessionDate ? `Your review of ${sayDate(review.sessionDate)}` : 'Your review';
  });
  protected readonly date = computed(() => {
    const date = this.review()?.sessionDate;
    return date ? sayDate(date) : null;
  });
  protected readonly sent = computed(() => {
    const sentAt = this.review()?.sentAt;
    return sentAt ? sayInstant(sentAt) : null;
  });
  protected readonly opened = computed(() => {
    const readAt = this.review()?.readAt;
    return readAt ? `opened ${sayInstant(readAt)}` : 'not opened yet';
  });

  constructor() {
    effect(() => this.title.show(this.heading()));
    effect(() => {
      const id = this.review()?.id;
      if (id && this.own()) untracked(() => this.markRead(id));
    });
  }

  /** Puts what was said into its finding without asking for the whole review. */
  protected place(findingId: string, question: Question): void {
    this.read.update((review) => {
      if (!review) return review;
      const findings = review.findings.map((finding) => {
        if (finding.id !== findingId) return finding;
        const others = finding.questions.filter(({ id }) => id !== question.id);
        const questions = [...others, question].sort((a, b) => a.createdAt.localeCompare(b.createdAt));
        return { ...finding, questions };
      });
      return { ...review, findings };
    });
  }

  protected async removePicture(stillId: string): Promise<void> {
    const stills = this.review()?.findings.flatMap((finding) => finding.stills);
    const still = stills?.find(({ id }) => id === stillId);
    if (!still) return;
    const sure = await this.ask.confirm({
      title: 'Take this picture out for good?',
      words:
        'The review was sent and its words stay. The picture goes from the server and cannot be brought back; in its place the review says that there was one.',
      action: 'Take the picture out',
    });
    if (!sure) return;
    this.api.call(deleteStill, { params: { id: stillId }, query: { version: still.version } }).subscribe({
      next: () => this.read.reload(),
      error: (error: unknown) => this.notices.warn(problemOf(error).detail),
    });
  }

  /** Quietly: what is new stays marked on this page, and the next time it is not. */
  private markRead(id: string): void {
    this.api.call(readReview, { params: { id } }).subscribe({
      error: () => undefined,
    });
  }
}
