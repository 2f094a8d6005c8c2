import { acceptInvitation as acceptCall, getInvitation } from '@stillstroke/contract/auth';
import { Router } from 'express';
import { startSignIn } from '../auth/sign-in-state';
import type { AppContext } from '../platform/context';
import { mountPublic } from '../platform/mount';
import { acceptInvitation, invitationFor } from './invitations.service';

export function invitationsRoutes(context: AppContext): Router {
  const router = Router();
  mountPublic(router, getInvitation, ({ params }) => invitationFor(context, params.token));
  mountPublic(router, acceptCall, async ({ params, body, req }) => {
    const user = await acceptInvitation(context, params.token, body.password);
    await startSignIn(req, user);
    return { user };
  });
  return router;
}
