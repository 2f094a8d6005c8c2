import { getStrokeExplanation, type StrokeExplanation } from '@stillstroke/contract/explanation';
import { measureSchema, type Figure, type Measure } from '@stillstroke/contract/measures';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { placeClip, placeSession } from '../media/test-films';
import { coachOf, enterStroke } from '../measures/test-strokes';
import { openTestClub, type TestClub } from '../platform/test-club';

describe('how a figure of a stroke came about', () => {
  let club: TestClub;
  let clipId: string;
  let strokeId: string;

  beforeEach(async () => {
    club = await openTestClub();
    const sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId, { frameCount: 800 }).id;
    strokeId = enterStroke(club.context, coachOf(club.ids), clipId, {
      arm: 'left',
      entry: 100,
      verticalAt: 0.5,
    });
  });
  afterEach(() => club.close());

  const explain = async (measure: string): Promise<StrokeExplanation> => {
    const coach = await club.agentFor('coach');
    const answer = await coach.get(`/api/strokes/${strokeId}/explanation?measure=${measure}`);
    expect(answer.status, JSON.stringify(answer.body)).toBe(200);
    return getStrokeExplanation.answer?.parse(answer.body) as StrokeExplanation;
  };

  it('is the same number as the measures show, for every measure, with its parts largest first', async () => {
    const coach = await club.agentFor('coach');
    const distance = { metres: 5, uncertaintyM: 0.05, fromFrame: 0, toFrame: 150 };
    await coach.mutate('put', `/api/clips/${clipId}/distance`).send({ distance });
    const { items } = (await coach.get(`/api/clips/${clipId}/measures`)).body as {
      items: [Record<string, Figure> & { phases: Record<string, Figure> }];
    };
    const shownAs: Partial<Record<Measure, string>> = {
      verticalAt: 'verticalAtShare',
      peakDrop: 'peakElbowDrop',
    };
    for (const measure of measureSchema.options) {
      const { figure, parts, interval } = await explain(measure);
      const shown = items[0].phases[measure] ?? items[0][shownAs[measure] ?? measure];
      expect(figure, measure).toEqual(shown);
      const alone = parts.map((part) => part.alone);
      expect(alone, measure).toEqual([...alone].sort((a, b) => b - a));
      expect(Math.hypot(...alone), measure).toBeCloseTo(figure.uncertainty ?? NaN, 9);
      expect(interval?.low, measure).toBeLessThanOrEqual(interval?.high ?? NaN);
    }
  });

  it('says what went in', async () => {
    const coach = await club.agentFor('coach');
    await coach
      .mutate('put', `/api/clips/${clipId}/calibration`)
      .send({ plumb: { top: { x: 100, y: 50 }, bottom: { x: 104, y: 650 } } });
    const said = await explain('verticalAt');
    expect(said).toMatchObject({
      arm: 'left',
      unit: 'share',
      plumb: { top: { x: 100, y: 50 }, bottom: { x: 104, y: 650 } },
      captureRateFactor: 1,
      verticalToleranceDeg: 15,
      eventErrorFrames: 1,
    });
    expect(said.events.map(({ event, frame }) => [event, frame])).toEqual([
      ['entry', 100],
      ['catch', 120],
      ['exit', 160],
      ['nextEntry', 180],
    ]);
    expect(said.marks.map(({ frame }) => frame)).toEqual([120, 160]);
    expect(said.parts.map(({ source }) => source)).toContain('roll');
    expect(said.figure.frames).toEqual([120, 160]);
  });

  it('keeps the reason where there is no figure', async () => {
    const coach = await club.agentFor('coach');
    await coach.mutate('delete', `/api/clips/${clipId}/marks/left/160`);
    const said = await explain('verticalAt');
    expect(said.figure).toMatchObject({ value: null, reason: 'too-few-marks', frames: [] });
    expect(said).toMatchObject({ interval: null, parts: [], marks: [] });
  });
});
