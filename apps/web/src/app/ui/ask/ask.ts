import { inject, Injectable } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';

export interface Question {
  readonly title: string;
  readonly words: string;
  /** What pressing on does, as a verb with its object: `Delete the clip`. */
  readonly action: string;
  readonly refuse?: string;
  /** Asks for this name to be typed before it can be done. */
  readonly typeName?: string;
}

/** Asks before something that people might regret. */
@Injectable({ providedIn: 'root' })
export class Ask {
  private readonly dialog = inject(MatDialog);

  async confirm(question: Question): Promise<boolean> {
    const { AskDialog } = await import('./ask-dialog');
    const dialog = this.dialog.open<unknown, Question, boolean>(AskDialog, {
      data: question,
      width: '30rem',
    });
    return (await firstValueFrom(dialog.afterClosed())) === true;
  }
}
