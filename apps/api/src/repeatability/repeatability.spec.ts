import type { Clip } from '@stillstroke/contract/clip-facts';
import type { Mark, SavedMark } from '@stillstroke/contract/marks';
import type { StrokeMeasures } from '@stillstroke/contract/measures';
import type { Agreements, MarkingFigures, MarkingRoundWithMarks } from '@stillstroke/contract/repeatability';
import type { Trend } from '@stillstroke/contract/trend';
import { clips, strokeFigures } from '@stillstroke/db/schema/film';
import { eq, isNotNull } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { refreshOutdatedFigures } from '../measures/figures';
import { coachOf, enterStroke } from '../measures/test-strokes';
import { placeClip, placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

describe('marking again', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let clipId: string;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    const sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId, { frameCount: 1000 }).id;
    const user = coachOf(club.ids);
    for (const entry of [0, 80, 160]) {
      for (const arm of ['left', 'right'] as const) {
        enterStroke(club.context, user, clipId, { arm, entry, verticalAt: 0.5 });
      }
    }
  });
  afterEach(() => club.close());

  const read = async <T>(path: string, who = coach) => (await who.get(path)).body as T;
  const marks = async () => (await read<{ items: Mark[] }>(`/api/clips/${clipId}/marks`)).items;
  const start = async (who: TestBrowser, frames?: number) => {
    const answer = await who.mutate('post', `/api/clips/${clipId}/marking-rounds`).send({ frames });
    expect(answer.status).toBe(201);
    return answer.body as MarkingRoundWithMarks;
  };
  /** Marks every frame of a round again, each joint off by so many pixels, to either side in turn. */
  const markAgain = async (who: TestBrowser, round: MarkingRoundWithMarks, off: number) => {
    const there = await marks();
    for (const { position, arm, frame } of round.marks) {
      const first = there.find((mark) => mark.arm === arm && mark.frame === frame);
      if (!first) throw new Error(`no ${arm} mark on ${frame}`);
      const d = position % 2 === 0 ? off : -off;
      const moved = ({ x, y }: { x: number; y: number }, way: number) => ({ x: x + way * d, y: y - way * d });
      const answer = await who.mutate('put', `/api/marking-rounds/${round.id}/marks/${position}`).send({
        shoulder: moved(first.shoulder, 1),
        elbow: moved(first.elbow, -1),
        wrist: moved(first.wrist, 1),
      });
      expect(answer.status).toBe(200);
    }
    return who.mutate('post', `/api/marking-rounds/${round.id}/finish`);
  };

  it('shows marked frames once each, in random order, never with the first marks', async () => {
    const round = await start(coach, 12);
    const places = round.marks.map(({ arm, frame }) => `${arm} ${frame}`);
    expect(places).toHaveLength(12);
    expect(new Set(places).size).toBe(12);
    expect([...places].sort()).toEqual((await marks()).map(({ arm, frame }) => `${arm} ${frame}`).sort());
    expect(JSON.stringify(round)).not.toContain('first');
    expect(round.marks.every(({ again }) => again === null)).toBe(true);
    const orders = await Promise.all([1, 2, 3, 4].map(() => start(coach, 12)));
    const order = (one: MarkingRoundWithMarks) => one.marks.map(({ arm, frame }) => `${arm}${frame}`).join();
    expect(new Set([round, ...orders].map(order)).size).toBeGreaterThan(1);
  });

  it('is kept between visits, and not finished before every frame is marked', async () => {
    const round = await start(coach, 4);
    const joints = { shoulder: { x: 1, y: 2 }, elbow: { x: 30, y: 40 }, wrist: { x: 50, y: 90 } };
    const path = `/api/marking-rounds/${round.id}/marks/2`;
    const once = await coach.mutate('put', path).send(joints);
    expect((await coach.mutate('put', path).send(joints)).body).toEqual(once.body);
    const again = await read<MarkingRoundWithMarks>(`/api/marking-rounds/${round.id}`);
    expect(again.marked).toBe(1);
    expect(again.marks[2]?.again).toEqual(joints);
    const refused = await coach.mutate('post', `/api/marking-rounds/${round.id}/finish`);
    expect([refused.status, (refused.body as { code: string }).code]).toEqual([422, 'round-not-done']);
  });

  it('changes the uncertainty of every reading of the coach’s clips, and forgetting takes it back', async () => {
    const measures = async () =>
      (await read<{ items: StrokeMeasures[] }>(`/api/clips/${clipId}/measures`)).items;
    const trend = () => read<Trend>(`/api/athletes/${club.ids.athletes.own}/trend?measure=peakDrop`);
    const before = { marks: await marks(), measures: await measures(), trend: await trend() };
    expect((await markAgain(coach, await start(coach, 12), 8)).status).toBe(200);
    const after = { marks: await marks(), measures: await measures(), trend: await trend() };
    const wider = (now: number | null | undefined, then: number | null | undefined) =>
      expect(now ?? 0).toBeGreaterThan((then ?? NaN) * 1.2);
    wider(after.marks[0]?.uncertaintyDeg.forearmDeg, before.marks[0]?.uncertaintyDeg.forearmDeg);
    wider(after.measures[0]?.peakElbowDrop.uncertainty, before.measures[0]?.peakElbowDrop.uncertainty);
    wider(after.trend.arms[0]?.points[0]?.marking, before.trend.arms[0]?.points[0]?.marking);
    // Each coordinate 8 px off: an SD of 8/√2 in x and in y.
    const { figures } = await read<MarkingFigures>('/api/marking');
    expect(figures).toMatchObject({ frames: 12, rounds: 1, inUse: true, degreesOfFreedom: 24 });
    expect(figures?.spreadAt1080.wrist).toBeCloseTo(8 / Math.SQRT2, 9);
    const clip = await read<Clip>(`/api/clips/${clipId}`);
    expect(clip.jointUncertaintyOwn).toBe(true);
    expect(clip.jointUncertaintyPx.elbow).toBeCloseTo(8 / Math.SQRT2, 9);

    expect((await coach.mutate('delete', '/api/marking')).status).toBe(204);
    expect({ marks: await marks(), measures: await measures(), trend: await trend() }).toEqual(before);
    expect((await read<MarkingFigures>('/api/marking')).rounds).toEqual([]);
  });

  it('leaves the default standing with fewer than ten frames', async () => {
    const before = await marks();
    await markAgain(coach, await start(coach, 9), 8);
    expect(await marks()).toEqual(before);
    expect((await read<MarkingFigures>('/api/marking')).figures).toMatchObject({ frames: 9, inUse: false });
    await markAgain(coach, await start(coach, 3), 8);
    expect((await read<MarkingFigures>('/api/marking')).figures).toMatchObject({ frames: 12, inUse: true });
    expect(await marks()).not.toEqual(before);
  });

  it('goes with whoever placed most of a clip’s marks', async () => {
    await markAgain(coach, await start(coach, 12), 8);
    const admin = await club.agentFor('admin');
    const own = async () => (await read<Clip>(`/api/clips/${clipId}`)).jointUncertaintyOwn;
    const place = async (frame: number) => {
      const joints = { shoulder: { x: 900, y: 300 }, elbow: { x: 1090, y: 350 }, wrist: { x: 1200, y: 500 } };
      const answer = await admin.mutate('put', `/api/clips/${clipId}/marks/left/${frame}`).send(joints);
      expect(answer.status).toBe(200);
    };
    for (let n = 0; n < 12; n++) await place(300 + n);
    // As many as the coach, and the later: the admin's spread is not known.
    expect(await own()).toBe(false);
    expect((await admin.mutate('delete', `/api/clips/${clipId}/marks/left/300`)).status).toBe(204);
    expect(await own()).toBe(true);
  });

  it('stands in the very first mark on a clip that nobody had marked, so that the Desk can follow', async () => {
    await markAgain(coach, await start(coach, 12), 8);
    const sessionId = placeSession(club.context, club.ids.athletes.own);
    const fresh = placeClip(club.context, club.ids.athletes.own, sessionId).id;
    const spread = async () => (await read<Clip>(`/api/clips/${fresh}`)).jointUncertaintyPx;
    const usual = await spread();
    const joints = { shoulder: { x: 900, y: 300 }, elbow: { x: 1090, y: 350 }, wrist: { x: 1200, y: 500 } };
    const put = await coach.mutate('put', `/api/clips/${fresh}/marks/left/5`).send(joints);
    const told = (put.body as SavedMark).jointUncertaintyPx;
    expect(told.shoulder).toBeGreaterThan(usual.shoulder);
    expect(await spread()).toEqual(told);
    const { items } = await read<{ items: Mark[] }>(`/api/clips/${fresh}/marks`);
    expect(items[0]?.uncertaintyDeg).toEqual((put.body as SavedMark).uncertaintyDeg);
    // Sent once more it says the same.
    const again = await coach.mutate('put', `/api/clips/${fresh}/marks/left/5`).send(joints);
    expect(again.body).toEqual(put.body);
  });

  it('weighs what two coaches read against what placing the marks leaves open', async () => {
    const admin = await club.agentFor('admin');
    const round = await start(admin, 10);
    const there = await marks();
    for (const { position, arm, frame } of round.marks) {
      const first = there.find((mark) => mark.arm === arm && mark.frame === frame);
      if (!first) throw new Error('not marked');
      const { shoulder, elbow, wrist } = first;
      // The wrist alone, always the same way across the forearm: it turns by 20 px over its 180.
      const [dx, dy] = [(wrist.x - elbow.x) / 180, (wrist.y - elbow.y) / 180];
      const turned = { x: wrist.x + (20 + (position % 2)) * dy, y: wrist.y - (20 + (position % 2)) * dx };
      await admin
        .mutate('put', `/api/marking-rounds/${round.id}/marks/${position}`)
        .send({ shoulder, elbow, wrist: turned });
    }
    await admin.mutate('post', `/api/marking-rounds/${round.id}/finish`);
    const path = `/api/clips/${clipId}/marking-agreement`;
    const [pair] = (await read<{ items: Agreements['items'] }>(path)).items;
    const forearm = pair?.measures?.forearmDeg;
    expect(Math.abs(forearm?.bias ?? 0)).toBeCloseTo(6.5, 0);
    // Default spreads at the elbow and the wrist, 2 px each, of two people; the camera's lean is common to both.
    expect(forearm?.marking).toBeCloseTo(((Math.SQRT2 * Math.hypot(2, 2)) / 180) * (180 / Math.PI), 1);
    expect(forearm?.verdict).toBe('large');
    expect(pair?.measures?.upperArmDeg).toMatchObject({ bias: 0, verdict: 'no-shift' });
  });

  it('is carried on at the next start where it was cut off in the middle', async () => {
    const { db } = club.context;
    await markAgain(coach, await start(coach, 12), 8);
    const trend = () => read<Trend>(`/api/athletes/${club.ids.athletes.own}/trend?measure=peakDrop`);
    const whole = await trend();
    // As a crash leaves it: the spread is kept, the clip noted as outdated, its figures not yet worked out.
    db.update(clips).set({ figuresFormulas: 0 }).where(eq(clips.id, clipId)).run();
    db.delete(strokeFigures).where(isNotNull(strokeFigures.strokeId)).run();
    expect(await trend()).not.toEqual(whole);
    expect(refreshOutdatedFigures(club.context)).toBe(1);
    expect(await trend()).toEqual(whole);
  });

  it('tells how two coaches agree, from three frames on', async () => {
    const admin = await club.agentFor('admin');
    const pairs = async () =>
      (await read<{ items: Agreements['items'] }>(`/api/clips/${clipId}/marking-agreement`)).items;
    expect(await pairs()).toEqual([]);
    await markAgain(admin, await start(admin, 6), 4);
    const [pair, ...others] = await pairs();
    expect(others).toEqual([]);
    expect(pair).toMatchObject({
      first: { id: club.ids.users.coach },
      second: { id: club.ids.users.admin },
      frames: 6,
    });
    const forearm = pair?.measures?.forearmDeg;
    const differences = forearm?.points.map(({ difference }) => difference) ?? [];
    const mean = differences.reduce((sum, one) => sum + one, 0) / differences.length;
    expect(forearm?.bias).toBeCloseTo(mean, 9);
    expect((forearm?.limits.high ?? 0) - (forearm?.limits.low ?? 0)).toBeCloseTo(
      2 * 1.959963984540054 * (forearm?.sd ?? NaN),
      9,
    );
    // What another has marked says nothing of one's own repeatability.
    expect((await read<MarkingFigures>('/api/marking', admin)).figures).toBeNull();
  });
});
