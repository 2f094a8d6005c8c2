import * as calls from '@stillstroke/contract/targets';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { createTarget, deleteTarget, listTargets, restoreTarget, updateTarget } from './targets.service';

export function targetsRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.listTargets, ({ user, params }) => ({
    items: listTargets(context, user, params.id),
    nextCursor: null,
  }));
  mount(router, calls.createTarget, ({ user, params, body }) => createTarget(context, user, params.id, body));
  mount(router, calls.updateTarget, ({ user, params, body }) => updateTarget(context, user, params.id, body));
  mount(router, calls.deleteTarget, ({ user, params }) => deleteTarget(context, user, params.id));
  mount(router, calls.restoreTarget, ({ user, params }) => restoreTarget(context, user, params.id));
  return router;
}
