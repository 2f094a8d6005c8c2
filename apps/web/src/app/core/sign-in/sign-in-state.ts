import { inject, Injectable, signal } from '@angular/core';
import { acceptInvitation, getMe, signIn, signOut, type SignedInUser } from '@stillstroke/contract/auth';
import { resetPassword } from '@stillstroke/contract/mail';
import { firstValueFrom, map, tap, type Observable } from 'rxjs';
import { Api } from '../api/api';
import { problemOf } from '../api/problem-of';

/** Who is signed in. Read by the shell, the guards and every page that shows a thing to some roles only. */
@Injectable({ providedIn: 'root' })
export class SignInState {
  private readonly api = inject(Api);
  private readonly current = signal<SignedInUser | null>(null);
  private known = false;

  readonly user = this.current.asReadonly();

  /** Asks the server once; asks again as long as it could not be reached. Never rejects: not knowing means not signed in. */
  async load(): Promise<void> {
    if (this.known) return;
    try {
      const answer = await firstValueFrom(this.api.call(getMe));
      this.settle(answer.user);
    } catch (error) {
      // 401 is an answer ("nobody"); a server that is down is none, so the next guard asks again.
      if (problemOf(error).status === 401) this.settle(null);
    }
  }

  signIn(email: string, password: string): Observable<SignedInUser> {
    return this.api
      .call(signIn, { body: { email, password } })
      .pipe(map((answer) => this.settle(answer.user)));
  }

  /** Sets the own password through an invitation link; the server signs the person in with it. */
  acceptInvitation(token: string, password: string): Observable<SignedInUser> {
    return this.api
      .call(acceptInvitation, { params: { token }, body: { password } })
      .pipe(map((answer) => this.settle(answer.user)));
  }

  /** Sets a new password through a link from a mail; the server signs the person in with it. */
  resetPassword(token: string, password: string): Observable<SignedInUser> {
    return this.api
      .call(resetPassword, { params: { token }, body: { password } })
      .pipe(map((answer) => this.settle(answer.user)));
  }

  signOut(): Observable<unknown> {
    return this.api.call(signOut).pipe(tap(() => this.forget()));
  }

  /** The server says that nobody is signed in any more. */
  forget(): void {
    this.settle(null);
  }

  private settle<U extends SignedInUser | null>(user: U): U {
    this.known = true;
    this.current.set(user);
    return user;
  }
}
