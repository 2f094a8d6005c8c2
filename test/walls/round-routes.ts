import { randomUUID } from 'node:crypto';
import { markingRounds, roundMarks } from '@stillstroke/db/schema/repeatability';
import type { TestClub } from '../../apps/api/src/platform/test-club';
import type { RouteRow, Statuses } from './routes-table';

/** Rounds of marking again. */
export interface RoundThings {
  /** The coach's own, with one frame marked again. */
  readonly roundId: string;
}

export function placeRoundThings({ context, ids }: TestClub, clipId: string): RoundThings {
  const roundId = randomUUID();
  const point = { firstShoulderX: 400, firstShoulderY: 300, firstElbowX: 500, firstElbowY: 330 };
  context.db
    .insert(markingRounds)
    .values({ id: roundId, userId: ids.users.coach, clipId, createdAt: '2026-03-03T18:00:00.000Z' })
    .run();
  context.db
    .insert(roundMarks)
    .values({
      roundId,
      position: 0,
      arm: 'left',
      frame: 20,
      ...point,
      firstWristX: 560,
      firstWristY: 420,
      shoulderX: 401,
      shoulderY: 301,
      elbowX: 501,
      elbowY: 331,
      wristX: 561,
      wristY: 421,
    })
    .run();
  return { roundId };
}

/** How closely somebody repeats their marks is nobody else's business, not even an admin's. */
const own = (status: number): Statuses => [401, 404, status, 404, 403, 403, 403, 404, 404, 403];
const ownRead: Statuses = [401, 404, 200, 404, 404, 404, 404, 404, 404, 404];
const clipRead: Statuses = [401, 200, 200, 404, 404, 404, 404, 404, 404, 404];
const onClip = (status: number): Statuses => [401, status, status, 404, 403, 403, 403, 404, 404, 403];
const staff = (status: number): Statuses => [401, status, status, status, 403, 403, 403, status, status, 403];

const rounds = ({ clipId }: { clipId: string }) => `/api/clips/${clipId}/marking-rounds`;
const round = ({ roundId }: RoundThings) => `/api/marking-rounds/${roundId}`;
const joints = { shoulder: { x: 400, y: 300 }, elbow: { x: 500, y: 330 }, wrist: { x: 560, y: 420 } };

export const roundRoutes: readonly RouteRow[] = [
  { route: 'get /api/clips/:id/marking-rounds', path: rounds, statuses: clipRead },
  {
    // One mark is too few for a round: refused, but only to those who may know of the clip.
    route: 'post /api/clips/:id/marking-rounds',
    path: rounds,
    body: () => ({}),
    statuses: onClip(422),
  },
  {
    route: 'get /api/clips/:id/marking-agreement',
    path: ({ clipId }) => `/api/clips/${clipId}/marking-agreement`,
    statuses: clipRead,
  },
  { route: 'get /api/marking-rounds/:id', path: round, statuses: ownRead },
  {
    route: 'put /api/marking-rounds/:id/marks/:position',
    path: (things) => `${round(things)}/marks/0`,
    body: () => joints,
    statuses: own(200),
  },
  {
    route: 'post /api/marking-rounds/:id/finish',
    path: (things) => `${round(things)}/finish`,
    statuses: own(200),
  },
  { route: 'delete /api/marking-rounds/:id', path: round, statuses: own(204) },
  { route: 'get /api/marking', path: () => '/api/marking', statuses: staff(200) },
  { route: 'delete /api/marking', path: () => '/api/marking', statuses: staff(204) },
];
