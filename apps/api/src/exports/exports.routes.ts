import * as calls from '@stillstroke/contract/export';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { exportParts } from './export-parts';
import { sendExport } from './send-export';

export function exportsRoutes(context: AppContext): Router {
  const router = Router();
  const offer = (call: typeof calls.exportClip, kind: calls.ExportScope) =>
    mount(router, call, ({ user, params, query, res }) =>
      sendExport(exportParts(context, user, kind, params.id), query.format, res),
    );
  offer(calls.exportClip, 'clip');
  offer(calls.exportSession, 'session');
  offer(calls.exportAthlete, 'athlete');
  return router;
}
