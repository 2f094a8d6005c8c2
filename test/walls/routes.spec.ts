import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { TestBrowser } from '../../apps/api/src/platform/test-browser';
import { openTestClub, type TestClub } from '../../apps/api/src/platform/test-club';
import { mountedRoutes } from './mounted-routes';
import { callers, placeThings, routes, type Caller, type RouteRow, type Things } from './routes-table';

/** Tries every cell of the table of routes for real. Each request runs inside a savepoint that is rolled back. */
let club: TestClub;
let things: Things;
const browsers = new Map<Caller, TestBrowser>();

beforeAll(async () => {
  club = await openTestClub();
  things = placeThings(club);
  for (const caller of callers) {
    const browser = caller === 'anonymous' ? club.anonymous() : await club.agentFor(caller);
    if (caller === 'anonymous') await browser.get('/api/health');
    browsers.set(caller, browser);
  }
});
afterAll(() => club.close());

describe('the table of routes', () => {
  it('has every route that is mounted, and none besides', () => {
    expect(routes.map((row) => row.route).sort()).toEqual(mountedRoutes(club.app));
  });

  it('refuses strangers and other clubs whatever is not public', () => {
    for (const { route, statuses } of routes) {
      const [anonymous] = statuses;
      if (isPublic(route)) continue;
      expect(anonymous, route).toBe(401);
    }
  });
});

describe.each(routes)('$route', (row) => {
  it.each(callers.map((caller, n) => [caller, row.statuses[n]] as const))(
    '%s: %i',
    async (caller, status) => {
      expect(await statusFor(row, caller)).toBe(status);
    },
  );
});

const isPublic = (route: string) =>
  /\/(auth\/(sign-in|page|password-wish)|password-resets\/|invitations\/|health|openapi)/.test(route);

async function statusFor({ route, path, body, query }: RouteRow, caller: Caller): Promise<number> {
  const browser = browsers.get(caller);
  if (!browser) throw new Error(`${caller} has no browser`);
  const [method] = route.split(' ') as ['get' | 'post' | 'put' | 'patch' | 'delete'];
  const address = `${path(things)}${query ?? ''}`;
  club.context.sqlite.exec('savepoint cell');
  try {
    const call = browser.bare(method, address);
    return (await (body ? call.send(body(things) as object) : call)).status;
  } finally {
    club.context.sqlite.exec('rollback to cell; release cell');
  }
}
