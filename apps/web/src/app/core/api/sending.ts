import { signal } from '@angular/core';
import type { Problem } from '@stillstroke/contract/problem';
import type { Observable } from 'rxjs';
import { problemOf } from './problem-of';

/** One form's change on its way: whether it is being sent, and why the last try was refused. */
export class Sending {
  private readonly busy = signal(false);
  private readonly words = signal<string | null>(null);
  readonly sending = this.busy.asReadonly();
  /** Words about the field at fault where the server names one, else about the whole. */
  readonly refusal = this.words.asReadonly();

  /** Sends once; a second try while one is under way does nothing. `refused` may look at the problem as well. */
  send<T>(call: Observable<T>, done: (answer: T) => void, refused?: (problem: Problem) => void): void {
    if (this.busy()) return;
    this.busy.set(true);
    call.subscribe({
      next: done,
      error: (error: unknown) => {
        const problem = problemOf(error);
        this.busy.set(false);
        this.words.set(problem.issues?.[0]?.message ?? problem.detail);
        refused?.(problem);
      },
    });
  }
}
