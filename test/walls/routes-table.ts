import { randomUUID } from 'node:crypto';
import { marks, strokes } from '@stillstroke/db/schema/film';
import { placeTarget } from '../../apps/api/src/targets/test-targets';
import { clipScales } from '@stillstroke/db/schema/scale';
import { issueInvitation } from '../../apps/api/src/invitations/issue';
import { linkKey } from '../../apps/api/src/mail/link-token';
import { placeGivenUpMail, placeReset } from '../../apps/api/src/mail/test-mails';
import { placeClip, placeSession } from '../../apps/api/src/media/test-films';
import { emailOf, testPassword, type ClubIds, type TestClub } from '../../apps/api/src/platform/test-club';
import { placeRoundThings, roundRoutes, type RoundThings } from './round-routes';
import { placeReviewThings, reviewRoutes, type ReviewThings } from './review-routes';

/**
 * Every route with what each kind of caller gets. All paths lead to things of the athlete `own`, whom `coach` coaches and
 * who is `athlete`. To add a route: one row, its statuses in the order of `callers`.
 *
 * - no sign-in is 401, also for what is not there
 * - a thing one may not know of is 404; a change that the role may never make is 403
 */
export const callers = [
  'anonymous',
  'admin',
  'coach',
  'otherCoach',
  'athlete',
  'otherAthlete',
  'guardian',
  'foreignAdmin',
  'foreignCoach',
  'foreignAthlete',
] as const;
export type Caller = (typeof callers)[number];

/** What is there when a route is tried. */
export interface Things extends ClubIds, ReviewThings, RoundThings {
  readonly sessionId: string;
  readonly clipId: string;
  readonly strokeId: string;
  readonly targetId: string;
  readonly token: string;
  readonly resetToken: string;
  /** A mail to `coach` that was given up. */
  readonly mailId: string;
}

export type Statuses = readonly [
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
];

export interface RouteRow {
  readonly route: string;
  readonly path: (things: Things) => string;
  readonly query?: string;
  readonly body?: (things: Things) => unknown;
  readonly statuses: Statuses;
}

/** A session with a clip, a stroke and a mark for the athlete `own`, and an invitation for `guardian`. */
export function placeThings(club: TestClub): Things {
  const { context, ids } = club;
  const sessionId = placeSession(context, ids.athletes.own);
  const clipId = placeClip(context, ids.athletes.own, sessionId).id;
  const strokeId = randomUUID();
  const updatedAt = context.now().toISOString();
  context.db
    .insert(strokes)
    .values({
      id: strokeId,
      clipId,
      arm: 'left',
      entryFrame: 10,
      catchFrame: 20,
      exitFrame: 60,
      breath: false,
      updatedAt,
    })
    .run();
  context.db
    .insert(marks)
    .values({
      clipId,
      arm: 'left',
      frame: 20,
      shoulderX: 400,
      shoulderY: 300,
      elbowX: 500,
      elbowY: 330,
      wristX: 560,
      wristY: 420,
      updatedAt,
    })
    .run();
  const targetId = placeTarget(context, ids.athletes.own);
  context.db.insert(clipScales).values({ clipId, scale, updatedAt }).run();
  const { token } = issueInvitation(context.db, context.now(), ids.users.guardian, linkKey(context.settings));
  return {
    ...ids,
    ...placeReviewThings(club),
    ...placeRoundThings(club, clipId),
    sessionId,
    clipId,
    strokeId,
    targetId,
    token,
    resetToken: placeReset(club),
    mailId: placeGivenUpMail(club),
  };
}

/** Everybody who is signed in. */
const open: Statuses = [200, 200, 200, 200, 200, 200, 200, 200, 200, 200];
const admins = (status: number): Statuses => [401, status, 403, 403, 403, 403, 403, status, 403, 403];
const adminsHere = (status: number): Statuses => [401, status, 403, 403, 403, 403, 403, 404, 403, 403];
/** Reading what belongs to the athlete. */
const read: Statuses = [401, 200, 200, 404, 200, 404, 404, 404, 404, 404];
/** Changing it is for the admin and the coach of the squad. */
const change = (status: number): Statuses => [401, status, status, 404, 403, 403, 403, 404, 404, 403];
/** The athlete may do this for themselves as well. */
const changeOwn = (status: number): Statuses => [401, status, status, 404, status, 404, 403, 404, 404, 404];

const athlete = ({ athletes }: Things) => `/api/athletes/${athletes.own}`;
const session = ({ sessionId }: Things) => `/api/sessions/${sessionId}`;
const clip = ({ clipId }: Things) => `/api/clips/${clipId}`;
const target = ({ targetId }: Things) => `/api/targets/${targetId}`;
const stroke = ({ strokeId }: Things) => `/api/strokes/${strokeId}`;
const scale = {
  kind: 'length',
  plane: 'swimmer',
  from: { x: 100, y: 100 },
  to: { x: 400, y: 100 },
  metres: 1,
  uncertaintyM: 0,
  check: null,
};
const joints = { shoulder: { x: 400, y: 300 }, elbow: { x: 500, y: 330 }, wrist: { x: 560, y: 420 } };

const emptyExport = ({ sessionId, athletes }: Things) => ({
  format: { name: 'stillstroke-export', version: 1 },
  exportedAt: '2026-03-02T18:00:00.000Z',
  scope: { kind: 'session', id: sessionId },
  athlete: { id: athletes.own, name: 'Ebba Lindqvist' },
  sessions: [],
  trend: [],
});

export const routes: readonly RouteRow[] = [
  { route: 'get /api/health', path: () => '/api/health', statuses: open },
  { route: 'get /api/openapi.json', path: () => '/api/openapi.json', statuses: open },
  { route: 'get /api/auth/page', path: () => '/api/auth/page', statuses: open },
  {
    route: 'get /api/auth/me',
    path: () => '/api/auth/me',
    statuses: [401, 200, 200, 200, 200, 200, 200, 200, 200, 200],
  },
  {
    route: 'post /api/auth/sign-in',
    path: () => '/api/auth/sign-in',
    body: () => ({ email: emailOf('coach'), password: testPassword }),
    statuses: open,
  },
  {
    route: 'post /api/auth/sign-out',
    path: () => '/api/auth/sign-out',
    statuses: [401, 204, 204, 204, 204, 204, 204, 204, 204, 204],
  },
  {
    route: 'get /api/invitations/:token',
    path: ({ token }) => `/api/invitations/${token}`,
    statuses: open,
  },
  {
    route: 'post /api/invitations/:token/accept',
    path: ({ token }) => `/api/invitations/${token}/accept`,
    body: () => ({ password: 'seven herons over weir' }),
    statuses: open,
  },

  {
    // Another address each time: wishes for one are limited.
    route: 'post /api/auth/password-wish',
    path: () => '/api/auth/password-wish',
    body: () => ({ email: `${randomUUID()}@tarn.example` }),
    statuses: [204, 204, 204, 204, 204, 204, 204, 204, 204, 204],
  },
  {
    route: 'get /api/password-resets/:token',
    path: ({ resetToken }) => `/api/password-resets/${resetToken}`,
    statuses: open,
  },
  {
    route: 'post /api/password-resets/:token',
    path: ({ resetToken }) => `/api/password-resets/${resetToken}`,
    body: () => ({ password: 'seven herons over weir' }),
    statuses: open,
  },
  {
    route: 'get /api/mail-wishes',
    path: () => '/api/mail-wishes',
    statuses: [401, 200, 200, 200, 200, 200, 200, 200, 200, 200],
  },
  {
    route: 'put /api/mail-wishes/:kind',
    path: () => '/api/mail-wishes/answer',
    body: () => ({ on: false }),
    statuses: [401, 200, 200, 200, 200, 200, 200, 200, 200, 200],
  },
  { route: 'get /api/outbox', path: () => '/api/outbox', statuses: admins(200) },
  {
    route: 'get /api/outbox/:id',
    path: ({ mailId }) => `/api/outbox/${mailId}`,
    statuses: [401, 200, 404, 404, 404, 404, 404, 404, 404, 404],
  },
  {
    route: 'post /api/outbox/:id/retry',
    path: ({ mailId }) => `/api/outbox/${mailId}/retry`,
    statuses: adminsHere(200),
  },

  { route: 'get /api/people', path: () => '/api/people', statuses: admins(200) },
  {
    route: 'post /api/people',
    path: () => '/api/people',
    body: () => ({ name: 'Mara Holt', email: 'mara@tarn.example', role: 'coach' }),
    statuses: admins(201),
  },
  {
    route: 'patch /api/people/:id',
    path: ({ users }) => `/api/people/${users.coach}`,
    body: () => ({ name: 'Mara Holt' }),
    statuses: adminsHere(200),
  },
  {
    route: 'post /api/people/:id/invitation',
    path: ({ users }) => `/api/people/${users.coach}/invitation`,
    statuses: adminsHere(201),
  },

  {
    route: 'get /api/squads',
    path: () => '/api/squads',
    statuses: [401, 200, 200, 200, 403, 403, 403, 200, 200, 403],
  },
  {
    route: 'post /api/squads',
    path: () => '/api/squads',
    body: () => ({ name: 'Noon squad' }),
    statuses: admins(201),
  },
  {
    route: 'patch /api/squads/:id',
    path: ({ squads }) => `/api/squads/${squads.dawn}`,
    body: () => ({ name: 'Noon squad' }),
    statuses: adminsHere(200),
  },

  {
    route: 'get /api/athletes',
    path: () => '/api/athletes',
    statuses: [401, 200, 200, 200, 200, 200, 403, 200, 200, 200],
  },
  {
    route: 'post /api/athletes',
    path: () => '/api/athletes',
    body: ({ squads }) => ({ name: 'Juno Tarrant', squadId: squads.dawn }),
    statuses: [401, 201, 201, 400, 403, 403, 403, 400, 400, 403],
  },
  { route: 'get /api/athletes/:id', path: athlete, statuses: read },
  {
    route: 'patch /api/athletes/:id',
    path: athlete,
    body: () => ({ name: 'Ebba L.' }),
    statuses: change(200),
  },
  {
    route: 'get /api/athletes/:id/trend',
    path: (things) => `${athlete(things)}/trend`,
    query: '?measure=verticalAt',
    statuses: read,
  },

  { route: 'get /api/athletes/:id/targets', path: (things) => `${athlete(things)}/targets`, statuses: read },
  {
    route: 'post /api/athletes/:id/targets',
    path: (things) => `${athlete(things)}/targets`,
    body: () => ({ measure: 'peakDrop', arm: 'left', low: null, high: 12, words: 'elbow up' }),
    statuses: change(201),
  },
  {
    route: 'patch /api/targets/:id',
    path: target,
    body: () => ({ words: 'sooner', version: 1 }),
    statuses: change(200),
  },
  { route: 'delete /api/targets/:id', path: target, statuses: change(200) },
  {
    route: 'post /api/targets/:id/restore',
    path: (things) => `${target(things)}/restore`,
    statuses: change(200),
  },

  {
    route: 'get /api/athletes/:id/sessions',
    path: (things) => `${athlete(things)}/sessions`,
    statuses: read,
  },
  {
    route: 'post /api/athletes/:id/sessions',
    path: (things) => `${athlete(things)}/sessions`,
    body: () => ({ date: '2026-03-09' }),
    statuses: changeOwn(201),
  },
  { route: 'get /api/sessions/:id', path: session, statuses: read },
  { route: 'patch /api/sessions/:id', path: session, body: () => ({ place: 'Lido' }), statuses: change(200) },
  { route: 'delete /api/sessions/:id', path: session, statuses: change(200) },
  {
    route: 'post /api/sessions/:id/restore',
    path: (things) => `${session(things)}/restore`,
    statuses: change(200),
  },
  {
    route: 'get /api/sessions/:id/comparison',
    path: (things) => `${session(things)}/comparison`,
    statuses: read,
  },
  {
    // Without a file in it an upload that may be made is refused as malformed.
    route: 'post /api/sessions/:id/clips',
    path: (things) => `${session(things)}/clips`,
    statuses: changeOwn(400),
  },

  { route: 'get /api/clips/:id', path: clip, statuses: read },
  { route: 'patch /api/clips/:id', path: clip, body: () => ({ travel: 'left' }), statuses: change(200) },
  { route: 'delete /api/clips/:id', path: clip, statuses: change(200) },
  {
    route: 'post /api/clips/:id/restore',
    path: (things) => `${clip(things)}/restore`,
    statuses: change(200),
  },
  { route: 'get /api/clips/:id/media', path: (things) => `${clip(things)}/media`, statuses: read },
  {
    // The clip has no poster: nobody learns more than that there is none.
    route: 'get /api/clips/:id/poster',
    path: (things) => `${clip(things)}/poster`,
    statuses: [401, 404, 404, 404, 404, 404, 404, 404, 404, 404],
  },
  { route: 'get /api/clips/:id/frames', path: (things) => `${clip(things)}/frames`, statuses: read },
  {
    route: 'put /api/clips/:id/distance',
    path: (things) => `${clip(things)}/distance`,
    body: () => ({ distance: { metres: 5, uncertaintyM: 0.05, fromFrame: 10, toFrame: 100 } }),
    statuses: change(200),
  },
  {
    route: 'put /api/clips/:id/calibration',
    path: (things) => `${clip(things)}/calibration`,
    body: () => ({ plumb: { top: { x: 100, y: 50 }, bottom: { x: 104, y: 650 } } }),
    statuses: change(200),
  },
  { route: 'get /api/clips/:id/scale', path: (things) => `${clip(things)}/scale`, statuses: read },
  {
    route: 'put /api/clips/:id/scale',
    path: (things) => `${clip(things)}/scale`,
    body: () => ({ scale }),
    statuses: change(200),
  },
  {
    route: 'delete /api/clips/:id/scale',
    path: (things) => `${clip(things)}/scale`,
    statuses: change(204),
  },
  { route: 'get /api/clips/:id/measures', path: (things) => `${clip(things)}/measures`, statuses: read },

  { route: 'get /api/clips/:id/strokes', path: (things) => `${clip(things)}/strokes`, statuses: read },
  {
    route: 'post /api/clips/:id/strokes',
    path: (things) => `${clip(things)}/strokes`,
    body: () => ({ arm: 'right', entry: 40, catch: 50, exit: 90, breath: true }),
    statuses: change(201),
  },
  { route: 'patch /api/strokes/:id', path: stroke, body: () => ({ breath: true }), statuses: change(200) },
  { route: 'delete /api/strokes/:id', path: stroke, statuses: change(204) },
  {
    route: 'get /api/strokes/:id/explanation',
    path: (things) => `${stroke(things)}/explanation`,
    query: '?measure=verticalAt',
    statuses: read,
  },

  { route: 'get /api/clips/:id/marks', path: (things) => `${clip(things)}/marks`, statuses: read },
  {
    route: 'put /api/clips/:id/marks/:arm/:frame',
    path: (things) => `${clip(things)}/marks/left/21`,
    body: () => joints,
    statuses: change(200),
  },
  {
    route: 'delete /api/clips/:id/marks/:arm/:frame',
    path: (things) => `${clip(things)}/marks/left/20`,
    statuses: change(204),
  },

  ...roundRoutes,
  ...reviewRoutes,
  ...(['clips', 'sessions', 'athletes'] as const).map((of) => ({
    route: `get /api/${of}/:id/export`,
    path: (things: Things) => `${{ clips: clip, sessions: session, athletes: athlete }[of](things)}/export`,
    statuses: read,
  })),
  {
    route: 'post /api/sessions/:id/import/preview',
    path: (things) => `${session(things)}/import/preview`,
    body: (things) => ({ file: emptyExport(things) }),
    statuses: change(200),
  },
  {
    // The file has no clip, so that there is nothing to put anywhere; the basis is nobody's.
    route: 'post /api/sessions/:id/import',
    path: (things) => `${session(things)}/import`,
    body: (things) => ({ file: emptyExport(things), choice: 'add', basis: 'none' }),
    statuses: change(409),
  },
];
