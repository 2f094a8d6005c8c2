import type { Mark } from '@stillstroke/contract/marks';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { tryAsEverybody } from '../media/attack';
import { placeClip, placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

const joints = { shoulder: { x: 1000, y: 300 }, elbow: { x: 1170, y: 400 }, wrist: { x: 1260, y: 560 } };

describe('attacks on marks', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let clipId: string;
  let path: string;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    const sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId).id;
    path = `/api/clips/${clipId}/marks/left/40`;
  });
  afterEach(() => club.close());

  it('reach nobody outside the squad and the club', async () => {
    const mayNot = { athlete: 403, otherAthlete: 403, guardian: 403, foreignAthlete: 403 };
    await tryAsEverybody(club, {
      method: 'put',
      path,
      body: joints,
      answers: { ...mayNot, admin: 200, coach: 200 },
    });
    const seen = { admin: 200, coach: 200, athlete: 200 };
    for (const part of ['marks', 'measures'])
      await tryAsEverybody(club, { method: 'get', path: `/api/clips/${clipId}/${part}`, answers: seen });
    for (const who of ['otherCoach', 'foreignAdmin', 'athlete'] as const) {
      const browser = await club.agentFor(who);
      expect((await browser.mutate('delete', path)).status).toBe(who === 'athlete' ? 403 : 404);
    }
    expect(((await coach.get(`/api/clips/${clipId}/marks`)).body as { items: Mark[] }).items).toHaveLength(1);
  });

  it('with bodies and addresses that are none are refused', async () => {
    const bodies = [
      '{}',
      '{"shoulder":{"x":1,"y":2},"elbow":{"x":1,"y":3}}',
      JSON.stringify({ ...joints, hand: joints.wrist }),
      JSON.stringify({ ...joints, wrist: { x: null, y: 1 } }),
      JSON.stringify({ ...joints, wrist: { x: '1', y: 1 } }),
      JSON.stringify({ ...joints, wrist: { x: 1, y: 1, z: 1 } }),
      JSON.stringify(joints).replace('300', '1e999'),
      JSON.stringify({ ...joints, version: -1 }),
      JSON.stringify({ ...joints, wrist: { x: 20_001, y: 0 } }),
      'NaN',
      '{"shoulder":',
    ];
    for (const body of bodies) {
      const answer = await coach.mutate('put', path).type('json').send(body);
      expect([body, answer.status]).toEqual([body, 400]);
    }
    for (const place of ['middle/40', 'left/-1', 'left/4.5', 'left/x', 'left/99999999999'])
      expect((await coach.mutate('put', `/api/clips/${clipId}/marks/${place}`).send(joints)).status).toBe(
        404,
      );
    expect((await coach.mutate('delete', `${path}?version=x`)).status).toBe(400);
  });
});
