import * as calls from '@stillstroke/contract/stills';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { sendPicture } from './send-picture';
import { addStill, deleteStill, pictureOf, replaceStill, updateStill } from './stills.service';

export function stillsRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.addStill, ({ user, params, req }) => addStill(context, user, params.id, req));
  mount(router, calls.replaceStill, ({ user, params, req }) => replaceStill(context, user, params.id, req));
  mount(router, calls.updateStill, ({ user, params, body }) => updateStill(context, user, params.id, body));
  mount(router, calls.deleteStill, ({ user, params, query }) =>
    deleteStill(context, user, params.id, query.version),
  );
  mount(router, calls.getStillPicture, ({ user, params, res }) =>
    sendPicture(context.settings, pictureOf(context, user, params.id), res),
  );
  return router;
}
