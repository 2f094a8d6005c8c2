import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';
import { getOutboxMail } from '@stillstroke/contract/mail';
import { apiResource } from '../core/api/api';
import { LoadingLines } from '../ui/loading-lines';
import { ProblemMessage } from '../ui/problem-message';

/** The text of one mail; its HTML is shown as text too, never as a page. */
@Component({
  selector: 'st-mail-text-dialog',
  imports: [LoadingLines, MatButtonModule, MatDialogModule, ProblemMessage],
  template: `
    <h2 mat-dialog-title>{{ mail.hasValue() ? (mail.value().written?.subject ?? 'Mail') : 'Mail' }}</h2>
    <mat-dialog-content tabindex="0">
      @if (mail.error(); as error) {
        <st-problem-message [error]="error" (retry)="mail.reload()" />
      } @else if (mail.hasValue()) {
        <p class="st-small st-quiet">To {{ mail.value().to.name }}, {{ mail.value().to.address }}</p>
        @if (mail.value().written; as written) {
          <pre class="text">{{ written.text }}</pre>
          <p class="st-small st-quiet">In the data folder: {{ written.file }}</p>
          <details>
            <summary>The HTML part, as text</summary>
            <pre>{{ written.html }}</pre>
          </details>
        } @else {
          <p>This mail went through the mail server; its text is between Stillstroke and its reader.</p>
        }
      } @else {
        <st-loading-lines [count]="5" />
      }
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton type="button" mat-dialog-close cdkFocusInitial>Close</button>
    </mat-dialog-actions>
  `,
  styles: `
    p {
      margin: 0 0 10px;
      overflow-wrap: anywhere;
    }

    pre {
      margin: 0 0 12px;
      padding: 14px 16px;
      border-radius: 8px;
      background: var(--st-chalk);
      color: var(--st-ink);
      font: inherit;
      white-space: pre-wrap;
      overflow-wrap: anywhere;
    }

    details pre {
      margin-top: 8px;
      font-family: monospace;
      font-size: 0.8125rem;
    }

    summary {
      min-height: 32px;
      color: var(--st-deep-water);
      cursor: pointer;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MailTextDialog {
  private readonly id = inject<string>(MAT_DIALOG_DATA);

  protected readonly mail = apiResource(getOutboxMail, () => ({ params: { id: this.id } }));
}
