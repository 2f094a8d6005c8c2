import * as calls from '@stillstroke/contract/athletes';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { attack } from '../platform/test-attack';
import { openTestClub, type TestClub } from '../platform/test-club';

attack(calls.listAthletes, {
  path: () => '/api/athletes',
  by: 'coach',
  refused: { guardian: 403 },
});

describe('the list of athletes', () => {
  let club: TestClub;
  beforeAll(async () => {
    club = await openTestClub();
  });
  afterAll(() => club.close());

  it.each([
    'limit=0',
    'limit=201',
    'limit=2.5',
    'limit=NaN',
    'limit=1e999',
    'sort=email',
    'sort=name;drop table athletes',
    'direction=up',
    'squadId=1',
    'includeDeactivated=1',
    `search=${'x'.repeat(121)}`,
    // Two of the same key arrive as a list, which no key takes.
    'search=a&search=b',
    `cursor=${'x'.repeat(401)}`,
  ])('takes no %s', async (query) => {
    const answer = await (await club.agentFor('coach')).get(`/api/athletes?${query}`);
    expect(answer.body).toMatchObject({ status: 400, code: 'bad-request' });
  });
});

attack(calls.createAthlete, {
  path: () => '/api/athletes',
  by: 'coach',
  good: (club) => ({ name: 'Juno Tarrant', squadId: club.ids.squads.dawn }),
  refused: { otherCoach: 400, athlete: 403, guardian: 403, foreignAdmin: 400, foreignCoach: 400 },
});

attack(calls.getAthlete, {
  path: (club) => `/api/athletes/${club.ids.athletes.own}`,
  by: 'coach',
  refused: { otherCoach: 404, otherAthlete: 404, guardian: 404, foreignAdmin: 404, foreignCoach: 404 },
});

attack(calls.updateAthlete, {
  path: (club) => `/api/athletes/${club.ids.athletes.own}`,
  by: 'coach',
  good: (club) => ({ name: 'Ebba L.', squadId: club.ids.squads.dawn, deactivated: false }),
  refused: { otherCoach: 404, athlete: 403, otherAthlete: 403, foreignAdmin: 404, foreignCoach: 404 },
});
