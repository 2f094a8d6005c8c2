import { observations, snippets } from '@stillstroke/db/schema/review';
import { randomUUID } from 'node:crypto';
import type { TestClub } from '../../apps/api/src/platform/test-club';
import { placeQuestion, placeReview, type PlacedReview } from '../../apps/api/src/reviews/test-reviews';
import type { RouteRow, Statuses } from './routes-table';

/** Reviews of the athlete `own` and what belongs to them. */
export interface ReviewThings {
  readonly draft: PlacedReview;
  readonly sent: PlacedReview;
  readonly questionId: string;
  readonly observationId: string;
  /** The coach's own. */
  readonly snippetId: string;
}

export function placeReviewThings(club: TestClub): ReviewThings {
  const { context, ids } = club;
  const sent = placeReview(club, 'sent');
  const [observationId, snippetId, createdAt] = [randomUUID(), randomUUID(), '2026-03-03T18:00:00.000Z'];
  context.db
    .insert(observations)
    .values({ id: observationId, clubId: ids.clubs.tarnValley, name: 'Wrist leads', createdAt })
    .run();
  context.db
    .insert(snippets)
    .values({ id: snippetId, userId: ids.users.coach, words: 'Slow is smooth.', createdAt })
    .run();
  return {
    sent,
    draft: placeReview(club, 'draft'),
    questionId: placeQuestion(club, sent.findingId),
    observationId,
    snippetId,
  };
}

const change = (status: number): Statuses => [401, status, status, 404, 403, 403, 403, 404, 404, 403];
const read: Statuses = [401, 200, 200, 404, 200, 404, 404, 404, 404, 404];
/** What is done by the athlete alone. */
const own = (status: number): Statuses => [401, 403, 403, 403, status, 404, 403, 403, 403, 404];
const staff = (status: number): Statuses => [401, status, status, status, 403, 403, 403, status, status, 403];

const reviews = ({ athletes }: { athletes: { own: string } }) => `/api/athletes/${athletes.own}/reviews`;

export const reviewRoutes: readonly RouteRow[] = [
  { route: 'get /api/athletes/:id/reviews', path: reviews, statuses: read },
  {
    route: 'post /api/athletes/:id/reviews',
    path: reviews,
    body: ({ draft }) => ({ sessionId: draft.sessionId }),
    statuses: change(201),
  },
  { route: 'get /api/reviews/:id', path: ({ sent }) => `/api/reviews/${sent.reviewId}`, statuses: read },
  {
    route: 'patch /api/reviews/:id',
    path: ({ draft }) => `/api/reviews/${draft.reviewId}`,
    body: () => ({ version: 1, mainFocus: null }),
    statuses: change(200),
  },
  {
    route: 'delete /api/reviews/:id',
    path: ({ draft }) => `/api/reviews/${draft.reviewId}`,
    query: '?version=1',
    statuses: change(204),
  },
  {
    route: 'post /api/reviews/:id/send',
    path: ({ draft }) => `/api/reviews/${draft.reviewId}/send`,
    body: ({ draft }) => ({ version: 1, findings: [{ id: draft.findingId, version: 1 }] }),
    statuses: change(200),
  },
  {
    route: 'post /api/reviews/:id/read',
    path: ({ sent }) => `/api/reviews/${sent.reviewId}/read`,
    statuses: own(200),
  },
  {
    route: 'post /api/reviews/:id/findings',
    path: ({ draft }) => `/api/reviews/${draft.reviewId}/findings`,
    body: () => ({ words: 'A long reach.' }),
    statuses: change(201),
  },
  {
    route: 'patch /api/findings/:id',
    path: ({ draft }) => `/api/findings/${draft.findingId}`,
    body: () => ({ version: 1, words: 'A long reach.' }),
    statuses: change(200),
  },
  {
    route: 'delete /api/findings/:id',
    path: ({ draft }) => `/api/findings/${draft.findingId}`,
    query: '?version=1',
    statuses: change(204),
  },
  {
    route: 'post /api/findings/:id/questions',
    path: ({ sent }) => `/api/findings/${sent.findingId}/questions`,
    body: () => ({ words: 'Why?' }),
    statuses: own(201),
  },
  {
    route: 'post /api/questions/:id/answers',
    path: ({ questionId }) => `/api/questions/${questionId}/answers`,
    body: () => ({ words: 'Because.' }),
    statuses: change(201),
  },
  {
    // Without a picture in it an upload that may be made is refused as malformed.
    route: 'post /api/findings/:id/stills',
    path: ({ draft }) => `/api/findings/${draft.findingId}/stills`,
    statuses: change(400),
  },
  {
    route: 'put /api/stills/:id',
    path: ({ draft }) => `/api/stills/${draft.stillId}`,
    statuses: change(400),
  },
  {
    route: 'patch /api/stills/:id',
    path: ({ draft }) => `/api/stills/${draft.stillId}`,
    body: () => ({ version: 1, words: 'The catch, right' }),
    statuses: change(200),
  },
  {
    // Of a version that is not there: the file would be gone for the next who tries.
    route: 'delete /api/stills/:id',
    path: ({ draft }) => `/api/stills/${draft.stillId}`,
    query: '?version=7',
    statuses: change(409),
  },
  {
    route: 'get /api/stills/:id/picture',
    path: ({ sent }) => `/api/stills/${sent.stillId}/picture`,
    statuses: read,
  },
  { route: 'get /api/observations', path: () => '/api/observations', statuses: staff(200) },
  {
    route: 'post /api/observations',
    path: () => '/api/observations',
    body: () => ({ name: 'Late breath' }),
    statuses: staff(201),
  },
  {
    route: 'patch /api/observations/:id',
    path: ({ observationId }) => `/api/observations/${observationId}`,
    body: () => ({ version: 1, retired: true }),
    statuses: [401, 200, 200, 200, 403, 403, 403, 404, 404, 403],
  },
  { route: 'get /api/snippets', path: () => '/api/snippets', statuses: staff(200) },
  {
    route: 'post /api/snippets',
    path: () => '/api/snippets',
    body: () => ({ words: 'One thing at a time.' }),
    statuses: staff(201),
  },
  {
    route: 'patch /api/snippets/:id',
    path: ({ snippetId }) => `/api/snippets/${snippetId}`,
    body: () => ({ version: 1, words: 'Slow.' }),
    statuses: [401, 404, 200, 404, 403, 403, 403, 404, 404, 403],
  },
  {
    route: 'delete /api/snippets/:id',
    path: ({ snippetId }) => `/api/snippets/${snippetId}`,
    query: '?version=1',
    statuses: [401, 404, 204, 404, 403, 403, 403, 404, 404, 403],
  },
];
