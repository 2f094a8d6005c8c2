import { inject } from '@angular/core';
import { RedirectCommand, Router, type CanActivateFn, type RedirectFunction } from '@angular/router';
import type { Role } from '@stillstroke/contract/roles';
import { homeOf } from './home-of';
import { SignInState } from './sign-in-state';

/** Lets signed-in people through and sends others to the sign-in page, with the way back. The server checks every right again. */
export const signedIn: CanActivateFn = (_route, target) =>
  signedInOutcome(inject(SignInState), inject(Router), target.url);

/** As `signedIn`, for some roles only; others are told so and the address stays as it is. */
export function onlyFor(...roles: readonly Role[]): CanActivateFn {
  return async (_route, target) => {
    const [state, router] = [inject(SignInState), inject(Router)];
    const outcome = await signedInOutcome(state, router, target.url);
    if (outcome !== true) return outcome;
    const role = state.user()?.role;
    if (role && roles.includes(role)) return true;
    return new RedirectCommand(router.parseUrl('/not-for-you'), { skipLocationChange: true });
  };
}

/** The bare address leads to where the person's work starts. */
export const toHome: RedirectFunction = async () => {
  const state = inject(SignInState);
  await state.load();
  return homeOf(state.user());
};

async function signedInOutcome(state: SignInState, router: Router, url: string) {
  await state.load();
  return state.user() ? true : router.createUrlTree(['/sign-in'], { queryParams: { back: url } });
}
