import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  numberAttribute,
  resource,
  untracked,
} from '@angular/core';
import { RouterLink } from '@angular/router';
import { restoreClip } from '@stillstroke/contract/clips';
import type { Clip } from '@stillstroke/contract/clip-facts';
import { firstValueFrom } from 'rxjs';
import { Api } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { Notices } from '../core/notices';
import { PageTitle } from '../core/page-title';
import { SignInState } from '../core/sign-in/sign-in-state';
import { LoadingLines } from '../ui/loading-lines';
import { ProblemMessage } from '../ui/problem-message';
import { Desk } from './desk';
import { PlaceInAddress } from './place-in-address';
import { DeskSaving } from './saving/desk-saving';
import { stageProviders } from './stage/stage-providers';
import type { DeskState } from './state/desk-state';

/** A clip that can be worked on, or one whose file is not ready. */
type Opened =
  { readonly kind: 'desk'; readonly state: DeskState } | { readonly kind: 'not-ready'; readonly clip: Clip };

/** Opens the Desk of a clip, at the frame and arm that the address names. */
@Component({
  selector: 'st-desk-page',
  imports: [Desk, LoadingLines, ProblemMessage, RouterLink],
  providers: [DeskSaving, PlaceInAddress, stageProviders],
  templateUrl: './desk-page.html',
  styleUrl: './desk-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DeskPage {
  private readonly api = inject(Api);
  private readonly saving = inject(DeskSaving);
  private readonly address = inject(PlaceInAddress);
  private readonly signIn = inject(SignInState);
  private readonly notices = inject(Notices);
  private readonly title = inject(PageTitle);

  readonly clipId = input.required<string>();
  /** 0-based frame to show; every figure elsewhere leads here by it. */
  readonly frame = input(undefined, { transform: optionalNumber });
  readonly arm = input<string>();

  protected readonly opened = resource({
    params: () => ({ clipId: this.clipId() }),
    loader: ({ params }) => this.open(params.clipId),
  });
  protected readonly desk = computed(() => {
    const opened = this.opened.hasValue() ? this.opened.value() : null;
    return opened?.kind === 'desk' ? opened.state : null;
  });
  protected readonly notReady = computed(() => {
    const opened = this.opened.hasValue() ? this.opened.value() : null;
    return opened?.kind === 'not-ready' ? opened.clip : null;
  });
  protected readonly problem = computed(() => {
    const error = this.opened.error();
    return error ? problemOf(error.cause ?? error) : null;
  });

  constructor() {
    effect(() => {
      const [desk, frame, arm] = [this.desk(), this.frame(), this.arm()];
      if (!desk) return;
      untracked(() => {
        this.address.arrive(desk, { frame, arm });
      });
    });
  }

  protected async restore(): Promise<void> {
    try {
      await firstValueFrom(this.api.call(restoreClip, { params: { id: this.clipId() } }));
      this.opened.reload();
    } catch (error) {
      this.notices.warn(problemOf(error).detail);
    }
  }

  private async open(clipId: string): Promise<Opened> {
    const clip = await this.saving.loadClip(clipId);
    this.title.show(`Desk, ${clip.name}`);
    const user = this.signIn.user();
    if (clip.status !== 'ready' || !user) return { kind: 'not-ready', clip };
    return { kind: 'desk', state: await this.saving.open(clip, user) };
  }
}

function optionalNumber(value: unknown): number | undefined {
  const number = numberAttribute(value, NaN);
  return Number.isInteger(number) && number >= 0 ? number : undefined;
}
