import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { tryAsEverybody } from '../media/attack';
import { placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

describe('attacks on sessions', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let athleteId: string;
  let sessionId: string;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    athleteId = club.ids.athletes.own;
    sessionId = placeSession(club.context, athleteId);
  });
  afterEach(() => club.close());

  it('reach nobody outside the squad and the club', async () => {
    const seen = { admin: 200, coach: 200, athlete: 200 };
    await tryAsEverybody(club, { method: 'get', path: `/api/sessions/${sessionId}`, answers: seen });
    await tryAsEverybody(club, { method: 'get', path: `/api/athletes/${athleteId}/sessions`, answers: seen });
    await tryAsEverybody(club, {
      method: 'post',
      path: `/api/athletes/${athleteId}/sessions`,
      body: { date: '2026-01-01' },
      answers: { admin: 201, coach: 201, athlete: 201, guardian: 403 },
    });
  });

  it('change nothing for those who may only look, or not even that', async () => {
    const mayNot = { athlete: 403, otherAthlete: 403, guardian: 403, foreignAthlete: 403 };
    await tryAsEverybody(club, {
      method: 'patch',
      path: `/api/sessions/${sessionId}`,
      body: { note: 'x' },
      answers: { ...mayNot, admin: 200, coach: 200 },
    });
    await tryAsEverybody(club, {
      method: 'post',
      path: `/api/sessions/${sessionId}/restore`,
      answers: { ...mayNot, admin: 200, coach: 200 },
    });
    const path = `/api/sessions/${sessionId}`;
    for (const who of ['athlete', 'otherCoach', 'foreignAdmin', 'foreignCoach'] as const) {
      const browser = await club.agentFor(who);
      expect((await browser.mutate('delete', path)).status).toBe(who === 'athlete' ? 403 : 404);
    }
    expect((await coach.get(path)).status).toBe(200);
  });

  it('with bodies that are none are refused in words', async () => {
    const path = `/api/athletes/${athleteId}/sessions`;
    const bodies: unknown[] = [
      {},
      { date: '2026-02-30' },
      { date: 20260101 },
      { date: '2026-01-01', colour: 'blue' },
      { date: '2026-01-01', note: 'x'.repeat(2001) },
      { date: '2026-01-01', place: ['a'] },
      { date: '2026-01-01T00:00:00Z' },
      [],
      null,
    ];
    for (const body of bodies) {
      const answer = await coach.mutate('post', path).type('json').send(JSON.stringify(body));
      expect([body, answer.status]).toEqual([body, 400]);
    }
    expect((await coach.mutate('patch', `/api/sessions/${sessionId}`).send({})).status).toBe(400);
    expect((await coach.get(`${path}?limit=0`)).status).toBe(400);
    expect((await coach.get(`${path}?limit=201`)).status).toBe(400);
    expect((await coach.get(`${path}?order=up`)).status).toBe(400);
    expect((await coach.get('/api/sessions/1%27%20or%201=1')).status).toBe(404);
  });
});
