import { randomUUID } from 'node:crypto';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { tryAsEverybody } from '../media/attack';
import { placeClip, placeSession } from '../media/test-films';
import { coachOf, enterStroke } from '../measures/test-strokes';
import { openTestClub, type TestClub } from '../platform/test-club';

describe('attacks on explanations', () => {
  let club: TestClub;
  let clipId: string;
  let path: string;

  beforeEach(async () => {
    club = await openTestClub();
    const sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId, { frameCount: 800 }).id;
    const wish = { arm: 'left', entry: 100, verticalAt: 0.5 } as const;
    path = `/api/strokes/${enterStroke(club.context, coachOf(club.ids), clipId, wish)}/explanation`;
  });
  afterEach(() => club.close());

  it('reach nobody outside the squad and the club', async () => {
    await tryAsEverybody(club, {
      method: 'get',
      path: `${path}?measure=pull`,
      answers: { admin: 200, coach: 200, athlete: 200 },
    });
  });

  it('of queries that are none are refused, of strokes that are none not found', async () => {
    const coach = await club.agentFor('coach');
    for (const query of [
      '',
      '?measure=',
      '?measure=speed',
      '?measure=pull&measure=push',
      '?measure=pull&arm=left',
    ])
      expect((await coach.get(path + query)).status, query).toBe(400);
    for (const id of [randomUUID(), '1', '%00'])
      expect((await coach.get(`/api/strokes/${id}/explanation?measure=pull`)).status, id).toBe(404);
  });

  it('show nothing of a clip that is deleted', async () => {
    const coach = await club.agentFor('coach');
    await coach.mutate('delete', `/api/clips/${clipId}`);
    expect((await coach.get(`${path}?measure=pull`)).status).toBe(404);
  });
});
