import type { Router } from 'express';
import { clipsRoutes } from './clips/clips.routes';
import { comparisonRoutes } from './comparison/comparison.routes';
import { marksRoutes } from './marks/marks.routes';
import { measuresRoutes } from './measures/measures.routes';
import type { AppContext } from './platform/context';
import { sessionsRoutes } from './sessions/sessions.routes';
import { strokesRoutes } from './strokes/strokes.routes';
import { trendRoutes } from './trend/trend.routes';

export type RouterFactory = (context: AppContext) => Router;

/** The router of every resource, in no particular order: their paths do not overlap. */
export const routers: readonly RouterFactory[] = [
  sessionsRoutes,
  clipsRoutes,
  strokesRoutes,
  marksRoutes,
  measuresRoutes,
  comparisonRoutes,
  trendRoutes,
];
