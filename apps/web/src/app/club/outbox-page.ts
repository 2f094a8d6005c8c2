import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatSelectModule } from '@angular/material/select';
import { Router } from '@angular/router';
import {
  listOutbox,
  mailStatusSchema,
  retryMail,
  type MailStatus,
  type OutboxMail,
} from '@stillstroke/contract/mail';
import { Api, apiResource } from '../core/api/api';
import { lastValue } from '../core/api/last-value';
import { problemOf } from '../core/api/problem-of';
import { Notices } from '../core/notices';
import { EmptyState } from '../ui/empty-state';
import { LoadingLines } from '../ui/loading-lines';
import { mailKindWords, mailStatusWords } from '../ui/mail-words';
import { ProblemMessage } from '../ui/problem-message';
import { sayInstant } from '../ui/say-date';

const mailsOnPage = 30;

/** Mails to people of the club: what waits, went, or was given up, and their text while no mail server is set. */
@Component({
  selector: 'st-outbox-page',
  imports: [EmptyState, LoadingLines, MatButtonModule, MatFormFieldModule, MatSelectModule, ProblemMessage],
  templateUrl: './outbox-page.html',
  styleUrl: './outbox-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OutboxPage {
  private readonly api = inject(Api);
  private readonly dialog = inject(MatDialog);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);

  /** From the address. */
  readonly status = input<string>();
  readonly after = input<string>();

  protected readonly chosen = computed<MailStatus | null>(
    () => mailStatusSchema.safeParse(this.status()).data ?? null,
  );
  protected readonly outbox = apiResource(listOutbox, () => ({
    query: { status: this.chosen() ?? undefined, cursor: this.after(), limit: mailsOnPage },
  }));
  protected readonly page = lastValue(this.outbox);
  protected readonly rows = computed(() => {
    const byFile = this.page()?.delivery.by === 'file';
    return (this.page()?.items ?? []).map((mail) => ({
      mail,
      kind: mailKindWords[mail.kind],
      state: sayState(mail, byFile),
      opens: byFile && mail.status === 'sent',
    }));
  });
  protected readonly statuses = mailStatusSchema.options.map((value) => ({
    value,
    words: mailStatusWords[value],
  }));

  protected list(what: { status?: MailStatus | null; after?: string | null }): void {
    const queryParams = { status: this.chosen(), after: null, ...what };
    void this.router.navigate([], { queryParams });
  }

  protected async open({ id }: OutboxMail): Promise<void> {
    const { MailTextDialog } = await import('./mail-text-dialog');
    this.dialog.open(MailTextDialog, { data: id, width: '44rem' });
  }

  protected tryAgain(mail: OutboxMail): void {
    this.api.call(retryMail, { params: { id: mail.id } }).subscribe({
      next: () => {
        this.outbox.reload();
        this.notices.say(`The mail to ${mail.to.name} is tried again.`);
      },
      error: (error: unknown) => {
        this.outbox.reload();
        this.notices.warn(problemOf(error).detail);
      },
    });
  }
}

/** Where a mail stands, in words. */
function sayState(mail: OutboxMail, byFile: boolean): string {
  const when = sayInstant(mail.finishedAt ?? mail.createdAt);
  switch (mail.status) {
    case 'sent':
      return `${byFile ? 'Written to a file' : 'Sent'} on ${when}`;
    case 'waiting':
      return mail.attempts === 0 || mail.nextAttemptAt === null
        ? `Waiting since ${when}`
        : `Waiting; tried ${mail.attempts === 1 ? 'once' : `${mail.attempts} times`}, next on ${sayInstant(mail.nextAttemptAt)}`;
    case 'sending':
      return 'Being sent';
    case 'given-up':
      return `Given up on ${when}`;
    case 'withheld':
      return `Not sent, ${when}`;
  }
}
