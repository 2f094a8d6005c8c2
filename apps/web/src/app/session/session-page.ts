import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  viewChild,
} from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { MatButtonModule } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { Router, RouterLink } from '@angular/router';
import type { Clip } from '@stillstroke/contract/clip-facts';
import { deleteClip } from '@stillstroke/contract/clips';
import { deleteSession, getSession, type Session } from '@stillstroke/contract/sessions';
import { EMPTY, interval, switchMap } from 'rxjs';
import { Api, apiResource } from '../core/api/api';
import { lastValue } from '../core/api/last-value';
import { problemOf } from '../core/api/problem-of';
import { Notices } from '../core/notices';
import { PageTitle } from '../core/page-title';
import { RecentlyDeleted } from '../core/recently-deleted';
import { SignInState } from '../core/sign-in/sign-in-state';
import { ReviewList } from '../review/list/review-list';
import { Ask } from '../ui/ask/ask';
import { DeletedList } from '../ui/deleted-list';
import { EmptyState } from '../ui/empty-state';
import { LoadingLines } from '../ui/loading-lines';
import { ProblemMessage } from '../ui/problem-message';
import { RailGlance } from '../ui/rail-glance';
import { sayDate } from '../ui/say-date';
import { TakeAlong } from '../take-along/take-along';
import { ClipCard } from './clip-card';
import { sayMeasuredStrokes } from './session-words';
import { UploadPanel } from './upload/upload-panel';
import type { HasUploads } from './uploads-finished';

const lookAgainMs = 3000;
/** Who withdraws a film may want the pictures gone as well. */
const picturesStay =
  'Pictures made from it stay in reviews that were sent; take them out there if they have to go too.';

/** One visit to the pool: its clips, what they gave, and the place where more are added. */
@Component({
  selector: 'st-session-page',
  imports: [
    ClipCard,
    DeletedList,
    EmptyState,
    LoadingLines,
    MatButtonModule,
    ProblemMessage,
    RailGlance,
    ReviewList,
    RouterLink,
    UploadPanel,
  ],
  templateUrl: './session-page.html',
  styleUrl: './session-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SessionPage implements HasUploads {
  private readonly api = inject(Api);
  private readonly ask = inject(Ask);
  private readonly deleted = inject(RecentlyDeleted);
  private readonly dialog = inject(MatDialog);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);
  private readonly takingAlong = inject(TakeAlong);
  private readonly title = inject(PageTitle);
  private readonly user = inject(SignInState).user;

  readonly sessionId = input.required<string>();

  private readonly panel = viewChild(UploadPanel);

  protected readonly read = apiResource(getSession, () => ({ params: { id: this.sessionId() } }));
  private readonly last = lastValue(this.read);
  /** Stays when reading it again fails: files may be under way, and the page must not go from under them. */
  protected readonly session = computed(() => {
    const session = this.last();
    return session?.id === this.sessionId() ? session : null;
  });
  protected readonly canChange = computed(() => ['admin', 'coach'].includes(this.user()?.role ?? ''));
  protected readonly when = computed(() => sayDate(this.session()?.date ?? '2000-01-01'));
  protected readonly measured = computed(() => sayMeasuredStrokes(this.session()?.summary.strokes));
  private readonly converting = computed(
    () => this.session()?.clips.some(({ status }) => status === 'converting') ?? false,
  );

  constructor() {
    effect(() => {
      const session = this.session();
      if (session) this.title.show(`${this.when()}, ${session.athleteName}`);
    });
    toObservable(this.converting)
      .pipe(
        switchMap((converting) => (converting ? interval(lookAgainMs) : EMPTY)),
        takeUntilDestroyed(),
      )
      .subscribe(() => this.read.reload());
  }

  unfinishedUploads(): number {
    return this.panel()?.unfinished() ?? 0;
  }

  /** Puts a clip that came or changed into the list without asking for the whole session. */
  protected place(clip: Clip): void {
    this.read.update((session) => {
      if (!session) return session;
      const known = session.clips.some(({ id }) => id === clip.id);
      const clips = known
        ? session.clips.map((each) => (each.id === clip.id ? clip : each))
        : [...session.clips, clip];
      return { ...session, clips };
    });
  }

  protected takeAlong({ id }: Session): void {
    void this.takingAlong.takeAlong({ kind: 'session', id, name: `the session of ${this.when()}` });
  }

  protected bringIn(session: Session): void {
    void this.takingAlong.bringIn(session, () => this.read.reload());
  }

  protected async edit(): Promise<void> {
    const session = this.session();
    if (!session) return;
    const { EditSessionDialog } = await import('./edit-session-dialog');
    this.dialog
      .open<unknown, Session, Session>(EditSessionDialog, { data: session, width: '32rem' })
      .afterClosed()
      .subscribe((changed) => {
        if (changed) this.read.set(changed);
      });
  }

  protected async changeClip(clip: Clip): Promise<void> {
    const { ClipFieldsDialog } = await import('./clip-fields-dialog');
    this.dialog
      .open<unknown, Clip, Clip>(ClipFieldsDialog, { data: clip, width: '36rem' })
      .afterClosed()
      .subscribe((changed) => {
        if (changed) this.read.reload();
      });
  }

  protected async deleteClip(clip: Clip): Promise<void> {
    const sure = await this.ask.confirm({
      title: `Delete ${clip.name}?`,
      words: `The film goes, with its marks and strokes. You can bring it back for a while. ${picturesStay}`,
      action: 'Delete the clip',
    });
    if (!sure) return;
    this.api.call(deleteClip, { params: { id: clip.id } }).subscribe({
      next: ({ undoUntil }) => {
        this.read.reload();
        const { id, name, sessionId } = clip;
        this.deleted.note({ kind: 'clip', id, name, parentId: sessionId, undoUntil }, () =>
          this.read.reload(),
        );
      },
      error: (error: unknown) => this.notices.warn(problemOf(error).detail),
    });
  }

  protected async deleteSession(): Promise<void> {
    const session = this.session();
    if (!session) return;
    const name = `the session of ${this.when()}`;
    const count = session.clips.length;
    const sure = await this.ask.confirm({
      title: `Delete ${name}?`,
      words: `${session.athleteName}’s session goes${count > 0 ? ` with its ${count === 1 ? 'clip' : `${count} clips`}, marks and strokes` : ''}. You can bring it back for a while.`,
      action: 'Delete the session',
    });
    if (!sure) return;
    this.api.call(deleteSession, { params: { id: session.id } }).subscribe({
      next: ({ undoUntil }) => {
        const { id, athleteId } = session;
        const back = () => void this.router.navigate(['/sessions', id]);
        void this.router.navigate(['/athletes', athleteId]);
        this.deleted.note({ kind: 'session', id, name, parentId: athleteId, undoUntil }, back);
      },
      error: (error: unknown) => this.notices.warn(problemOf(error).detail),
    });
  }
}
