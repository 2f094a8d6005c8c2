import * as calls from '@stillstroke/contract/import';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { importInto, previewOf } from './imports.service';

export function importsRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.previewImport, ({ user, params, body }) => previewOf(context, user, params.id, body));
  mount(router, calls.importFile, ({ user, params, body }) => importInto(context, user, params.id, body));
  return router;
}
