import { randomUUID } from 'node:crypto';
import type { Stroke } from '@stillstroke/contract/strokes';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { tryAsEverybody } from '../media/attack';
import { placeClip, placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

const events = { arm: 'left', entry: 10, catch: 20, exit: 50, nextEntry: 70, breath: false };

describe('attacks on strokes', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let clipId: string;
  let path: string;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    const sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId).id;
    path = `/api/clips/${clipId}/strokes`;
  });
  afterEach(() => club.close());

  const add = async (change: object = {}) => coach.mutate('post', path).send({ ...events, ...change });

  it('reach nobody outside the squad and the club', async () => {
    const { id } = (await add()).body as Stroke;
    const mayNot = { athlete: 403, otherAthlete: 403, guardian: 403, foreignAthlete: 403 };
    const answers = { ...mayNot, admin: 200, coach: 200 };
    await tryAsEverybody(club, {
      method: 'patch',
      path: `/api/strokes/${id}`,
      body: { breath: true },
      answers,
    });
    await tryAsEverybody(club, { method: 'get', path, answers: { admin: 200, coach: 200, athlete: 200 } });
    await tryAsEverybody(club, {
      method: 'post',
      path,
      body: { ...events, arm: 'right', id: randomUUID() },
      answers: { ...mayNot, admin: 201, coach: 201 },
    });
    for (const who of ['otherCoach', 'foreignAdmin', 'athlete'] as const) {
      const browser = await club.agentFor(who);
      const status = (await browser.mutate('delete', `/api/strokes/${id}`)).status;
      expect(status).toBe(who === 'athlete' ? 403 : 404);
    }
    expect((await coach.mutate('delete', `/api/strokes/${id}`)).status).toBe(204);
    expect((await coach.mutate('delete', `/api/strokes/${id}`)).status).toBe(404);
  });

  it('of bodies that are none are refused in words', async () => {
    const wrong = [
      { entry: -1 },
      { entry: 1.5 },
      { catch: '20' },
      { exit: null },
      { arm: 'both' },
      { breath: 'yes' },
      { breath: undefined },
      { midPull: 30 },
      { entrySource: 'guessed' },
      { exitSource: null },
      { id: 'mine' },
    ];
    for (const change of wrong) expect([change, (await add(change)).status]).toEqual([change, 400]);
    const { id } = (await add()).body as Stroke;
    for (const body of [{}, { version: 1 }, { arm: 'right' }, { entry: 1e99 }, { catchSource: 'wrist' }])
      expect((await coach.mutate('patch', `/api/strokes/${id}`).send(body)).status).toBe(400);
  });
});
