import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatMenuModule } from '@angular/material/menu';
import { RouterLink } from '@angular/router';
import type { Clip } from '@stillstroke/contract/clip-facts';
import { getClipPoster } from '@stillstroke/contract/clips';
import { endpointUrl } from '../core/api/endpoint-url';
import { SignInState } from '../core/sign-in/sign-in-state';
import { factsOf, sayMeasured, sayView } from '../ui/clip-words';
import { PlumbSign } from '../ui/plumb-sign';

/** One clip: its picture, what it shows, the facts of its file, and the way to the Desk. */
@Component({
  selector: 'st-clip-card',
  imports: [MatButtonModule, MatMenuModule, PlumbSign, RouterLink],
  templateUrl: './clip-card.html',
  styleUrl: './clip-card.scss',
  host: { class: 'st-card' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ClipCard {
  private readonly signIn = inject(SignInState);

  readonly clip = input.required<Clip>();
  readonly canChange = input(false);

  readonly changing = output();
  readonly deleting = output();

  protected readonly poster = computed(() =>
    this.clip().hasPoster ? endpointUrl(getClipPoster, { id: this.clip().id }) : null,
  );
  protected readonly shows = computed(() => sayView(this.clip()));
  protected readonly facts = computed(() => factsOf(this.clip()).join(' · '));
  protected readonly measured = computed(() => sayMeasured(this.clip()));
  /** For those who mark, not for an athlete who has sent the clip in. */
  protected readonly canMarkAgain = computed(
    () => this.ready() && this.clip().markedFrames > 0 && this.signIn.user()?.role !== 'athlete',
  );
  protected readonly ready = computed(() => this.clip().status === 'ready');
}
