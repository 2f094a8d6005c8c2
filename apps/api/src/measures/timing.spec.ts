import type { Comparison } from '@stillstroke/contract/comparison';
import { getComparison } from '@stillstroke/contract/comparison';
import type { AnswerOf } from '@stillstroke/contract/endpoint';
import { getMeasures } from '@stillstroke/contract/measures';
import type { Stroke } from '@stillstroke/contract/strokes';
import type { Trend } from '@stillstroke/contract/trend';
import { getTrend } from '@stillstroke/contract/trend';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { placeClip, placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

type Measures = AnswerOf<typeof getMeasures>;

/** Frames of 20 ms; a cycle of 70 frames is 1.40 s, 42.857143 cycles a minute. */
describe('stroke timing', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let sessionId: string;
  let clipId: string;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId, { frameCount: 800 }).id;
  });
  afterEach(() => club.close());

  const enter = async (arm: 'left' | 'right', entry: number, more: object = {}) => {
    const events = { entry, catch: entry + 19, exit: entry + 49, nextEntry: entry + 70 };
    const answer = await coach
      .mutate('post', `/api/clips/${clipId}/strokes`)
      .send({ arm, ...events, breath: false, ...more });
    expect(answer.status).toBe(201);
    return answer.body as Stroke;
  };
  const bothArms = async () => {
    await enter('right', 0, { breath: true });
    await enter('left', 35);
    await enter('right', 70);
    await enter('left', 105);
    return enter('right', 140);
  };
  const measures = async (): Promise<Measures> => {
    const answer = await coach.get(`/api/clips/${clipId}/measures`);
    return getMeasures.answer?.parse(answer.body) as Measures;
  };
  const compare = async () =>
    getComparison.answer?.parse(
      (await coach.get(`/api/sessions/${sessionId}/comparison`)).body,
    ) as Comparison;
  const trend = async (measure: string) => {
    const answer = await coach.get(`/api/athletes/${club.ids.athletes.own}/trend?measure=${measure}`);
    return getTrend.answer?.parse(answer.body) as Trend;
  };
  const patchClip = (body: object) => coach.mutate('patch', `/api/clips/${clipId}`).send(body);

  it('a known distance gives stroke length and index, in world time', async () => {
    await enter('right', 0);
    expect((await measures()).items[0]?.strokeLength).toMatchObject({ value: null, reason: 'no-distance' });
    // 10 m in 6.80 s: science of the worked example, 1.470588 m/s.
    const distance = { metres: 10, uncertaintyM: 0.05, fromFrame: 10, toFrame: 350 };
    expect((await coach.mutate('put', `/api/clips/${clipId}/distance`).send({ distance })).status).toBe(200);
    const [stroke] = (await measures()).items;
    expect(stroke?.strokeLength.value).toBeCloseTo(2.058824, 6);
    expect(stroke?.strokeIndex.value).toBeCloseTo(3.027682, 6);
    expect(stroke?.strokeLength.frames).toEqual([0, 10, 70, 350]);
    expect(stroke?.strokeLength.uncertainty).toBeGreaterThan(0);
    // Length does not depend on how fast the file plays; the index, per second, does.
    await patchClip({ captureRateFactor: 0.25 });
    const [slow] = (await measures()).items;
    expect(slow?.strokeRate.value).toBeCloseTo(4 * 42.857143, 5);
    expect(slow?.strokeLength.value).toBeCloseTo(2.058824, 6);
    expect(slow?.strokeIndex.value).toBeCloseTo(4 * 3.027682, 5);
    const { measured, arms, unit } = await trend('strokeLength');
    expect(measured).toContain('strokeIndex');
    expect(unit).toBe('m');
    expect(arms.flatMap(({ points }) => points.map(({ mean }) => mean))[0]).toBeCloseTo(2.058824, 6);
    await coach.mutate('put', `/api/clips/${clipId}/distance`).send({ distance: null });
    expect((await trend('strokeLength')).measured).not.toContain('strokeLength');
  });

  it('whether a distance is known moves no verdict of another measure', async () => {
    for (const [n, at] of [0, 70, 140, 210, 280, 350].entries())
      await enter('right', at, { breath: n % 2 === 0 });
    for (const [n, at] of [35, 105, 175, 245, 315, 385].entries()) {
      await enter('left', at, { nextEntry: at + (n % 2 === 0 ? 69 : 67), breath: n % 2 === 0 });
    }
    const isOther = ({ measure }: { measure: string }) => !/Length|Index/.test(measure);
    const others = async () => {
      const { splits, breath } = await compare();
      return [splits.all.filter(isOther), breath.left.filter(isOther), breath.together.filter(isOther)];
    };
    const before = await others();
    const distance = { metres: 10, uncertaintyM: 0.05, fromFrame: 10, toFrame: 350 };
    await coach.mutate('put', `/api/clips/${clipId}/distance`).send({ distance });
    expect(await others()).toEqual(before);
    expect((await compare()).splits.all.find(({ measure }) => measure === 'strokeLength')?.left.count).toBe(
      6,
    );
  });

  it('the wrist in place of the hand widens what its events are part of, and nothing else', async () => {
    const seen = await enter('right', 0);
    expect(seen).toMatchObject({ entrySource: 'hand-seen', nextEntrySource: 'hand-seen' });
    const before = (await measures()).items[0];
    const change = { exitSource: 'wrist-proxy', version: seen.version };
    const answer = await coach.mutate('patch', `/api/strokes/${seen.id}`).send(change);
    expect(answer.body).toMatchObject({ exitSource: 'wrist-proxy', entrySource: 'hand-seen', version: 2 });
    const after = (await measures()).items[0];
    expect(after?.phases.recovery.value).toBe(before?.phases.recovery.value);
    expect(after?.phases.recovery.uncertainty).toBeGreaterThan(before?.phases.recovery.uncertainty ?? NaN);
    expect(after?.phases.entryAndCatch).toEqual(before?.phases.entryAndCatch);
    expect(after?.strokeRate).toEqual(before?.strokeRate);
  });

  it('the index of coordination is on the clip, in Compare by breath, and in Trend', async () => {
    const last = await bothArms();
    // Both arms pull 30 of 70 frames: 100·30/70 − 50 percent, whatever the offset.
    const expected = 30 / 70 - 0.5;
    const { coordination } = await measures();
    expect(coordination.value).toBeCloseTo(expected, 9);
    expect(coordination.mode).toBe('catch-up');
    expect(coordination.passages.map(({ frame, breath }) => [frame, breath])).toEqual([
      [49, true],
      [119, false],
    ]);
    // Four events, ±1 frame each, over a cycle; the mean of two passages.
    const one = 0.02 / Math.sqrt(3) / 1.4;
    expect(coordination.passages[0]?.uncertainty).toBeCloseTo(one, 9);
    expect(coordination.uncertainty).toBeCloseTo(one / Math.SQRT2, 9);
    const compared = (await compare()).coordination;
    expect(compared.all).toEqual(coordination);
    expect(compared.breathing.passages).toHaveLength(1);
    expect(compared.notBreathing.value).toBeCloseTo(expected, 9);
    const { arms, unit, measured } = await trend('coordination');
    expect(measured).toContain('coordination');
    expect([unit, arms.map(({ arm }) => arm)]).toEqual(['share', ['both']]);
    expect(arms[0]?.points[0]).toMatchObject({ count: 2, arm: 'both' });
    expect(arms[0]?.points[0]?.mean).toBeCloseTo(expected, 9);
    await coach.mutate('delete', `/api/strokes/${last.id}`);
    expect((await measures()).coordination.passages).toHaveLength(1);
    await patchClip({ stroke: 'drill' });
    expect((await trend('coordination')).arms[0]?.points).toEqual([]);
  });

  it('says undetermined where the interval holds zero, and nothing without both arms', async () => {
    await enter('right', 0, { exit: 54 });
    expect((await measures()).coordination).toMatchObject({ value: null, mode: null, passages: [] });
    await enter('left', 35, { exit: 89 });
    await enter('right', 70, { exit: 124 });
    expect((await measures()).coordination.mode).toBe('undetermined');
  });
});
