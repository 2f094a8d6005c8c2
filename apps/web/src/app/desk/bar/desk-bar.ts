import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { Clip } from '@stillstroke/contract/clip-facts';
import { getSession } from '@stillstroke/contract/sessions';
import { apiResource } from '../../core/api/api';
import { SignInState } from '../../core/sign-in/sign-in-state';
import { TakeAlong } from '../../take-along/take-along';
import { PlumbSign } from '../../ui/plumb-sign';
import { sayDate, viewWords } from '../clip-words';

/** The Desk's own bar: where the clip belongs, whether everything is saved, and the ways on. */
@Component({
  selector: 'st-desk-bar',
  imports: [PlumbSign, RouterLink],
  templateUrl: './desk-bar.html',
  styleUrl: './desk-bar.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DeskBar {
  private readonly signIn = inject(SignInState);
  private readonly takingAlong = inject(TakeAlong);

  readonly clip = input.required<Clip>();
  /** Null where nothing can be changed. */
  readonly saveWords = input<string | null>(null);
  /** True while something is not saved that the person should know of. */
  readonly attention = input(false);
  readonly undoWords = input<string | null>(null);
  readonly redoWords = input<string | null>(null);

  readonly keys = output();
  readonly undo = output();
  readonly redo = output();
  /** The frame on the stage is to go into a review. */
  readonly useFrame = output();

  private readonly session = apiResource(getSession, () => ({ params: { id: this.clip().sessionId } }));

  protected readonly crumbs = computed(() => {
    const session = this.session.hasValue() ? this.session.value() : null;
    if (!session) return [];
    const own = this.signIn.user()?.role === 'athlete';
    const athlete = {
      label: own ? 'My sessions' : session.athleteName,
      address: `/athletes/${session.athleteId}`,
    };
    return own ? [athlete] : [{ label: session.squadName, address: '/squad' }, athlete];
  });
  protected readonly here = computed(() => {
    const session = this.session.hasValue() ? this.session.value() : null;
    return session ? sayDate(session.date) : 'Session';
  });
  protected readonly view = computed(() => viewWords[this.clip().view]);

  protected takeAlong(): void {
    const { id } = this.clip();
    const unsaved = this.attention();
    void this.takingAlong.takeAlong({
      kind: 'clip',
      id,
      name: 'this clip',
      ...(unsaved && { caution: 'Some changes are not saved yet; they are not in the file.' }),
    });
  }
}
