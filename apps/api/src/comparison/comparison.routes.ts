import * as calls from '@stillstroke/contract/comparison';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { getComparison } from './comparison.service';

export function comparisonRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.getComparison, ({ user, params }) => getComparison(context, user, params.id));
  return router;
}
