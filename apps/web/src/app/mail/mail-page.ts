import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatSlideToggleModule, type MatSlideToggleChange } from '@angular/material/slide-toggle';
import { getMailWishes, setMailWish, type SwitchableMail } from '@stillstroke/contract/mail';
import { Api, apiResource } from '../core/api/api';
import { problemOf } from '../core/api/problem-of';
import { Notices } from '../core/notices';
import { LoadingLines } from '../ui/loading-lines';
import { mailOccasions } from '../ui/mail-words';
import { ProblemMessage } from '../ui/problem-message';

/** Which mails a person gets: one switch a kind, saved as it is moved. */
@Component({
  selector: 'st-mail-page',
  imports: [LoadingLines, MatSlideToggleModule, ProblemMessage],
  templateUrl: './mail-page.html',
  styleUrl: './mail-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MailPage {
  private readonly api = inject(Api);
  private readonly notices = inject(Notices);

  protected readonly wishes = apiResource(getMailWishes, () => ({}));
  protected readonly saving = signal<SwitchableMail | null>(null);
  protected readonly rows = computed(() =>
    this.wishes.hasValue()
      ? this.wishes.value().kinds.map(({ kind, on }) => ({ kind, on, words: mailOccasions[kind] }))
      : [],
  );
  protected readonly always = ['Your invitation', 'A link to set a new password, when you ask for one'];

  protected set(kind: SwitchableMail, change: MatSlideToggleChange): void {
    this.saving.set(kind);
    this.api.call(setMailWish, { params: { kind }, body: { on: change.checked } }).subscribe({
      next: (wishes) => {
        this.saving.set(null);
        this.wishes.set(wishes);
      },
      error: (error: unknown) => {
        this.saving.set(null);
        // The switch goes back to what the server has.
        change.source.checked = !change.checked;
        this.notices.warn(problemOf(error).detail);
      },
    });
  }
}
