import { inject, Injectable } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import type { Session } from '@stillstroke/contract/sessions';
import type { BringInWish } from './bring-in-dialog';
import type { TakeAlongWish } from './take-along-dialog';

/** Opens the dialogs in which figures leave and come back; both are loaded when first wanted. */
@Injectable({ providedIn: 'root' })
export class TakeAlong {
  private readonly dialog = inject(MatDialog);

  async takeAlong(wish: TakeAlongWish): Promise<void> {
    const { TakeAlongDialog } = await import('./take-along-dialog');
    this.dialog.open<unknown, TakeAlongWish>(TakeAlongDialog, { data: wish, width: '34rem' });
  }

  /** `changed` is called when something was brought in, and again when that was taken back. */
  async bringIn(session: Session, changed: () => void): Promise<void> {
    const { BringInDialog } = await import('./bring-in-dialog');
    this.dialog.open<unknown, BringInWish>(BringInDialog, {
      data: { session, changed },
      width: '44rem',
      maxWidth: '96vw',
    });
  }
}
