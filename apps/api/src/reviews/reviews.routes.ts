import * as calls from '@stillstroke/contract/reviews';
import { Router } from 'express';
import type { AppContext } from '../platform/context';
import { mount } from '../platform/mount';
import { addFinding, deleteFinding, updateFinding } from './findings.service';
import { answerQuestion, askQuestion } from './questions.service';
import { createReview, deleteReview, getReview, listReviews, updateReview } from './reviews.service';
import { readReview, sendReview } from './sending.service';

export function reviewsRoutes(context: AppContext): Router {
  const router = Router();
  mount(router, calls.listReviews, ({ user, params, query }) => listReviews(context, user, params.id, query));
  mount(router, calls.createReview, ({ user, params, body }) => createReview(context, user, params.id, body));
  mount(router, calls.getReview, ({ user, params }) => getReview(context, user, params.id));
  mount(router, calls.updateReview, ({ user, params, body }) => updateReview(context, user, params.id, body));
  mount(router, calls.deleteReview, ({ user, params, query }) =>
    deleteReview(context, user, params.id, query.version),
  );
  mount(router, calls.sendReview, ({ user, params, body }) => sendReview(context, user, params.id, body));
  mount(router, calls.readReview, ({ user, params }) => readReview(context, user, params.id));
  mount(router, calls.addFinding, ({ user, params, body }) => addFinding(context, user, params.id, body));
  mount(router, calls.updateFinding, ({ user, params, body }) =>
    updateFinding(context, user, params.id, body),
  );
  mount(router, calls.deleteFinding, ({ user, params, query }) =>
    deleteFinding(context, user, params.id, query.version),
  );
  mount(router, calls.askQuestion, ({ user, params, body }) => askQuestion(context, user, params.id, body));
  mount(router, calls.answerQuestion, ({ user, params, body }) =>
    answerQuestion(context, user, params.id, body),
  );
  return router;
}
