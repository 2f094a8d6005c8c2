import { getHealth, getOpenApi } from '@stillstroke/contract/health';
import { surface } from '@stillstroke/contract/surface';
import { Router } from 'express';
import packageFile from '../../../../package.json';
import { mountPublic } from './mount';
import { openApiDocument } from './openapi';

export function healthRoutes(): Router {
  const router = Router();
  mountPublic(router, getHealth, () => ({ status: 'ok' as const, version: packageFile.version }));
  let document: ReturnType<typeof openApiDocument> | undefined;
  mountPublic(router, getOpenApi, () => (document ??= openApiDocument(surface)));
  return router;
}
