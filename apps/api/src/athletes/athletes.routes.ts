import * as calls from '@stillstroke/contract/athletes';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { createAthlete, getAthlete, listAthletes, updateAthlete } from './athletes.service';

export function athletesRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.listAthletes, ({ user, query }) => listAthletes(context, user, query));
  mount(router, calls.createAthlete, ({ user, body }) => createAthlete(context, user, body));
  mount(router, calls.getAthlete, ({ user, params }) => getAthlete(context, user, params.id));
  mount(router, calls.updateAthlete, ({ user, params, body }) =>
    updateAthlete(context, user, params.id, body),
  );
  return router;
}
