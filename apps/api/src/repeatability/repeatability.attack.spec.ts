import type { MarkingRoundWithMarks } from '@stillstroke/contract/repeatability';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { coachOf, enterStroke } from '../measures/test-strokes';
import { tryAsEverybody } from '../media/attack';
import { placeClip, placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

const joints = { shoulder: { x: 1000, y: 300 }, elbow: { x: 1170, y: 400 }, wrist: { x: 1260, y: 560 } };

describe('attacks on rounds of marking again', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let clipId: string;
  let round: MarkingRoundWithMarks;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    const sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId).id;
    for (const arm of ['left', 'right'] as const) {
      enterStroke(club.context, coachOf(club.ids), clipId, { arm, entry: 0, verticalAt: 0.5 });
    }
    const answer = await coach.mutate('post', `/api/clips/${clipId}/marking-rounds`).send({ frames: 3 });
    round = answer.body as MarkingRoundWithMarks;
  });
  afterEach(() => club.close());

  it('reach nobody but the coach whose round it is', async () => {
    const mayNot = { athlete: 403, otherAthlete: 403, guardian: 403, foreignAthlete: 403 };
    const own = { ...mayNot, coach: 200 };
    // Reading what is for others looks the same as reading what is not there.
    const path = `/api/marking-rounds/${round.id}`;
    await tryAsEverybody(club, { method: 'get', path, answers: { coach: 200 } });
    await tryAsEverybody(club, { method: 'put', path: `${path}/marks/0`, body: joints, answers: own });
    await tryAsEverybody(club, { method: 'delete', path, answers: { ...mayNot, coach: 204 } });
    const onClip = { ...mayNot, admin: 201, coach: 201 };
    await tryAsEverybody(club, {
      method: 'post',
      path: `/api/clips/${clipId}/marking-rounds`,
      body: { frames: 3 },
      answers: onClip,
    });
  });

  it('with bodies and addresses that are none are refused', async () => {
    const path = `/api/marking-rounds/${round.id}/marks`;
    const bodies = [
      '{}',
      JSON.stringify({ ...joints, hand: joints.wrist }),
      JSON.stringify({ ...joints, wrist: { x: null, y: 1 } }),
      JSON.stringify(joints).replace('300', '1e999'),
      JSON.stringify({ ...joints, wrist: { x: 20_001, y: 0 } }),
      '[]',
      'NaN',
    ];
    for (const body of bodies) {
      const answer = await coach.mutate('put', `${path}/0`).type('json').send(body);
      expect([body, answer.status]).toEqual([body, 400]);
    }
    for (const position of ['-1', 'x', '1.5', '99999', '3']) {
      const answer = await coach.mutate('put', `${path}/${position}`).send(joints);
      expect([position, answer.status]).toEqual([position, 404]);
    }
    for (const frames of [0, 2, 41, 1.5, '3', null]) {
      const answer = await coach.mutate('post', `/api/clips/${clipId}/marking-rounds`).send({ frames });
      expect([frames, answer.status]).toEqual([frames, 400]);
    }
    const point = { ...joints, elbow: joints.wrist };
    expect((await coach.mutate('put', `${path}/0`).send(point)).status).toBe(422);
  });

  it('on a finished round are refused, so that its figures stay what they were', async () => {
    for (const { position } of round.marks)
      await coach.mutate('put', `/api/marking-rounds/${round.id}/marks/${position}`).send(joints);
    expect((await coach.mutate('post', `/api/marking-rounds/${round.id}/finish`)).status).toBe(200);
    expect((await coach.mutate('post', `/api/marking-rounds/${round.id}/finish`)).status).toBe(200);
    const late = await coach.mutate('put', `/api/marking-rounds/${round.id}/marks/0`).send(joints);
    expect([late.status, (late.body as { code: string }).code]).toEqual([409, 'round-finished']);
  });

  it('on a clip that was deleted find nothing', async () => {
    expect((await coach.mutate('delete', `/api/clips/${clipId}`)).status).toBe(200);
    expect((await coach.get(`/api/marking-rounds/${round.id}`)).status).toBe(404);
    expect((await coach.get('/api/marking')).body).toMatchObject({ rounds: [] });
  });
});
