import { randomUUID } from 'node:crypto';
import * as calls from '@stillstroke/contract/targets';
import { targets } from '@stillstroke/db/schema/targets';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { tryAsEverybody } from '../media/attack';
import { attack } from '../platform/test-attack';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';
import { placeTarget } from './test-targets';

const ofOwn = (club: TestClub) => `/api/athletes/${club.ids.athletes.own}/targets`;

attack(calls.listTargets, {
  path: ofOwn,
  by: 'coach',
  refused: { otherCoach: 404, otherAthlete: 404, guardian: 404, foreignAdmin: 404, foreignCoach: 404 },
});

attack(calls.createTarget, {
  path: ofOwn,
  by: 'coach',
  good: () => ({ measure: 'verticalAt', arm: 'both', low: 0.1, high: 0.35, words: 'fingers down early' }),
  refused: { otherCoach: 404, athlete: 403, otherAthlete: 403, guardian: 403, foreignAdmin: 404 },
  nullable: ['low', 'high'],
});

describe('attacks on a target', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let path: string;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    path = `/api/targets/${placeTarget(club.context, club.ids.athletes.own)}`;
  });
  afterEach(() => club.close());

  const mayNot = { athlete: 403, otherAthlete: 403, guardian: 403, foreignAthlete: 403 };
  const stored = () => club.context.db.select().from(targets).all();

  it('change nothing for those who may only look, or not even that', async () => {
    // Those who may come on a version that never was.
    await tryAsEverybody(club, {
      method: 'patch',
      path,
      body: { words: 'x', version: 0 },
      answers: { ...mayNot, admin: 409, coach: 409 },
    });
    await tryAsEverybody(club, {
      method: 'post',
      path: `${path}/restore`,
      answers: { ...mayNot, admin: 200, coach: 200 },
    });
    const before = stored();
    for (const who of ['athlete', 'otherCoach', 'foreignAdmin', 'foreignCoach'] as const) {
      const browser = await club.agentFor(who);
      expect((await browser.mutate('delete', path)).status).toBe(who === 'athlete' ? 403 : 404);
    }
    expect(stored()).toEqual(before);
  });

  it('with bodies that are none are refused and write nothing', async () => {
    const before = stored();
    const bodies = [
      '{}',
      '[]',
      'null',
      '{"version":1}',
      '{"words":"x"}',
      '{"words":"x","version":"1"}',
      '{"words":"x","version":1.5}',
      '{"words":"","version":1}',
      `{"words":"${'x'.repeat(201)}","version":1}`,
      '{"high":1e999,"version":1}',
      '{"high":"0.4","version":1}',
      '{"high":NaN,"version":1}',
      '{"high":0.4,"version":1,"measure":"pull"}',
      '{"high":0.4,"version":1,"athleteId":"x"}',
      '{"high":0.4,"version":1,"setBy":"x"}',
    ];
    for (const body of bodies) {
      const answer = await coach.mutate('patch', path).type('json').send(body);
      expect([body, answer.status]).toEqual([body, 400]);
    }
    expect(stored()).toEqual(before);
  });

  it('with ids that are none find nothing', async () => {
    for (const id of [randomUUID(), '1', '%00', '..%2f..', "1'%20or%20'1'='1"]) {
      const there = `/api/targets/${id}`;
      expect((await coach.mutate('patch', there).send({ words: 'x', version: 1 })).status, id).toBe(404);
      expect((await coach.mutate('delete', there)).status, id).toBe(404);
      expect((await coach.mutate('post', `${there}/restore`)).status, id).toBe(404);
    }
  });
});
