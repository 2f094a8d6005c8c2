import * as calls from '@stillstroke/contract/review-lists';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { addObservation, listObservations, updateObservation } from './observations.service';
import { addSnippet, deleteSnippet, listSnippets, updateSnippet } from './snippets.service';

export function reviewListsRoutes(context: AppContext): Router {
  const router = Router();
  const all = <T>(items: T[]) => ({ items, nextCursor: null });
  mount(router, calls.listObservations, ({ user }) => all(listObservations(context, user)));
  mount(router, calls.addObservation, ({ user, body }) => addObservation(context, user, body.name));
  mount(router, calls.updateObservation, ({ user, params, body }) =>
    updateObservation(context, user, params.id, body),
  );
  mount(router, calls.listSnippets, ({ user }) => all(listSnippets(context, user)));
  mount(router, calls.addSnippet, ({ user, body }) => addSnippet(context, user, body.words));
  mount(router, calls.updateSnippet, ({ user, params, body }) =>
    updateSnippet(context, user, params.id, body),
  );
  mount(router, calls.deleteSnippet, ({ user, params, query }) =>
    deleteSnippet(context, user, params.id, query.version),
  );
  return router;
}
