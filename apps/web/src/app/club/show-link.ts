import { inject, Injectable } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import type { AnswerOf } from '@stillstroke/contract/endpoint';
import type { invitePerson } from '@stillstroke/contract/people';

export type Invited = AnswerOf<typeof invitePerson>;

/** Shows an invitation's link, the only time there is. */
@Injectable({ providedIn: 'root' })
export class ShowLink {
  private readonly dialog = inject(MatDialog);

  show(invited: Invited): void {
    void import('./link-dialog').then(({ LinkDialog }) =>
      // Only its button closes it: a stray click would lose the link.
      this.dialog.open(LinkDialog, { data: invited, disableClose: true, width: '34rem' }),
    );
  }
}
