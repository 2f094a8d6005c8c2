import * as calls from '@stillstroke/contract/measures';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { getMeasures } from './measures.service';

export function measuresRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.getMeasures, ({ user, params }) => getMeasures(context, user, params.id));
  return router;
}
