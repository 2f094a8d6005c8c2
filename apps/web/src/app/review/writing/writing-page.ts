import { LiveAnnouncer } from '@angular/cdk/a11y';
import {
  CdkDrag,
  CdkDragHandle,
  CdkDropList,
  moveItemInArray,
  type CdkDragDrop,
} from '@angular/cdk/drag-drop';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DOCUMENT,
  effect,
  inject,
  Injector,
  input,
  afterNextRender,
  signal,
  untracked,
} from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { addSnippet, listObservations, listSnippets } from '@stillstroke/contract/review-lists';
import { deleteReview, type FindingKind } from '@stillstroke/contract/reviews';
import { Api, apiResource } from '../../core/api/api';
import { problemOf } from '../../core/api/problem-of';
import { Notices } from '../../core/notices';
import { PageTitle } from '../../core/page-title';
import { SignInState } from '../../core/sign-in/sign-in-state';
import { Ask } from '../../ui/ask/ask';
import { EmptyState } from '../../ui/empty-state';
import { LoadingLines } from '../../ui/loading-lines';
import { ProblemMessage } from '../../ui/problem-message';
import { sayDate } from '../../ui/say-date';
import { DraftReview } from '../draft/draft-review';
import { FindingEditor } from './finding-editor';
import { KeptLists } from './kept-lists';
import { whatIsMissing } from './what-is-missing';

/** Where a coach writes a review: findings in the order in which they are told, saved as they are typed. */
@Component({
  selector: 'st-writing-page',
  imports: [
    CdkDrag,
    CdkDragHandle,
    CdkDropList,
    EmptyState,
    FindingEditor,
    LoadingLines,
    MatButtonModule,
    ProblemMessage,
    RouterLink,
  ],
  providers: [DraftReview],
  templateUrl: './writing-page.html',
  styleUrl: './writing-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class WritingPage {
  private readonly announcer = inject(LiveAnnouncer);
  private readonly api = inject(Api);
  private readonly ask = inject(Ask);
  private readonly document = inject(DOCUMENT);
  private readonly injector = inject(Injector);
  private readonly lists = inject(KeptLists);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);
  private readonly signIn = inject(SignInState);
  private readonly title = inject(PageTitle);
  protected readonly draft = inject(DraftReview);

  readonly reviewId = input.required<string>();

  protected readonly fault = signal<unknown>(null);
  private readonly observationsRead = apiResource(listObservations, () => ({}));
  private readonly snippetsRead = apiResource(listSnippets, () => ({}));
  protected readonly observations = computed(() =>
    this.observationsRead.hasValue() ? this.observationsRead.value().items : [],
  );
  protected readonly snippets = computed(() =>
    this.snippetsRead.hasValue() ? this.snippetsRead.value().items : [],
  );
  protected readonly date = computed(() => {
    const date = this.draft.review()?.sessionDate;
    return date ? sayDate(date) : null;
  });
  protected readonly attention = computed(() => !['saved', 'saving'].includes(this.draft.state().kind));
  protected readonly missing = computed(() => whatIsMissing(this.draft.findings()));

  constructor() {
    effect(() => {
      const id = this.reviewId();
      // Opening reads and writes the draft's own state, which must not open it again.
      untracked(() => void this.open(id));
    });
    effect(() => {
      const name = this.draft.review()?.athleteName;
      if (name) this.title.show(`Review for ${name}`);
    });
  }

  protected heldOf(findingId: string) {
    return this.draft.held().find(({ edit }) => edit.findingId === findingId) ?? null;
  }

  protected reopen(): void {
    void this.open(this.reviewId());
  }

  protected async add(kind: FindingKind): Promise<void> {
    const id = await this.draft.add(kind);
    if (id) this.focusLater(`#finding-${id} textarea`);
  }

  protected dropped({ previousIndex, currentIndex }: CdkDragDrop<unknown>): void {
    if (previousIndex !== currentIndex) void this.move(previousIndex, currentIndex);
  }

  protected async move(from: number, to: number): Promise<void> {
    const order = this.draft.findings().map(({ known }) => known.id);
    const moved = order[from];
    if (moved === undefined || to < 0 || to >= order.length) return;
    moveItemInArray(order, from, to);
    await this.draft.reorder(order);
    void this.announcer.announce(`Finding is now number ${to + 1} of ${order.length}.`);
    const way = to < from ? 'earlier' : 'later';
    this.focusLater(`#finding-${moved} .${way}:not(:disabled), #finding-${moved} .move:not(:disabled)`);
  }

  protected async remove(findingId: string, number: number): Promise<void> {
    const sure = await this.ask.confirm({
      title: `Take finding ${number} out of the review?`,
      words: 'Its words, readings and pictures go with it.',
      action: 'Take it out',
    });
    if (sure) await this.draft.remove(findingId);
  }

  protected keepText(words: string): void {
    this.api.call(addSnippet, { body: { words } }).subscribe({
      next: () => {
        this.snippetsRead.reload();
        this.notices.say('Kept with your texts.');
      },
      error: (error: unknown) => this.notices.warn(problemOf(error).detail),
    });
  }

  protected async changeTexts(): Promise<void> {
    await this.lists.texts();
    this.snippetsRead.reload();
  }

  protected async changeObservations(): Promise<void> {
    await this.lists.observations();
    this.observationsRead.reload();
    await this.draft.reload().catch(() => undefined);
  }

  protected async preview(): Promise<void> {
    await this.draft.flush();
    await this.router.navigate(['/reviews', this.reviewId()]);
  }

  protected async send(): Promise<void> {
    const review = this.draft.review();
    if (!review) return;
    const sure = await this.ask.confirm({
      title: `Send the review to ${review.athleteName}?`,
      words:
        'From then on it stays as it is: what you change on films, marks or targets afterwards changes nothing in it.',
      action: 'Send the review',
    });
    if (!sure || !(await this.draft.send())) return;
    this.notices.say(`The review is sent. ${review.athleteName} can read it now.`);
    await this.router.navigate(['/reviews', review.id]);
  }

  protected async throwAway(): Promise<void> {
    const review = this.draft.review();
    if (!review) return;
    const sure = await this.ask.confirm({
      title: `Throw the draft for ${review.athleteName} away?`,
      words: 'Its findings and pictures go for good. Films and marks stay.',
      action: 'Throw the draft away',
    });
    if (!sure) return;
    const { id, version, sessionId, athleteId } = review;
    this.api.call(deleteReview, { params: { id }, query: { version } }).subscribe({
      next: () => {
        for (const { known } of this.draft.findings()) this.draft.forget(known.id);
        void this.router.navigate(sessionId ? ['/sessions', sessionId] : ['/athletes', athleteId]);
      },
      error: (error: unknown) => {
        this.notices.warn(problemOf(error).detail);
        void this.draft.reload().catch(() => undefined);
      },
    });
  }

  private async open(reviewId: string): Promise<void> {
    const user = this.signIn.user();
    if (!user) return;
    this.fault.set(null);
    try {
      await this.draft.open(reviewId, user);
      const place = this.document.location.hash.slice(1);
      if (place) this.focusLater(`#${CSS.escape(place)}`);
    } catch (error) {
      this.fault.set(error);
    }
  }

  private focusLater(selector: string): void {
    afterNextRender(
      () => {
        const found = this.document.querySelector<HTMLElement>(selector);
        found?.focus();
        found?.scrollIntoView({ block: 'nearest' });
      },
      { injector: this.injector },
    );
  }
}
