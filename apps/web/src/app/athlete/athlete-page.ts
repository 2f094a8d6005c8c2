import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  linkedSignal,
  signal,
  viewChild,
} from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { getAthlete, updateAthlete, type Athlete } from '@stillstroke/contract/athletes';
import { listSessions, type Session } from '@stillstroke/contract/sessions';
import { Api, apiResource } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { Notices } from '../core/notices';
import { PageTitle } from '../core/page-title';
import { SignInState } from '../core/sign-in/sign-in-state';
import { ReviewList } from '../review/list/review-list';
import { NewSessionCard } from '../session/new-session-card';
import { Ask } from '../ui/ask/ask';
import { DeletedList } from '../ui/deleted-list';
import { EmptyState } from '../ui/empty-state';
import { LoadingLines } from '../ui/loading-lines';
import { ProblemMessage } from '../ui/problem-message';
import { TakeAlong } from '../take-along/take-along';
import { SessionCard } from './session-card';
import { TargetsCard } from './targets-card';
import { TrendCard } from './trend-card';

const sessionsAtATime = 10;

interface Shown {
  readonly sessions: readonly Session[];
  readonly nextCursor: string | null;
  readonly total: number;
}

/** One athlete: how the arms have gone over time, and the sessions, newest first. The athlete's own start page as well. */
@Component({
  selector: 'st-athlete-page',
  imports: [
    DeletedList,
    EmptyState,
    LoadingLines,
    MatButtonModule,
    NewSessionCard,
    ProblemMessage,
    ReviewList,
    RouterLink,
    SessionCard,
    TargetsCard,
    TrendCard,
  ],
  templateUrl: './athlete-page.html',
  styleUrl: './athlete-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AthletePage {
  private readonly api = inject(Api);
  private readonly ask = inject(Ask);
  private readonly dialog = inject(MatDialog);
  private readonly notices = inject(Notices);
  private readonly takingAlong = inject(TakeAlong);
  private readonly title = inject(PageTitle);
  private readonly user = inject(SignInState).user;

  readonly athleteId = input.required<string>();
  private readonly targetsCard = viewChild(TargetsCard);

  protected readonly read = apiResource(getAthlete, () => ({ params: { id: this.athleteId() } }));
  protected readonly athlete = computed(() => (this.read.hasValue() ? this.read.value() : null));
  protected readonly firstSessions = apiResource(listSessions, () => ({
    params: { id: this.athleteId() },
    query: { limit: sessionsAtATime },
  }));
  /** Starts with the newest and grows by older ones when asked. */
  protected readonly shown = linkedSignal<Shown | null>(() => {
    if (!this.firstSessions.hasValue()) return null;
    const { items, nextCursor, total } = this.firstSessions.value();
    return { sessions: items, nextCursor, total };
  });
  protected readonly readingOlder = signal(false);
  protected readonly canChange = computed(() => ['admin', 'coach'].includes(this.user()?.role ?? ''));
  protected readonly own = computed(() => this.user()?.athleteId === this.athleteId());

  constructor() {
    effect(() => {
      const name = this.athlete()?.name;
      if (name) this.title.show(name);
    });
  }

  protected broughtBack(): void {
    this.firstSessions.reload();
    this.targetsCard()?.reload();
  }

  protected showOlder(): void {
    const shown = this.shown();
    if (!shown?.nextCursor || this.readingOlder()) return;
    this.readingOlder.set(true);
    const query = { cursor: shown.nextCursor, limit: sessionsAtATime };
    this.api.call(listSessions, { params: { id: this.athleteId() }, query }).subscribe({
      next: ({ items, nextCursor, total }) => {
        this.readingOlder.set(false);
        this.shown.set({ sessions: [...shown.sessions, ...items], nextCursor, total });
      },
      error: (error: unknown) => {
        this.readingOlder.set(false);
        this.notices.warn(problemOf(error).detail);
      },
    });
  }

  protected takeAlong({ id, name }: Athlete): void {
    void this.takingAlong.takeAlong({ kind: 'athlete', id, name: this.own() ? 'your figures' : name });
  }

  protected async edit(athlete: Athlete): Promise<void> {
    const { EditAthleteDialog } = await import('./edit-athlete-dialog');
    this.dialog
      .open<unknown, Athlete, Athlete>(EditAthleteDialog, { data: athlete, width: '30rem' })
      .afterClosed()
      .subscribe((changed) => {
        if (changed) this.read.set(changed);
      });
  }

  protected async deactivate(athlete: Athlete): Promise<void> {
    const sure = await this.ask.confirm({
      title: `Deactivate ${athlete.name}?`,
      words: 'They leave the squad’s list. Sessions, clips and marks stay, and you can take them back in.',
      action: 'Deactivate',
    });
    if (sure) this.setDeactivated(athlete, true);
  }

  protected setDeactivated(athlete: Athlete, deactivated: boolean): void {
    this.api.call(updateAthlete, { params: { id: athlete.id }, body: { deactivated } }).subscribe({
      next: (changed) => {
        this.read.set(changed);
        this.notices.say(
          deactivated ? `${athlete.name} is deactivated.` : `${athlete.name} is back in the squad.`,
        );
      },
      error: (error: unknown) => this.notices.warn(problemOf(error).detail),
    });
  }
}
