import { getHealth } from '@stillstroke/contract/health';
import { Router } from 'express';
import packageFile from '../../../../package.json';
import { mountPublic } from './mount';

export function healthRoutes(): Router {
  const router = Router();
  mountPublic(router, getHealth, () => ({ status: 'ok' as const, version: packageFile.version }));
  return router;
}
