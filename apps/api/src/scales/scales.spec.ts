import { randomUUID } from 'node:crypto';
import type { AnswerOf } from '@stillstroke/contract/endpoint';
import type { getMeasures } from '@stillstroke/contract/measures';
import type { ClipScale, Scale } from '@stillstroke/contract/scale';
import { strokes } from '@stillstroke/db/schema/film';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { placeClip, placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

const length: Scale = {
  kind: 'length',
  plane: 'swimmer',
  from: { x: 100, y: 500 },
  to: { x: 500, y: 500 },
  metres: 2,
  uncertaintyM: 0.01,
  check: null,
};
const wall: Scale = {
  kind: 'rectangle',
  plane: 'wall',
  corners: [
    { x: 100, y: 400 },
    { x: 600, y: 420 },
    { x: 580, y: 100 },
    { x: 120, y: 90 },
  ],
  widthM: 2,
  heightM: 1.2,
  uncertaintyM: 0,
  check: { from: { x: 200, y: 200 }, to: { x: 400, y: 200 }, metres: 0.8 },
};

describe('the scale of a clip', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let clipId: string;
  let path: string;
  const get = async () => (await coach.get(path)).body as ClipScale;
  const measures = async () =>
    (await coach.get(`/api/clips/${clipId}/measures`)).body as AnswerOf<typeof getMeasures>;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    const sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId).id;
    path = `/api/clips/${clipId}/scale`;
  });
  afterEach(() => club.close());

  it('is set, kept, changed and taken away, each on the version it was made on', async () => {
    expect(await get()).toEqual({ scale: null, version: 0 });
    const first = await coach.mutate('put', path).send({ scale: length, version: 0 });
    expect(first.body).toEqual({ scale: length, version: 1 });
    // Sent again over a bad line it is the same.
    expect((await coach.mutate('put', path).send({ scale: length, version: 0 })).body).toEqual(first.body);
    const stale = await coach.mutate('put', path).send({ scale: wall, version: 0 });
    expect(stale.status).toBe(409);
    expect(stale.body).toMatchObject({
      code: 'changed-meanwhile',
      current: { scale: length, version: 1 },
    });
    expect((await coach.mutate('put', path).send({ scale: wall, version: 1 })).body).toEqual({
      scale: wall,
      version: 2,
    });
    expect((await coach.mutate('delete', `${path}?version=1`)).status).toBe(409);
    expect((await coach.mutate('delete', `${path}?version=2`)).status).toBe(204);
    expect(await get()).toEqual({ scale: null, version: 0 });
    expect((await coach.mutate('delete', path)).status).toBe(404);
  });

  it('is refused in words where no distance can be read with it', async () => {
    const { width } = (await coach.get(`/api/clips/${clipId}`)).body as { width: number };
    const crossed = {
      ...wall,
      corners: [wall.corners[0], wall.corners[2], wall.corners[1], wall.corners[3]],
    };
    const bad: [unknown, RegExp][] = [
      [{ ...length, to: { x: 103, y: 500 } }, /too close/],
      [{ ...length, to: { x: 1.6 * width, y: 500 } }, /outside the picture/],
      [crossed, /cross/],
      [
        {
          ...wall,
          corners: [
            { x: 1, y: 1 },
            { x: 200, y: 1 },
            { x: 400, y: 1 },
            { x: 200, y: 300 },
          ],
        },
        /one line/,
      ],
      [{ ...wall, check: { from: { x: 1, y: 1 }, to: { x: 2, y: 2 }, metres: 1 } }, /too close/],
    ];
    for (const [scale, words] of bad) {
      const answer = await coach.mutate('put', path).send({ scale });
      expect(answer.status, JSON.stringify(scale)).toBe(422);
      expect(answer.body).toMatchObject({ code: 'scale-unusable' });
      expect((answer.body as { detail: string }).detail).toMatch(words);
    }
    expect(await get()).toEqual({ scale: null, version: 0 });
  });

  it('adds reach and depth in metres to the measures, in the swimmer’s plane only', async () => {
    placeStroke();
    expect((await measures()).items[0]?.inMetres).toBeNull();
    await coach.mutate('put', path).send({ scale: length });
    const inMetres = (await measures()).items[0]?.inMetres;
    // 200 px ahead at 5 mm a pixel; 180 px below the shoulder.
    expect(inMetres?.reachAtEntry.value).toBeCloseTo(1, 2);
    expect(inMetres?.reachAtEntry.frame).toBe(10);
    expect(inMetres?.handDepth.value).toBeCloseTo(0.9, 2);
    expect(inMetres?.handDepth.uncertainty).toBeGreaterThan(0);
    await coach.mutate('put', path).send({ scale: wall });
    const after = await measures();
    expect(after.scalePlane).toBe('wall');
    expect(after.items[0]?.inMetres?.handDepth).toMatchObject({
      value: null,
      reason: 'scale-of-other-plane',
    });
  });

  it('the measures carry the cautions of the view, which follow field of view, plumb and travel', async () => {
    placeStroke();
    const first = await measures();
    expect(first.cautions).toMatchObject([{ code: 'plumb-assumed', assumed: true }]);
    // Travel to the right: the right arm is near, the left one far.
    expect(first.items[0]?.cautions.map(({ code }) => code)).toContain('far-arm');
    await coach.mutate('patch', `/api/clips/${clipId}`).send({ travel: 'left' });
    expect((await measures()).items[0]?.cautions.map(({ code }) => code)).not.toContain('far-arm');
    const plumb = { top: { x: 640, y: 40 }, bottom: { x: 640, y: 640 } };
    await coach.mutate('put', `/api/clips/${clipId}/calibration`).send({ plumb });
    expect((await measures()).cautions).toEqual([]);
    const wide = { deg: 90, medium: 'water' };
    const patched = await coach.mutate('patch', `/api/clips/${clipId}`).send({ fieldOfView: wide });
    expect(patched.body).toMatchObject({ fieldOfView: wide });
    const port = (await measures()).items[0]?.cautions.find(({ code }) => code === 'flat-port');
    expect(port).toMatchObject({ assumed: false, arm: 'left' });
    const none = await coach.mutate('patch', `/api/clips/${clipId}`).send({ fieldOfView: null });
    expect(none.body).toMatchObject({ fieldOfView: null });
    for (const bad of [{ deg: 100, medium: 'water' }, { deg: 4, medium: 'air' }, { deg: 60 }])
      expect((await coach.mutate('patch', `/api/clips/${clipId}`).send({ fieldOfView: bad })).status).toBe(
        400,
      );
  });

  it('Compare and Trend say in short what the measures’ cautions say stroke by stroke', async () => {
    placeStroke();
    await coach.mutate('patch', `/api/clips/${clipId}`).send({ travel: 'right' });
    const far = (await measures()).items[0]?.cautions.find(({ code }) => code === 'far-arm');
    const { sessionId, athleteId } = (await coach.get(`/api/clips/${clipId}`)).body as Record<string, string>;
    type Summaries = { cautions: { code: string; measure: string; sizeDeg: number; strokes: number }[] };
    const compared = (await coach.get(`/api/sessions/${sessionId}/comparison`)).body as Summaries;
    const row = compared.cautions.find(({ code, measure }) => code === 'far-arm' && measure === 'peakDrop');
    expect(row?.sizeDeg).toBeCloseTo(
      far?.affects.find(({ reading }) => reading === 'peakDrop')?.sizeDeg ?? NaN,
      9,
    );
    expect(row?.strokes).toBe(1);
    const trend = (await coach.get(`/api/athletes/${athleteId}/trend?measure=peakDrop`)).body as Summaries;
    expect(trend.cautions).toEqual(compared.cautions.filter(({ measure }) => measure === 'peakDrop'));
    const vertical = (await coach.get(`/api/athletes/${athleteId}/trend?measure=verticalAt`))
      .body as Summaries;
    expect(vertical.cautions.map(({ code }) => code)).toContain('plumb-assumed');
  });

  /** A left stroke whose wrist is 200 px ahead of the shoulder on entry and 180 px below it at its deepest. */
  function placeStroke(): void {
    const updatedAt = club.context.now().toISOString();
    const row = { clipId, arm: 'left', entryFrame: 10, catchFrame: 20, exitFrame: 40 } as const;
    club.context.db
      .insert(strokes)
      .values({ id: randomUUID(), ...row, breath: false, updatedAt })
      .run();
    const arm = (...at: [number, number, number, number]) => ({
      shoulder: { x: 900, y: 500 },
      elbow: { x: at[0], y: at[1] },
      wrist: { x: at[2], y: at[3] },
    });
    const context = club.context;
    const marked: [number, ReturnType<typeof arm>][] = [
      [10, arm(1000, 510, 1100, 500)],
      [20, arm(1000, 520, 1090, 560)],
      [30, arm(940, 590, 930, 680)],
      [40, arm(850, 580, 780, 560)],
    ];
    for (const [frame, joints] of marked) insertMark(context, clipId, frame, joints);
  }
});

type Joints = Record<'shoulder' | 'elbow' | 'wrist', { x: number; y: number }>;

function insertMark(context: TestClub['context'], clipId: string, frame: number, joints: Joints): void {
  context.sqlite
    .prepare(
      `insert into marks (clip_id, arm, frame, shoulder_x, shoulder_y, elbow_x, elbow_y, wrist_x, wrist_y, updated_at)
       values (?, 'left', ?, ?, ?, ?, ?, ?, ?, '2026-11-30')`,
    )
    .run(
      clipId,
      frame,
      joints.shoulder.x,
      joints.shoulder.y,
      joints.elbow.x,
      joints.elbow.y,
      joints.wrist.x,
      joints.wrist.y,
    );
}
