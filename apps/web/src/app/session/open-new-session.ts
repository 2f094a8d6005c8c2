import { inject, Injectable } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { Router } from '@angular/router';
import type { Session } from '@stillstroke/contract/sessions';
import { firstValueFrom } from 'rxjs';
import { SignInState } from '../core/sign-in/sign-in-state';
import { FilmsInHand } from './films-in-hand';
import type { NewSessionData } from './new-session-dialog';

/** Asks for what a new session needs, opens it, and leads there with the files that were dropped. */
@Injectable({ providedIn: 'root' })
export class OpenNewSession {
  private readonly dialog = inject(MatDialog);
  private readonly router = inject(Router);
  private readonly films = inject(FilmsInHand);
  private readonly user = inject(SignInState).user;

  async ask(athlete: NewSessionData['athlete'], files: readonly File[] = []): Promise<void> {
    const { NewSessionDialog } = await import('./new-session-dialog');
    const noteLabel = this.user()?.role === 'athlete' ? 'Your question to the coach' : 'Note (if you like)';
    const data: NewSessionData = { athlete, fileCount: files.length, noteLabel };
    const dialog = this.dialog.open<unknown, NewSessionData, Session>(NewSessionDialog, {
      data,
      width: '32rem',
    });
    const session = await firstValueFrom(dialog.afterClosed());
    if (!session) return;
    this.films.hold(files);
    await this.router.navigate(['/sessions', session.id]);
  }
}
