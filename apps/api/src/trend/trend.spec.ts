import type { Trend } from '@stillstroke/contract/trend';
import { getTrend } from '@stillstroke/contract/trend';
import { clips, strokeFigures } from '@stillstroke/db/schema/film';
import { eq, isNotNull } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { tryAsEverybody } from '../media/attack';
import { placeClip, placeSession } from '../media/test-films';
import { FORMULAS, refreshOutdatedFigures } from '../measures/figures';
import { coachOf, enterStroke, STROKE_FRAMES } from '../measures/test-strokes';
import { openTestClub, type TestClub } from '../platform/test-club';
import { verticalAtGlance } from './glance';

describe('a measure over the sessions', () => {
  let club: TestClub;
  let athleteId: string;

  beforeEach(async () => {
    club = await openTestClub();
    athleteId = club.ids.athletes.own;
  });
  afterEach(() => club.close());

  /** A session with strokes of the left arm, vertical where listed. */
  const visit = (date: string, verticalAt: number[], fields: Parameters<typeof placeClip>[3] = {}) => {
    const sessionId = placeSession(club.context, athleteId, date);
    const clip = placeClip(club.context, athleteId, sessionId, { frameCount: 800, ...fields });
    verticalAt.forEach((share, n) =>
      enterStroke(club.context, coachOf(club.ids), clip.id, {
        arm: 'left',
        entry: n * STROKE_FRAMES,
        verticalAt: share,
      }),
    );
    return { sessionId, clipId: clip.id };
  };
  const trend = async (query = ''): Promise<Trend> => {
    const coach = await club.agentFor('coach');
    const answer = await coach.get(`/api/athletes/${athleteId}/trend${query}`);
    expect(answer.status).toBe(200);
    return getTrend.answer?.parse(answer.body) as Trend;
  };
  const left = (of: Trend) => of.arms.find(({ arm }) => arm === 'left');

  it('gives points by date with the frames behind them, and what changed', async () => {
    visit('2026-03-01', [0.7, 0.72, 0.71, 0.69]);
    const last = visit('2026-06-01', [0.4, 0.41, 0.39, 0.4]);
    visit('2026-05-01', [0.5, 0.52, 0.51]);
    const arm = left(await trend());
    expect(arm?.points.map(({ date, count }) => [date, count])).toEqual([
      ['2026-03-01', 4],
      ['2026-05-01', 3],
      ['2026-06-01', 4],
    ]);
    expect(arm?.points[2]?.mean).toBeCloseTo(0.4, 6);
    expect(arm?.points[2]?.frames[0]).toEqual({ clipId: last.clipId, frame: 36 });
    expect(arm?.change).toBeCloseTo(-0.305, 6);
    expect(arm?.verdict).toBe('changed');
    expect(arm?.detectable).toBeGreaterThan(0);
    expect(arm?.slope).toBeNull();
  });

  it('draws a slope from four sessions on, per 30 days', async () => {
    // 0.05 earlier every 30 days, the same strokes each time.
    for (const [date, share] of [
      ['2026-01-01', 0.6],
      ['2026-01-31', 0.55],
      ['2026-03-02', 0.5],
      ['2026-04-01', 0.45],
    ] as const)
      visit(date, [share, share, share]);
    const slope = left(await trend())?.slope;
    expect(slope?.value).toBeCloseTo(-0.05, 6);
    expect(slope?.robust).toBeCloseTo(-0.05, 6);
    expect(slope?.low).toBeLessThan(-0.05);
    expect(slope?.high).toBeGreaterThan(-0.05);
  });

  it('does not take for a change what marking could produce', async () => {
    visit('2026-03-01', [0.5, 0.5, 0.5]);
    visit('2026-04-01', [0.501, 0.501, 0.501]);
    expect(left(await trend())?.verdict).toBe('not-more-than-marking');
  });

  it('mixes in no other view and no drill, and says so', async () => {
    const side = visit('2026-03-01', [0.5]);
    const above = visit('2026-03-02', [0.9], { view: 'side-above' });
    const drill = visit('2026-03-03', [0.9], { stroke: 'drill' });
    const bare = visit('2026-03-04', []);
    const none = placeSession(club.context, athleteId, '2026-03-05');
    const seen = await trend();
    expect(left(seen)?.points.map(({ sessionId }) => sessionId)).toEqual([side.sessionId]);
    expect(seen.view).toBe('side-underwater');
    expect(seen.leftOut.map(({ sessionId, reason }) => [sessionId, reason])).toEqual([
      [above.sessionId, 'other-view'],
      [drill.sessionId, 'drill'],
      [bare.sessionId, 'not-measured'],
      [none, 'not-measured'],
    ]);
  });

  it('shows another view or drills when asked, and says what there is to choose', async () => {
    visit('2026-03-01', [0.5]);
    const above = visit('2026-03-02', [0.9, 0.8], { view: 'side-above' });
    const drill = visit('2026-03-03', [0.7], { stroke: 'drill' });
    const seen = await trend();
    expect(seen.series).toEqual([
      { view: 'side-underwater', stroke: 'full', sessions: 1 },
      { view: 'side-above', stroke: 'full', sessions: 1 },
      { view: 'side-underwater', stroke: 'drill', sessions: 1 },
    ]);
    const ofAbove = await trend('?view=side-above');
    expect(left(ofAbove)?.points.map(({ sessionId }) => sessionId)).toEqual([above.sessionId]);
    const ofDrill = await trend('?stroke=drill');
    expect(left(ofDrill)?.points.map(({ sessionId }) => sessionId)).toEqual([drill.sessionId]);
    expect(ofDrill).toMatchObject({ view: 'side-underwater', stroke: 'drill' });
    expect(ofDrill.leftOut.map(({ reason }) => reason)).toEqual(['full-stroke', 'full-stroke']);
    const coach = await club.agentFor('coach');
    for (const query of [
      'view=deck',
      'view=front-underwater',
      'stroke=all',
      'view=side-above&view=side-above',
    ])
      expect((await coach.get(`/api/athletes/${athleteId}/trend?${query}`)).status, query).toBe(400);
  });

  it('says what stands behind a change', async () => {
    visit('2026-03-01', [0.7, 0.72, 0.71, 0.69]);
    visit('2026-06-01', [0.4, 0.41, 0.39, 0.4]);
    const arm = left(await trend());
    const [first, last] = arm?.points ?? [];
    expect(arm?.detectable).toBeCloseTo(1.959964 * Math.hypot(first?.marking ?? 0, last?.marking ?? 0), 6);
    expect(first?.sd).toBeCloseTo(Math.sqrt(0.0005 / 3), 9);
    const half = Math.max(
      arm?.detectable ?? 0,
      (arm?.welch?.quantile ?? 0) * (arm?.welch?.standardError ?? 0),
    );
    expect(arm?.interval?.low).toBeCloseTo(-0.305 - half, 9);
    expect(arm?.interval?.high).toBeCloseTo(-0.305 + half, 9);
  });

  it('knows every measure by its unit', async () => {
    visit('2026-03-01', [0.5]);
    const rate = await trend('?measure=strokeRate');
    expect(rate.unit).toBe('perMinute');
    // 80 frames at 50 a second: 1.6 s a cycle.
    expect(left(rate)?.points[0]?.mean).toBeCloseTo(37.5, 9);
    expect((await trend('?measure=peakDrop')).unit).toBe('deg');
  });

  it('follows when a clip turns out to be slow motion', async () => {
    const { clipId } = visit('2026-03-01', [0.5]);
    const coach = await club.agentFor('coach');
    await coach.mutate('patch', `/api/clips/${clipId}`).send({ captureRateFactor: 0.5 });
    expect(left(await trend('?measure=strokeRate'))?.points[0]?.mean).toBeCloseTo(75, 9);
  });

  it('is computed again from marks when its formulas have changed', async () => {
    visit('2026-03-01', [0.5]);
    const before = await trend();
    club.context.db
      .update(clips)
      .set({ figuresFormulas: 0 })
      .where(eq(clips.figuresFormulas, FORMULAS))
      .run();
    club.context.db.delete(strokeFigures).where(isNotNull(strokeFigures.strokeId)).run();
    expect(left(await trend())?.points).toEqual([]);
    expect(refreshOutdatedFigures(club.context)).toBe(1);
    expect(await trend()).toEqual(before);
    expect(refreshOutdatedFigures(club.context)).toBe(0);
  });

  it('is glanced at by the newest session that was measured', () => {
    visit('2026-03-01', [0.7]);
    visit('2026-04-01', [0.35, 0.45]);
    visit('2026-05-01', []);
    const glance = verticalAtGlance(club.context.db, [athleteId, club.ids.athletes.other]);
    expect([...glance.keys()]).toEqual([athleteId]);
    expect(glance.get(athleteId)?.left).toBeCloseTo(0.4, 6);
    expect(glance.get(athleteId)?.right).toBeNull();
  });

  it('reaches nobody outside the squad and the club', async () => {
    const path = `/api/athletes/${athleteId}/trend`;
    await tryAsEverybody(club, { method: 'get', path, answers: { admin: 200, coach: 200, athlete: 200 } });
    const coach = await club.agentFor('coach');
    for (const query of ['?measure=speed', '?measure=', '?measure=pull&arm=left'])
      expect((await coach.get(path + query)).status).toBe(400);
  });
});
