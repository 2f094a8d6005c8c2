import { HttpErrorResponse, HttpXsrfTokenExtractor, type HttpInterceptorFn } from '@angular/common/http';
import { inject, Injector } from '@angular/core';
import { Router } from '@angular/router';
import { getSignInPage } from '@stillstroke/contract/auth';
import { catchError, switchMap, throwError } from 'rxjs';
import { Api } from '../api/api';
import { problemOf } from '../api/problem-of';
import { SignInState } from './sign-in-state';

/**
 * Two refusals that no page can answer by itself: the sign-in has ended (leads to the sign-in page, with the way back),
 * and the CSRF token is out of date (fetches a fresh one and sends the request once more).
 */
export const signInInterceptor: HttpInterceptorFn = (request, next) => {
  const injector = inject(Injector);
  const tokens = inject(HttpXsrfTokenExtractor);
  return next(request).pipe(
    catchError((error: unknown) => {
      if (!(error instanceof HttpErrorResponse)) return throwError(() => error);
      const { code } = problemOf(error);
      if (code === 'not-signed-in' && !request.url.startsWith('/api/auth/')) leadToSignIn(injector);
      if (code !== 'csrf' || request.method === 'GET') return throwError(() => error);
      const refresh = injector.get(Api).call(getSignInPage);
      return refresh.pipe(
        switchMap(() => next(request.clone({ setHeaders: { 'X-XSRF-TOKEN': tokens.getToken() ?? '' } }))),
      );
    }),
  );
};

function leadToSignIn(injector: Injector): void {
  const router = injector.get(Router);
  injector.get(SignInState).forget();
  if (router.url.startsWith('/sign-in')) return;
  void router.navigate(['/sign-in'], { queryParams: { back: router.url, ended: true } });
}
