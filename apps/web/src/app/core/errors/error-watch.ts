import { HttpErrorResponse } from '@angular/common/http';
import { inject, Injectable, Injector, type ErrorHandler } from '@angular/core';
import { problemOf } from '../api/problem-of';
import { Notices } from '../notices';

/** The last net: an error nobody expected is written to the console and said once, however often it repeats. */
@Injectable()
export class ErrorWatch implements ErrorHandler {
  // Asked for late: the error handler is made before anything it could tell the error to.
  private readonly injector = inject(Injector);
  private said = false;

  handleError(error: unknown): void {
    console.error(error);
    const refusal = refusalIn(error);
    if (refusal?.status === 401) return;
    if (refusal) {
      this.injector.get(Notices).warn(problemOf(refusal).detail);
    } else if (!this.said) {
      this.said = true;
      this.injector
        .get(Notices)
        .warn('Something on this page went wrong. Load it again before you go on; what was saved is safe.');
    }
  }
}

function refusalIn(error: unknown): HttpErrorResponse | null {
  if (error instanceof HttpErrorResponse) return error;
  const rejection = error instanceof Error && 'rejection' in error ? error.rejection : undefined;
  return rejection instanceof HttpErrorResponse ? rejection : null;
}
