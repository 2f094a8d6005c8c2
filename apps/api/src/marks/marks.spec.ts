import type { Mark, SavedMark } from '@stillstroke/contract/marks';
import type { StrokeMeasures } from '@stillstroke/contract/measures';
import { strokeFigures } from '@stillstroke/db/schema/film';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { placeClip, placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

/** Upper arm 60° ahead of the plumb, forearm 30°: worked by hand, the elbow stands at 150°. */
const joints = {
  shoulder: { x: 1000, y: 300 },
  elbow: { x: 1000 + 200 * Math.sin(Math.PI / 3), y: 300 + 200 * Math.cos(Math.PI / 3) },
  wrist: {
    x: 1000 + 200 * Math.sin(Math.PI / 3) + 180 * Math.sin(Math.PI / 6),
    y: 300 + 200 * Math.cos(Math.PI / 3) + 180 * Math.cos(Math.PI / 6),
  },
};

describe('marks', () => {
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

  const put = async (body: object, to = path) => coach.mutate('put', to).send(body);

  it('answer their angles and how far they can be trusted', async () => {
    const { jointUncertaintyPx, ...mark } = (await put(joints)).body as SavedMark;
    expect(jointUncertaintyPx).toEqual({ shoulder: 3, elbow: 2, wrist: 2 });
    expect(mark.angles.forearmDeg).toBeCloseTo(30, 9);
    expect(mark.angles.upperArmDeg).toBeCloseTo(60, 9);
    expect(mark.angles.elbowDeg).toBeCloseTo(150, 9);
    expect(mark.uncertaintyDeg.forearmDeg).toBeGreaterThan(0);
    expect(mark).toMatchObject({
      arm: 'left',
      frame: 40,
      version: 1,
      plumbAssumed: true,
      elbow: joints.elbow,
    });
    const listed = await coach.get(`/api/clips/${clipId}/marks`);
    expect(listed.body).toEqual({ items: [mark], nextCursor: null });
  });

  it('are read with the plumb and the travel of the clip, whenever those are set', async () => {
    await put(joints);
    // The camera leans by 10°: what hangs plumb runs to the lower right.
    const lean = { top: { x: 100, y: 0 }, bottom: { x: 100 + 500 * Math.tan(Math.PI / 18), y: 500 } };
    await coach.mutate('put', `/api/clips/${clipId}/calibration`).send({ plumb: lean });
    const read = async () =>
      ((await coach.get(`/api/clips/${clipId}/marks`)).body as { items: Mark[] }).items[0];
    expect((await read())?.angles.forearmDeg).toBeCloseTo(20, 6);
    expect((await read())?.plumbAssumed).toBe(false);
    await coach.mutate('patch', `/api/clips/${clipId}`).send({ travel: 'left' });
    expect((await read())?.angles.forearmDeg).toBeCloseTo(-20, 6);
    await coach.mutate('put', `/api/clips/${clipId}/calibration`).send({ plumb: null });
    expect((await read())?.plumbAssumed).toBe(true);
  });

  it('sent twice are one mark of one version', async () => {
    const first = (await put({ ...joints, version: 0 })).body as Mark;
    const again = await put({ ...joints, version: 0 });
    expect([again.status, again.body]).toEqual([200, first]);
  });

  it('made on an older version are refused with what is there now', async () => {
    await put({ ...joints, version: 0 });
    const moved = { ...joints, wrist: { x: 1300, y: 700 } };
    const { jointUncertaintyPx: _, ...second } = (await put({ ...moved, version: 1 })).body as SavedMark;
    expect(second.version).toBe(2);
    const late = await put({ ...joints, version: 1 });
    expect(late.body).toMatchObject({ status: 409, code: 'changed-meanwhile', current: second });
    const asNew = await put({ ...joints, version: 0 });
    expect(asNew.status).toBe(409);
    expect(((await put(joints)).body as Mark).version).toBe(3);
  });

  it('taken away on an older version are refused; taken away twice are not there', async () => {
    await put(joints);
    await put({ ...joints, wrist: { x: 1300, y: 700 } });
    expect((await coach.mutate('delete', `${path}?version=1`)).status).toBe(409);
    expect((await coach.mutate('delete', `${path}?version=2`)).status).toBe(204);
    expect((await coach.mutate('delete', path)).status).toBe(404);
    const gone = await put({ ...joints, version: 2 });
    expect(gone.body).toMatchObject({ status: 409, current: null });
  });

  it('of which no angle can be read are refused in words', async () => {
    const one = await put({ ...joints, elbow: joints.shoulder });
    expect(one.body).toMatchObject({ status: 422, code: 'joints-coincide' });
    expect((await put(joints, `/api/clips/${clipId}/marks/left/200`)).body).toMatchObject({
      status: 422,
      code: 'frame-out-of-range',
    });
  });

  it('change the kept figures of the stroke they lie in, and of no other', async () => {
    const stroke = { arm: 'left', entry: 20, catch: 40, exit: 80, nextEntry: 100, breath: false };
    await coach.mutate('post', `/api/clips/${clipId}/strokes`).send(stroke);
    await coach.mutate('post', `/api/clips/${clipId}/strokes`).send({ ...stroke, arm: 'right' });
    const kept = () =>
      club.context.db
        .select()
        .from(strokeFigures)
        .all()
        .filter(({ measure }) => measure === 'verticalAt');
    await put(joints);
    expect(kept()).toEqual([]);
    // Vertical forearm at frame 60, half the pull: from 30° it comes to 15° half way, a quarter of the pull.
    const vertical = { ...joints, wrist: { x: joints.elbow.x, y: joints.elbow.y + 180 } };
    await put(vertical, `/api/clips/${clipId}/marks/left/60`);
    expect(kept()).toHaveLength(1);
    expect(kept()[0]?.value).toBeCloseTo(0.25, 9);
    const measures = (await coach.get(`/api/clips/${clipId}/measures`)).body as { items: StrokeMeasures[] };
    const figure = measures.items[0]?.verticalAtShare;
    expect(figure).toMatchObject({ value: kept()[0]?.value, frame: 50, reason: null });
    expect(measures.items[1]?.verticalAtShare).toMatchObject({ value: null, reason: 'too-few-marks' });
    await coach.mutate('delete', `/api/clips/${clipId}/marks/left/60`);
    expect(kept()).toEqual([]);
  });
});
