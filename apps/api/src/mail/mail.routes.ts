import * as calls from '@stillstroke/contract/mail';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { mailWishes, setMailWish } from './mail-wishes.service';
import { listOutbox, outboxMail, retryMail } from './outbox.service';

export function mailRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.getMailWishes, ({ user }) => mailWishes(context, user));
  mount(router, calls.setMailWish, ({ user, params, body }) =>
    setMailWish(context, user, params.kind, body.on),
  );
  mount(router, calls.listOutbox, ({ user, query }) => listOutbox(context, user, query));
  mount(router, calls.getOutboxMail, ({ user, params }) => outboxMail(context, user, params.id));
  mount(router, calls.retryMail, ({ user, params }) => retryMail(context, user, params.id));
  return router;
}
