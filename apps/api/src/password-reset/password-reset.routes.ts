import { askForPassword, getPasswordReset, resetPassword as resetCall } from '@stillstroke/contract/mail';
import { Router } from 'express';
import { wishLimiters } from '../auth/attempt-limits';
import { startSignIn } from '../auth/sign-in-state';
import type { AppContext } from '../platform/context';
import { mountPublic } from '../platform/mount';
import { resetFor, resetPassword, wishForPassword } from './password-reset.service';

export function passwordResetRoutes(context: AppContext): Router {
  const router = Router();
  router.post(askForPassword.path, ...wishLimiters(context));
  mountPublic(router, askForPassword, ({ body }) => wishForPassword(context, body.email));
  mountPublic(router, getPasswordReset, ({ params }) => resetFor(context, params.token));
  mountPublic(router, resetCall, async ({ params, body, req }) => {
    const user = await resetPassword(context, params.token, body.password);
    await startSignIn(req, user);
    return { user };
  });
  return router;
}
