import * as calls from '@stillstroke/contract/squads';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { createSquad, listSquads, updateSquad } from './squads.service';

export function squadsRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.listSquads, ({ user }) => ({ items: listSquads(context, user), nextCursor: null }));
  mount(router, calls.createSquad, ({ user, body }) => createSquad(context, user, body));
  mount(router, calls.updateSquad, ({ user, params, body }) => updateSquad(context, user, params.id, body));
  return router;
}
