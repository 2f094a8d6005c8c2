import * as calls from '@stillstroke/contract/trend';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { getTrend } from './trend.service';

export function trendRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.getTrend, ({ user, params, query }) => getTrend(context, user, params.id, query));
  return router;
}
