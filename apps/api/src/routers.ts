import type { Router } from 'express';
import { athletesRoutes } from './athletes/athletes.routes';
import { clipsRoutes } from './clips/clips.routes';
import { comparisonRoutes } from './comparison/comparison.routes';
import { explanationsRoutes } from './explanations/explanations.routes';
import { exportsRoutes } from './exports/exports.routes';
import { importsRoutes } from './imports/imports.routes';
import { invitationsRoutes } from './invitations/invitations.routes';
import { mailRoutes } from './mail/mail.routes';
import { marksRoutes } from './marks/marks.routes';
import { measuresRoutes } from './measures/measures.routes';
import { passwordResetRoutes } from './password-reset/password-reset.routes';
import { peopleRoutes } from './people/people.routes';
import type { AppContext } from './platform/context';
import { repeatabilityRoutes } from './repeatability/repeatability.routes';
import { reviewListsRoutes } from './review-lists/review-lists.routes';
import { reviewsRoutes } from './reviews/reviews.routes';
import { scalesRoutes } from './scales/scales.routes';
import { sessionsRoutes } from './sessions/sessions.routes';
import { squadsRoutes } from './squads/squads.routes';
import { stillsRoutes } from './stills/stills.routes';
import { strokesRoutes } from './strokes/strokes.routes';
import { targetsRoutes } from './targets/targets.routes';
import { trendRoutes } from './trend/trend.routes';

export type RouterFactory = (context: AppContext) => Router;

/** The router of every resource, in no particular order: their paths do not overlap. */
export const routers: readonly RouterFactory[] = [
  peopleRoutes,
  invitationsRoutes,
  squadsRoutes,
  athletesRoutes,
  sessionsRoutes,
  clipsRoutes,
  strokesRoutes,
  marksRoutes,
  measuresRoutes,
  scalesRoutes,
  explanationsRoutes,
  comparisonRoutes,
  trendRoutes,
  repeatabilityRoutes,
  reviewsRoutes,
  stillsRoutes,
  reviewListsRoutes,
  targetsRoutes,
  exportsRoutes,
  importsRoutes,
  mailRoutes,
  passwordResetRoutes,
];
