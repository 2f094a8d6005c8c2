import { getMe, getSignInPage, signIn, signOut } from '@stillstroke/contract/auth';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount, mountPublic } from '../platform/mount';
import { HttpProblem } from '../platform/problem';
import { attemptLimiters, KnownBrowsers } from './attempt-limits';
import { demoAccounts } from './demo-accounts';
import { endSignIn, startSignIn, type SignInState } from './sign-in-state';

export function authRoutes(context: AppContext, state: SignInState, secret: string): Router {
  const router = Router();
  const { behindTls } = context.settings;
  const known = new KnownBrowsers(secret, behindTls);

  router.post(signIn.path, ...attemptLimiters(context, known));
  mountPublic(router, signIn, async ({ body, req, res }) => {
    const user = await state.check(req, res);
    if (!user) {
      throw new HttpProblem(
        401,
        'wrong-credentials',
        'E-mail and password do not match an account. Check both and try again.',
      );
    }
    await startSignIn(req, user);
    known.remember(req, res, body.email);
    return { user };
  });

  mount(router, signOut, ({ req, res }) => endSignIn(req, res, behindTls));
  mount(router, getMe, ({ user }) => ({ user }));
  mountPublic(router, getSignInPage, () => ({
    demo: context.settings.demo ? demoAccounts(context.db) : null,
  }));
  return router;
}
