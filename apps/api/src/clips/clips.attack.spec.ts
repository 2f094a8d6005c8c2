import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { tryAsEverybody } from '../media/attack';
import { placeClip, placeSession, upload } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

describe('attacks on clips', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let sessionId: string;
  let clipId: string;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId).id;
  });
  afterEach(() => club.close());

  it('see no film, frames or facts from outside the squad and the club', async () => {
    const seen = { admin: 200, coach: 200, athlete: 200 };
    for (const part of ['', '/media', '/frames'])
      await tryAsEverybody(club, { method: 'get', path: `/api/clips/${clipId}${part}`, answers: seen });
    await tryAsEverybody(club, { method: 'get', path: `/api/clips/${clipId}/poster`, answers: {} });
  });

  it('change nothing for those who may only look, or not even that', async () => {
    const mayNot = { athlete: 403, otherAthlete: 403, guardian: 403, foreignAthlete: 403 };
    await tryAsEverybody(club, {
      method: 'patch',
      path: `/api/clips/${clipId}`,
      body: { travel: 'left' },
      answers: { ...mayNot, admin: 200, coach: 200 },
    });
    await tryAsEverybody(club, {
      method: 'put',
      path: `/api/clips/${clipId}/calibration`,
      body: { plumb: { top: { x: 10, y: 10 }, bottom: { x: 12, y: 400 } } },
      answers: { ...mayNot, admin: 200, coach: 200 },
    });
    await tryAsEverybody(club, {
      method: 'post',
      path: `/api/clips/${clipId}/restore`,
      answers: { ...mayNot, admin: 200, coach: 200 },
    });
    for (const who of ['athlete', 'otherCoach', 'foreignAdmin'] as const) {
      const browser = await club.agentFor(who);
      const status = (await browser.mutate('delete', `/api/clips/${clipId}`)).status;
      expect([who, status]).toEqual([who, who === 'athlete' ? 403 : 404]);
    }
    expect((await coach.get(`/api/clips/${clipId}`)).status).toBe(200);
  });

  it('put no film into a session out of reach', async () => {
    for (const who of ['otherCoach', 'otherAthlete', 'foreignAdmin', 'foreignCoach'] as const) {
      const browser = await club.agentFor(who);
      expect([who, (await upload(browser, sessionId, 'single-frame.mp4')).status]).toEqual([who, 404]);
    }
    expect((await upload(await club.agentFor('guardian'), sessionId, 'single-frame.mp4')).status).toBe(403);
  });

  it('learn nothing from a duplicate that is not theirs to see', async () => {
    await upload(coach, sessionId, 'single-frame.mp4');
    const foreign = placeSession(club.context, club.ids.athletes.foreign);
    const answer = await upload(await club.agentFor('foreignCoach'), foreign, 'single-frame.mp4');
    expect(answer.status).toBe(201);
  });

  it('with bodies that are none are refused in words', async () => {
    const patches = [
      {},
      { view: 'drone' },
      { captureRateFactor: 0 },
      { captureRateFactor: null },
      { stroke: 'full', id: 'x' },
    ];
    for (const body of patches)
      expect([body, (await coach.mutate('patch', `/api/clips/${clipId}`).send(body)).status]).toEqual([
        body,
        400,
      ]);
    const huge = '{"captureRateFactor":1e999}';
    expect((await coach.mutate('patch', `/api/clips/${clipId}`).type('json').send(huge)).status).toBe(400);
    const calibration = `/api/clips/${clipId}/calibration`;
    const short = { plumb: { top: { x: 0, y: 0 }, bottom: { x: 0, y: 5 } } };
    expect((await coach.mutate('put', calibration).send(short)).body).toMatchObject({
      status: 422,
      code: 'plumb-too-short',
    });
    const level = { plumb: { top: { x: 0, y: 0 }, bottom: { x: 500, y: 1 } } };
    expect((await coach.mutate('put', calibration).send(level)).status).toBe(422);
    expect((await coach.mutate('put', calibration).send({ plumb: { top: { x: 0, y: 0 } } })).status).toBe(
      400,
    );
  });
});
