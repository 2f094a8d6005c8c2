import type { Router } from 'express';
import type { AppContext } from './platform/context';

export type RouterFactory = (context: AppContext) => Router;

/** The router of every resource, in no particular order: their paths do not overlap. */
export const routers: readonly RouterFactory[] = [];
