import { randomUUID } from 'node:crypto';
import type { ExportClip, ExportFile } from '@stillstroke/contract/export';
import type { ImportPreview } from '@stillstroke/contract/import';
import { clips, marks, strokes } from '@stillstroke/db/schema/film';
import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { coachOf, enterStroke, STROKE_FRAMES } from '../measures/test-strokes';
import { placeClip, placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

const plumb = { top: { x: 100.25, y: 50 }, bottom: { x: 110, y: 650.5 } };

describe('bringing an export back in', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let sessionId: string;
  let clipId: string;
  let file: ExportFile;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId, { frameCount: 600 }).id;
    for (let n = 0; n < 3; n++)
      for (const arm of ['left', 'right'] as const)
        enterStroke(club.context, coachOf(club.ids), clipId, {
          arm,
          entry: 10 + n * STROKE_FRAMES,
          breath: n === 1,
          verticalAt: (arm === 'left' ? 0.4 : 0.6) + n * 0.013,
        });
    await coach.mutate('put', `/api/clips/${clipId}/calibration`).send({ plumb });
    const distance = { metres: 12.5, uncertaintyM: 0.1, fromFrame: 20, toFrame: 520 };
    await coach.mutate('put', `/api/clips/${clipId}/distance`).send({ distance });
    const { items } = (await coach.get(`/api/clips/${clipId}/strokes`)).body as { items: { id: string }[] };
    await coach.mutate('patch', `/api/strokes/${items[0]?.id}`).send({ exitSource: 'wrist-proxy' });
    file = await exported();
  });
  afterEach(() => club.close());

  const exported = async () => (await coach.get(`/api/sessions/${sessionId}/export`)).body as ExportFile;
  const preview = async (body: object = {}) => {
    const answer = await coach
      .mutate('post', `/api/sessions/${sessionId}/import/preview`)
      .send({ file, ...body });
    expect([answer.status, answer.text.slice(0, 200)]).toEqual([200, expect.anything()]);
    return answer.body as ImportPreview;
  };
  const bringIn = async (choice: string, body: object = {}) => {
    const { basis } = await preview(body);
    return coach.mutate('post', `/api/sessions/${sessionId}/import`).send({ file, choice, basis, ...body });
  };
  const first = ({ clips: [clip] }: ImportPreview) => {
    if (!clip) throw new Error('no clip in the answer');
    return clip;
  };
  const counts = (fresh: number, changed: number, same: number, onlyHere = 0) => ({
    new: fresh,
    changed,
    same,
    onlyHere,
  });
  const untimed = ({ exportedAt: _, ...rest }: ExportFile) => rest;
  const wipe = () => {
    club.context.db.delete(strokes).where(eq(strokes.clipId, clipId)).run();
    club.context.db.delete(marks).where(eq(marks.clipId, clipId)).run();
  };

  it('gives exactly the same figures, after everything on the clip was lost', async () => {
    wipe();
    await coach.mutate('put', `/api/clips/${clipId}/calibration`).send({ plumb: null });
    await coach.mutate('put', `/api/clips/${clipId}/distance`).send({ distance: null });
    await coach.mutate('patch', `/api/clips/${clipId}`).send({ travel: 'left', captureRateFactor: 0.5 });
    expect(untimed(await exported())).not.toEqual(untimed(file));
    const looked = first(await preview());
    expect(looked).toMatchObject({
      to: { id: clipId },
      foundBy: 'film',
      refusal: null,
      setUp: ['travel', 'captureRateFactor', 'plumb', 'distance'],
      strokes: counts(6, 0, 0),
      marks: counts(12, 0, 0),
    });
    // Four angles and their uncertainties a mark, ten measures and theirs a stroke.
    expect(looked.figures).toEqual({ same: 12 * 8 + 6 * 20, different: 0 });
    expect((await exported()).sessions[0]?.clips[0]?.marks).toEqual([]);
    const answer = await bringIn('take');
    expect(answer.status).toBe(200);
    expect(untimed(await exported())).toEqual(untimed(file));
    expect(first(await preview())).toMatchObject({
      setUp: [],
      strokes: counts(0, 0, 6),
      marks: counts(0, 0, 12),
    });
  });

  it('shows what is new, changed, the same and only here, and does as chosen', async () => {
    const [a, b] = file.sessions[0]?.clips[0]?.marks ?? [];
    if (!a || !b) throw new Error('no marks');
    const at = (arm: string, frame: number) => `/api/clips/${clipId}/marks/${arm}/${frame}`;
    const { shoulder, elbow } = a;
    const moved = { shoulder, elbow, wrist: { x: a.wrist.x + 30, y: a.wrist.y } };
    await coach.mutate('put', at(a.arm, a.frame)).send(moved);
    await coach.mutate('delete', at(b.arm, b.frame));
    await coach.mutate('put', at('left', 500)).send(moved);
    const stroke = file.sessions[0]?.clips[0]?.strokes[0];
    await coach.mutate('patch', `/api/strokes/${stroke?.id}`).send({ exit: (stroke?.exit ?? 0) - 2 });
    await coach
      .mutate('post', `/api/clips/${clipId}/strokes`)
      .send({ arm: 'left', entry: 480, catch: 490, exit: 520, breath: false });
    const asSeen = {
      setUp: [],
      strokes: counts(0, 1, 5, 1),
      marks: counts(1, 1, 10, 1),
    };
    const before = await exported();
    expect(first(await preview())).toMatchObject(asSeen);
    expect(untimed(await exported())).toEqual(untimed(before));

    const wristOf = async () =>
      ((await exported()).sessions[0]?.clips[0]?.marks ?? []).find(
        ({ arm, frame }) => arm === a.arm && frame === a.frame,
      )?.wrist.x;
    expect(first((await bringIn('add')).body as ImportPreview)).toMatchObject(asSeen);
    expect(await wristOf()).toBe(moved.wrist.x);
    expect(first(await preview()).marks).toEqual(counts(0, 1, 11, 1));
    await bringIn('take');
    expect(await wristOf()).toBe(a.wrist.x);
    expect(first(await preview())).toMatchObject({
      strokes: counts(0, 0, 6, 1),
      marks: counts(0, 0, 12, 1),
    });
    const row = club.context.db
      .select()
      .from(marks)
      .all()
      .find(({ arm, frame }) => arm === a.arm && frame === a.frame);
    expect(row).toMatchObject({ version: 3, updatedBy: club.ids.users.coach });
    await bringIn('match');
    expect(untimed(await exported())).toEqual(untimed(file));

    // What was there before can be brought back the same way.
    file = before;
    await bringIn('match');
    expect(untimed(await exported())).toEqual(untimed(before));
  });

  it('never overwrites what somebody changed after it was looked at', async () => {
    wipe();
    const { basis } = await preview();
    const meanwhile = file.sessions[0]?.clips[0]?.marks[0];
    const { shoulder, elbow, wrist } = meanwhile ?? {};
    await coach.mutate('put', `/api/clips/${clipId}/marks/left/77`).send({ shoulder, elbow, wrist });
    const late = await coach
      .mutate('post', `/api/sessions/${sessionId}/import`)
      .send({ file, choice: 'take', basis });
    expect(late.body).toMatchObject({ status: 409, code: 'changed-meanwhile' });
    expect((await exported()).sessions[0]?.clips[0]?.marks).toHaveLength(1);
  });

  it('goes onto the clip that is chosen when the film is another file of the same frames', async () => {
    const other = placeSession(club.context, club.ids.athletes.other);
    const copy = placeClip(club.context, club.ids.athletes.other, other, { frameCount: 600 }).id;
    const to = `/api/sessions/${other}/import`;
    const looked = (await coach.mutate('post', `${to}/preview`).send({ file })).body as ImportPreview;
    expect(first(looked)).toMatchObject({ to: null, foundBy: null });
    expect(looked.ours).toEqual([{ id: copy, name: 'lane-four.mp4' }]);
    const nowhere = await coach.mutate('post', to).send({ file, choice: 'add', basis: looked.basis });
    expect(nowhere.body).toMatchObject({ status: 422, code: 'import-does-not-fit' });
    const pairs = [{ from: clipId, to: copy }];
    const answer = await coach.mutate('post', to).send({ file, pairs, choice: 'take', basis: looked.basis });
    expect(first(answer.body as ImportPreview)).toMatchObject({
      foundBy: 'choice',
      figures: { same: 12 * 8 + 6 * 20, different: 0 },
    });
    // The first clip keeps its strokes; the copy's have ids of their own.
    expect(untimed(await exported())).toEqual(untimed(file));
    const rows = club.context.db.select().from(strokes).where(eq(strokes.clipId, copy)).all();
    expect(rows).toHaveLength(6);
  });

  it('says when figures come out otherwise, as with a film packed anew', async () => {
    const clip = file.sessions[0]?.clips[0];
    if (!clip) throw new Error('no clip');
    clip.timesUs[30] = (clip.timesUs[30] ?? 0) + 900;
    const stroke = clip.strokes[0];
    if (stroke?.figures['verticalAt']) stroke.figures['verticalAt'].value = 0.123;
    if (stroke) stroke.figures['ofAnotherTime'] = { value: 1, uncertainty: 1, frame: 1, reason: null };
    expect(first(await preview()).figures).toEqual({ same: 12 * 8 + 6 * 20 - 1, different: 1 });
  });

  it('refuses what does not fit in words, and then changes nothing at all', async () => {
    const clip = file.sessions[0]?.clips[0];
    const stroke = clip?.strokes[0];
    const mark = clip?.marks[0];
    if (!clip || !stroke || !mark) throw new Error('nothing to spoil');
    const good = structuredClone(file);
    wipe();
    const before = untimed(await exported());
    const cases: [string, (spoilt: ExportClip) => void, RegExp][] = [
      ['width', (one) => (one.width = 1280), /1280 × 1080 pixels.*1920 × 1080.*Choose the clip/],
      ['frames', (one) => (one.frameCount = 599), /599 frames and lists the times of 600/],
      [
        'fewer frames',
        (one) => {
          one.frameCount = 599;
          one.timesUs.pop();
        },
        /599 frames.*600.*upload that film/,
      ],
      ['times', (one) => (one.timesUs[30] = 30 * 20_000 + 1001), /Frame 30 has another time/],
      ['order', (one) => (one.strokes[0] = { ...stroke, catch: stroke.exit + 1 }), /catch|exit/i],
      ['outside', (one) => (one.marks[11] = { ...mark, frame: 600 }), /no frame 600/],
      ['joints', (one) => (one.marks[11] = { ...mark, elbow: mark.shoulder, frame: 9 }), /lie on one point/],
      ['plumb', (one) => (one.plumb = { top: { x: 1, y: 1 }, bottom: { x: 2, y: 2 } }), /too short/],
      ['stroke twice', (one) => one.strokes.push(stroke), /stroke twice/],
      ['mark twice', (one) => one.marks.push(mark), /two marks of one arm/],
      [
        'at once',
        (one) => one.strokes.push({ ...stroke, id: randomUUID(), entry: stroke.entry + 1 }),
        /at once/,
      ],
    ];
    for (const [what, spoil, words] of cases) {
      file = structuredClone(good);
      const [one] = file.sessions[0]?.clips ?? [];
      if (one) spoil(one);
      expect([what, first(await preview()).refusal]).toEqual([what, expect.stringMatching(words)]);
      const answer = await bringIn('match');
      expect([what, [400, 422].includes(answer.status)]).toEqual([what, true]);
      expect((answer.body as { detail: string }).detail).toMatch(words);
      expect([what, untimed(await exported())]).toEqual([what, before]);
    }
  });

  it('writes all clips or none', async () => {
    const second = placeClip(club.context, club.ids.athletes.own, sessionId, { frameCount: 600 }).id;
    file = await exported();
    const bad = file.sessions[0]?.clips.find(({ id }) => id === second);
    if (bad) bad.height = 720;
    wipe();
    const answer = await bringIn('take');
    expect(answer.body).toMatchObject({ status: 422, code: 'import-does-not-fit' });
    expect(club.context.db.select().from(strokes).all()).toEqual([]);
    const without = await bringIn('take', { pairs: [{ from: second, to: null }] });
    expect(without.status).toBe(200);
    expect(club.context.db.select().from(strokes).all()).toHaveLength(6);
  });

  it('takes in a clip that still has another film’s set-up only where that is missing, when only adding', async () => {
    club.context.db
      .update(clips)
      .set({ plumbTopX: null, plumbTopY: null, plumbBottomX: null, plumbBottomY: null, travel: 'left' })
      .where(eq(clips.id, clipId))
      .run();
    await bringIn('add');
    expect((await exported()).sessions[0]?.clips[0]).toMatchObject({ plumb, travel: 'left' });
  });
});
