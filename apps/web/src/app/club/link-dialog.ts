import { Clipboard } from '@angular/cdk/clipboard';
import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { MatButtonModule } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInputModule } from '@angular/material/input';
import { sayInstant } from '../ui/say-date';
import type { Invited } from './show-link';

@Component({
  selector: 'st-link-dialog',
  imports: [MatButtonModule, MatDialogModule, MatFormFieldModule, MatInputModule],
  template: `
    <h2 mat-dialog-title>Invitation for {{ invited.person.name }}</h2>
    <mat-dialog-content>
      <p>
        @if (invited.invitation.mailed) {
          A mail with this link is on its way to {{ invited.person.email }}. You can hand it over yourself
          too.
        } @else {
          Send this link to {{ invited.person.name }} yourself: no mail server is set.
        }
        It is shown only now, works once, and until {{ until }}.
      </p>
      <mat-form-field appearance="outline" subscriptSizing="dynamic">
        <mat-label>Link</mat-label>
        <input #field matInput readonly [value]="invited.invitation.url" (focus)="field.select()" />
      </mat-form-field>
      <p class="said" role="status">{{ said() }}</p>
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton="filled" type="button" cdkFocusInitial (click)="copy()">Copy the link</button>
      <button matButton type="button" mat-dialog-close>I have it</button>
    </mat-dialog-actions>
  `,
  styles: `
    p {
      margin: 0 0 14px;
    }

    mat-form-field {
      width: 100%;
    }

    .said {
      min-height: 1.5em;
      margin: 8px 0 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class LinkDialog {
  private readonly clipboard = inject(Clipboard);

  protected readonly invited = inject<Invited>(MAT_DIALOG_DATA);
  protected readonly until = sayInstant(this.invited.invitation.expiresAt);
  protected readonly said = signal('');

  protected copy(): void {
    const copied = this.clipboard.copy(this.invited.invitation.url);
    this.said.set(copied ? 'Copied.' : 'This browser would not copy: select the link and copy it yourself.');
  }
}
