import * as calls from '@stillstroke/contract/sessions';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import {
  createSession,
  deleteSession,
  getSession,
  listSessions,
  restoreSession,
  updateSession,
} from './sessions.service';

export function sessionsRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.listSessions, ({ user, params, query }) =>
    listSessions(context, user, params.id, query),
  );
  mount(router, calls.createSession, ({ user, params, body }) =>
    createSession(context, user, params.id, body),
  );
  mount(router, calls.getSession, ({ user, params }) => getSession(context, user, params.id));
  mount(router, calls.updateSession, ({ user, params, body }) =>
    updateSession(context, user, params.id, body),
  );
  mount(router, calls.deleteSession, ({ user, params }) => deleteSession(context, user, params.id));
  mount(router, calls.restoreSession, ({ user, params }) => restoreSession(context, user, params.id));
  return router;
}
