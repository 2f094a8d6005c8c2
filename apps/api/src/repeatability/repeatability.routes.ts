import * as calls from '@stillstroke/contract/repeatability';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { getAgreement } from './agreement.service';
import { forgetMarking, getMarking } from './figures.service';
import {
  deleteRound,
  finishRound,
  getRound,
  listClipRounds,
  putRoundMark,
  startRound,
} from './rounds.service';

export function repeatabilityRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.listClipRounds, ({ user, params }) => ({
    items: listClipRounds(context, user, params.id),
    nextCursor: null,
  }));
  mount(router, calls.startRound, ({ user, params, body }) => startRound(context, user, params.id, body));
  mount(router, calls.getRound, ({ user, params }) => getRound(context, user, params.id));
  mount(router, calls.putRoundMark, ({ user, params, body }) => putRoundMark(context, user, params, body));
  mount(router, calls.finishRound, ({ user, params }) => finishRound(context, user, params.id));
  mount(router, calls.deleteRound, ({ user, params }) => deleteRound(context, user, params.id));
  mount(router, calls.getMarking, ({ user }) => getMarking(context, user));
  mount(router, calls.forgetMarking, ({ user }) => forgetMarking(context, user));
  mount(router, calls.getAgreement, ({ user, params }) => ({
    items: getAgreement(context, user, params.id),
    nextCursor: null,
  }));
  return router;
}
