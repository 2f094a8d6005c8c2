import { inject, Injectable } from '@angular/core';
import { MatSnackBar } from '@angular/material/snack-bar';

/** Short words at the foot of the page: what was done, what went wrong, and sometimes a way to take it back. */
@Injectable({ providedIn: 'root' })
export class Notices {
  private readonly bar = inject(MatSnackBar);

  say(words: string): void {
    this.bar.open(words, undefined, { duration: 5000 });
  }

  /** Stays until it is closed, since people must not miss it. */
  warn(words: string): void {
    this.bar.open(words, 'Close', { politeness: 'assertive' });
  }

  /** With one thing to do about it, offered for ten seconds. */
  offer(words: string, action: string, take: () => void): void {
    this.bar
      .open(words, action, { duration: 10_000 })
      .onAction()
      .subscribe(() => take());
  }
}
