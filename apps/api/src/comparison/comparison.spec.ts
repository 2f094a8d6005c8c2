import type { Comparison, MeasureComparison } from '@stillstroke/contract/comparison';
import { getComparison } from '@stillstroke/contract/comparison';
import type { Session } from '@stillstroke/contract/sessions';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { tryAsEverybody } from '../media/attack';
import { placeClip, placeSession } from '../media/test-films';
import { coachOf, enterStroke, STROKE_FRAMES, type StrokeWish } from '../measures/test-strokes';
import { openTestClub, type TestClub } from '../platform/test-club';

describe('left against right', () => {
  let club: TestClub;
  let sessionId: string;

  beforeEach(async () => {
    club = await openTestClub();
    sessionId = placeSession(club.context, club.ids.athletes.own);
  });
  afterEach(() => club.close());

  const place = (fields: Parameters<typeof placeClip>[3] = {}) =>
    placeClip(club.context, club.ids.athletes.own, sessionId, { frameCount: 800, ...fields }).id;
  /** Strokes one after the other, vertical where listed. */
  const enter = (clipId: string, arm: StrokeWish['arm'], verticalAt: number[], breath: boolean[] = []) =>
    verticalAt.map((share, n) =>
      enterStroke(club.context, coachOf(club.ids), clipId, {
        arm,
        entry: n * STROKE_FRAMES,
        verticalAt: share,
        breath: breath[n] ?? false,
      }),
    );
  const compare = async (): Promise<Comparison> => {
    const coach = await club.agentFor('coach');
    const answer = await coach.get(`/api/sessions/${sessionId}/comparison`);
    expect(answer.status).toBe(200);
    return getComparison.answer?.parse(answer.body) as Comparison;
  };
  const verticalOf = (all: MeasureComparison[]) => all.find(({ measure }) => measure === 'verticalAt');

  it('names the arm that is later, by right minus left, with its interval and the strokes behind it', async () => {
    const clipId = place();
    enter(clipId, 'left', [0.38, 0.4, 0.42, 0.39, 0.41]);
    const right = enter(clipId, 'right', [0.69, 0.7, 0.71, 0.68, 0.72]);
    const { splits, strokes, leftOut } = await compare();
    const vertical = verticalOf(splits.all);
    expect(vertical).toMatchObject({ verdict: 'right-larger', unit: 'share', moreStrokes: null });
    expect(vertical?.difference).toBeCloseTo(0.3, 6);
    expect(vertical?.interval?.low).toBeGreaterThan(0.2);
    expect(vertical?.interval?.high).toBeLessThan(0.4);
    expect(vertical?.left.mean).toBeCloseTo(0.4, 6);
    expect(vertical?.right.samples.map(({ strokeId }) => strokeId)).toEqual(right);
    // 70 % of a pull of 40 frames from frame 20 on.
    expect(vertical?.right.samples[1]).toMatchObject({ clipId, frame: STROKE_FRAMES + 48 });
    expect(strokes).toHaveLength(10);
    expect(strokes[0]?.forearmCurve.map(({ share }) => share)).toEqual([0, 1]);
    expect(strokes[0]?.dropCurve.map(({ frame }) => frame)).toEqual(
      strokes[0]?.forearmCurve.map(({ frame }) => frame),
    );
    expect(leftOut).toEqual([]);
  });

  it('claims nothing where the strokes differ as much among themselves', async () => {
    const clipId = place();
    enter(clipId, 'left', [0.4, 0.6, 0.5, 0.45]);
    enter(clipId, 'right', [0.42, 0.62, 0.51, 0.48]);
    const vertical = verticalOf((await compare()).splits.all);
    expect(vertical?.verdict).toBe('not-distinguishable');
    expect(vertical?.interval?.low).toBeLessThan(0);
    expect(vertical?.interval?.high).toBeGreaterThan(0);
  });

  it('keeps breathing strokes apart, and gives no verdict on fewer than three', async () => {
    const clipId = place();
    enter(clipId, 'left', [0.4, 0.41, 0.4, 0.6], [false, false, false, true]);
    enter(clipId, 'right', [0.4, 0.41, 0.4, 0.8], [false, false, false, true]);
    const { splits } = await compare();
    expect(verticalOf(splits.breathing)).toMatchObject({
      verdict: 'too-few',
      interval: null,
      left: { count: 1, interval: null },
    });
    expect(verticalOf(splits.breathing)?.difference).toBeCloseTo(0.2, 6);
    expect(verticalOf(splits.notBreathing)?.left.count).toBe(3);
    expect(verticalOf(splits.all)?.left.count).toBe(4);
  });

  it('says what stands behind a verdict', async () => {
    const clipId = place();
    enter(clipId, 'left', [0.38, 0.4, 0.42, 0.39, 0.41]);
    enter(clipId, 'right', [0.69, 0.7, 0.71, 0.68, 0.72]);
    const row = verticalOf((await compare()).splits.all);
    const { welch, marking, p, pTogether, measuresTogether } = row?.test ?? {};
    expect(row?.left.sd).toBeCloseTo(Math.sqrt(0.00025), 9);
    // Two means of five strokes with the same spread: √(2·s²/5), 8 degrees of freedom, t.975 = 2.3060.
    expect(welch?.standardError).toBeCloseTo(Math.sqrt(0.0001), 9);
    expect(welch?.degreesOfFreedom).toBeCloseTo(8, 6);
    expect(welch?.quantile).toBeCloseTo(2.306, 4);
    expect(welch?.t).toBeCloseTo(30, 4);
    const half = Math.max((welch?.quantile ?? 0) * (welch?.standardError ?? 0), 1.959964 * (marking ?? 0));
    expect(row?.interval?.high).toBeCloseTo(0.3 + half, 6);
    expect(measuresTogether).toBeGreaterThan(1);
    expect(pTogether).toBeGreaterThanOrEqual(p ?? NaN);
  });

  it('compares breathing strokes with the others of the same arm, and of both arms without mixing them', async () => {
    const clipId = place();
    const breath = [true, false, true, false, true, false];
    // Breathing strokes 0.2 later on either arm; the right arm is later by 0.2 altogether.
    enter(clipId, 'left', [0.5, 0.4, 0.62, 0.42, 0.61, 0.41], [true, false, true, false, true, false]);
    enter(clipId, 'right', [0.8, 0.6, 0.82, 0.62, 0.81, 0.61], breath);
    const { breath: compared } = await compare();
    const of = (which: 'left' | 'right' | 'together') =>
      compared[which].find(({ measure }) => measure === 'verticalAt');
    expect(of('right')).toMatchObject({
      verdict: 'breathing-larger',
      breathing: { count: 3 },
      others: { count: 3 },
    });
    expect(of('right')?.difference).toBeCloseTo(0.2, 6);
    expect(of('right')?.interval?.low).toBeGreaterThan(0.1);
    expect(of('left')?.difference).toBeCloseTo(0.5 / 3, 1);
    expect(of('together')?.difference).toBeCloseTo(
      ((of('left')?.difference ?? 0) + (of('right')?.difference ?? 0)) / 2,
      9,
    );
    expect(of('together')).toMatchObject({ breathing: { count: 6, mean: null }, others: { count: 6 } });
    expect(of('together')?.test?.measuresTogether).toBeGreaterThan(1);
  });

  it('gives no verdict on fewer than three breathing strokes', async () => {
    const clipId = place();
    enter(clipId, 'left', [0.4, 0.5, 0.41, 0.51, 0.42], [false, true, false, true, false]);
    const { breath } = await compare();
    expect(breath.left.find(({ measure }) => measure === 'verticalAt')).toMatchObject({
      verdict: 'too-few',
      interval: null,
      test: null,
    });
    expect(breath.together.every(({ verdict }) => verdict === 'too-few')).toBe(true);
  });

  it('takes in full strokes of one side view, and says why the rest is left out', async () => {
    const side = place();
    enter(side, 'left', [0.4]);
    const above = place({ view: 'side-above' });
    enter(above, 'left', [0.9]);
    const front = place({ view: 'front-underwater' });
    enter(front, 'left', [0.9]);
    const drill = place({ stroke: 'drill' });
    enter(drill, 'left', [0.9]);
    const bare = place();
    const { splits, leftOut, strokes } = await compare();
    expect(verticalOf(splits.all)?.left.samples.map(({ clipId }) => clipId)).toEqual([side]);
    expect(strokes.map(({ clipId }) => clipId)).toEqual([side]);
    expect(new Map(leftOut.map(({ clipId, reason }) => [clipId, reason]))).toEqual(
      new Map([
        [above, 'other-view'],
        [front, 'other-view'],
        [drill, 'drill'],
        [bare, 'no-strokes'],
      ]),
    );
  });

  it('says the same as the session’s summary, and forgets a clip that is deleted', async () => {
    const clipId = place();
    enter(clipId, 'left', [0.5, 0.4]);
    enter(place({ view: 'side-above' }), 'left', [0.9]);
    const coach = await club.agentFor('coach');
    const session = (await coach.get(`/api/sessions/${sessionId}`)).body as Session;
    expect(session.summary.strokes).toEqual({ left: 2, right: 0 });
    expect(session.summary.verticalAt.left).toBeCloseTo(
      verticalOf((await compare()).splits.all)?.left.mean ?? 0,
      9,
    );
    await coach.mutate('delete', `/api/clips/${clipId}`);
    expect(verticalOf((await compare()).splits.all)?.left.mean).toBeCloseTo(0.9, 9);
  });

  it('of a session without strokes is empty, not an error', async () => {
    place();
    const { splits, strokes } = await compare();
    expect(verticalOf(splits.all)).toMatchObject({
      verdict: 'too-few',
      difference: null,
      left: { mean: null },
    });
    expect(strokes).toEqual([]);
  });

  it('reaches nobody outside the squad and the club', async () => {
    const path = `/api/sessions/${sessionId}/comparison`;
    await tryAsEverybody(club, { method: 'get', path, answers: { admin: 200, coach: 200, athlete: 200 } });
    const coach = await club.agentFor('coach');
    expect((await coach.get(`${path}?split=breath`)).status).toBe(400);
  });
});
