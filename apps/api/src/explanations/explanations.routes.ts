import * as calls from '@stillstroke/contract/explanation';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { explainStroke } from './explanations.service';

export function explanationsRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.getStrokeExplanation, ({ user, params, query }) =>
    explainStroke(context, user, params.id, query.measure),
  );
  return router;
}
