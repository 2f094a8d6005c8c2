import * as calls from '@stillstroke/contract/scale';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { deleteScale, getScale, putScale } from './scales.service';

export function scalesRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.getScale, ({ user, params }) => getScale(context, user, params.id));
  mount(router, calls.putScale, ({ user, params, body }) => putScale(context, user, params.id, body));
  mount(router, calls.deleteScale, ({ user, params, query }) => deleteScale(context, user, params.id, query));
  return router;
}
