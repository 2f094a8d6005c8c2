import * as calls from '@stillstroke/contract/strokes';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { createStroke, deleteStroke, listStrokes, updateStroke } from './strokes.service';

export function strokesRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.listStrokes, ({ user, params }) => ({
    items: listStrokes(context, user, params.id),
    nextCursor: null,
  }));
  mount(router, calls.createStroke, ({ user, params, body }) => createStroke(context, user, params.id, body));
  mount(router, calls.updateStroke, ({ user, params, body }) => updateStroke(context, user, params.id, body));
  mount(router, calls.deleteStroke, ({ user, params }) => deleteStroke(context, user, params.id));
  return router;
}
