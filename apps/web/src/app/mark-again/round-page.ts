import { LiveAnnouncer } from '@angular/cdk/a11y';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  resource,
  untracked,
} from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { getClip, getClipFrames } from '@stillstroke/contract/clips';
import { finishRound, getRound, putRoundMark } from '@stillstroke/contract/repeatability';
import { firstValueFrom } from 'rxjs';
import { Api } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { Connection } from '../core/connection';
import { Notices } from '../core/notices';
import { DeskKeyboard } from '../desk/keyboard/desk-keyboard';
import { Stage } from '../desk/stage/stage';
import { StageController } from '../desk/stage/stage-controller';
import { stageProviders } from '../desk/stage/stage-providers';
import { LoadingLines } from '../ui/loading-lines';
import { ProblemMessage } from '../ui/problem-message';
import { RoundDesk } from './round-desk';
import { RoundSaving } from './round-saving';

/** A round of marking again: its frames one by one on the stage, without the marks from before. */
@Component({
  selector: 'st-round-page',
  imports: [LoadingLines, ProblemMessage, RouterLink, Stage],
  providers: [DeskKeyboard, stageProviders],
  templateUrl: './round-page.html',
  styleUrl: './round-page.scss',
  host: { '(window:beforeunload)': 'warnBeforeLoss($event)' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RoundPage {
  private readonly api = inject(Api);
  private readonly announcer = inject(LiveAnnouncer);
  private readonly connection = inject(Connection);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);

  readonly roundId = input.required<string>();

  protected readonly opened = resource({
    params: () => this.roundId(),
    loader: ({ params }) => this.open(params),
  });
  protected readonly round = computed(() => (this.opened.hasValue() ? this.opened.value() : null));
  protected readonly problem = computed(() => {
    const error = this.opened.error();
    return error ? problemOf(error.cause ?? error) : null;
  });
  protected readonly said = computed(() => this.round()?.desk.state.spoken()?.words ?? '');

  constructor() {
    const keyboard = inject(DeskKeyboard);
    const stage = inject(StageController);
    effect(() => {
      const desk = this.round()?.desk;
      if (desk) keyboard.attach({ state: desk.state, stage, instead: (command) => desk.takes(command) });
    });
    effect(() => {
      const words = this.said();
      if (words) void this.announcer.announce(words, 'polite');
    });
    effect(() => {
      const [online, saving] = [this.connection.online(), this.round()?.saving];
      if (online) untracked(() => void saving?.run());
    });
  }

  protected async finish(): Promise<void> {
    const round = this.round();
    if (!round?.desk.allDone()) return;
    await round.saving.run();
    if (!round.saving.saved()) return;
    try {
      await firstValueFrom(this.api.call(finishRound, { params: { id: this.roundId() } }));
      await this.router.navigate(['/marking'], { replaceUrl: true });
    } catch (error) {
      this.notices.warn(problemOf(error).detail);
    }
  }

  protected warnBeforeLoss(event: BeforeUnloadEvent): void {
    if (this.round()?.saving.saved() === false) event.preventDefault();
  }

  private async open(roundId: string) {
    const round = await firstValueFrom(this.api.call(getRound, { params: { id: roundId } }));
    const params = { id: round.clipId };
    const [clip, frames] = await Promise.all([
      firstValueFrom(this.api.call(getClip, { params })),
      firstValueFrom(this.api.call(getClipFrames, { params })),
    ]);
    const desk = new RoundDesk(round, clip, frames.timestampsUs);
    const saving = new RoundSaving(
      (position, joints) =>
        firstValueFrom(this.api.call(putRoundMark, { params: { id: roundId, position }, body: joints })),
      (error) => problemOf(error).detail,
    );
    desk.onMarked((position, joints) => {
      saving.add(position, joints);
    });
    return { desk, saving, clip, finished: round.finishedAt !== null };
  }
}
