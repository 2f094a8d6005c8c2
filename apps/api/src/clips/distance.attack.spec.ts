import type { Clip } from '@stillstroke/contract/clip-facts';
import { clipFrames } from '@stillstroke/db/schema/film';
import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { tryAsEverybody } from '../media/attack';
import { packFrames } from '../media/frame-blobs';
import { placeClip, placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

const distance = { metres: 5, uncertaintyM: 0.05, fromFrame: 10, toFrame: 180 };

describe('attacks on the known distance of a clip', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let clipId: string;
  let path: string;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    const sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId).id;
    path = `/api/clips/${clipId}/distance`;
  });
  afterEach(() => club.close());

  const put = (body: object) => coach.mutate('put', path).send(body);

  it('reach nobody outside the squad and the club, and change nothing for those who may look', async () => {
    const mayNot = { athlete: 403, otherAthlete: 403, guardian: 403, foreignAthlete: 403 };
    await tryAsEverybody(club, {
      method: 'put',
      path,
      body: { distance },
      answers: { ...mayNot, admin: 200, coach: 200 },
    });
  });

  it('of distances that are none are refused in words, and leave the one that is there', async () => {
    expect((await put({ distance })).status).toBe(200);
    const wrong: [object, number][] = [
      [{}, 400],
      [{ distance: { ...distance, metres: -5 } }, 400],
      [{ distance: { ...distance, metres: 0 } }, 400],
      [{ distance: { ...distance, metres: Number.NaN } }, 400],
      [{ distance: { ...distance, metres: '5' } }, 400],
      [{ distance: { ...distance, metres: 1e308 } }, 400],
      [{ distance: { ...distance, uncertaintyM: -0.1 } }, 400],
      [{ distance: { ...distance, uncertaintyM: Number.POSITIVE_INFINITY } }, 400],
      [{ distance: { ...distance, uncertaintyM: 5 } }, 400],
      [{ distance: { ...distance, fromFrame: 180 } }, 400],
      [{ distance: { ...distance, fromFrame: 181 } }, 400],
      [{ distance: { ...distance, fromFrame: -1 } }, 400],
      [{ distance: { ...distance, toFrame: 20.5 } }, 400],
      [{ distance: { ...distance, toFrame: null } }, 400],
      [{ distance: { ...distance, speed: 1.4 } }, 400],
      [{ distance: { ...distance, toFrame: 200 } }, 422],
    ];
    for (const [body, status] of wrong) {
      const answer = await put(body);
      expect([body, answer.status]).toEqual([body, status]);
      expect((answer.body as { detail: string }).detail.length).toBeGreaterThan(10);
    }
    const raw = `{"distance":{"metres":1e999,"uncertaintyM":0,"fromFrame":1,"toFrame":2}}`;
    expect((await coach.mutate('put', path).type('json').send(raw)).status).toBe(400);
    expect(((await coach.get(`/api/clips/${clipId}`)).body as Clip).distance).toEqual(distance);
    expect((await put({ distance: null })).status).toBe(200);
    expect(((await coach.get(`/api/clips/${clipId}`)).body as Clip).distance).toBeNull();
  });

  it('over frames between which no time passes are refused', async () => {
    const times = Array.from({ length: 200 }, (_, frame) => (frame < 100 ? 0 : frame * 20_000));
    club.context.db
      .update(clipFrames)
      .set(packFrames({ timestampsUs: times, keyFrames: [0] }))
      .where(eq(clipFrames.clipId, clipId))
      .run();
    const answer = await put({ distance: { ...distance, fromFrame: 1, toFrame: 90 } });
    expect([answer.status, (answer.body as { code: string }).code]).toEqual([422, 'distance-unusable']);
  });
});
