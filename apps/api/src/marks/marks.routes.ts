import * as calls from '@stillstroke/contract/marks';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { deleteMark, listMarks, putMark } from './marks.service';

export function marksRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.listMarks, ({ user, params }) => ({
    items: listMarks(context, user, params.id),
    nextCursor: null,
  }));
  mount(router, calls.putMark, ({ user, params, body }) => putMark(context, user, params, body));
  mount(router, calls.deleteMark, ({ user, params, query }) => deleteMark(context, user, params, query));
  return router;
}
