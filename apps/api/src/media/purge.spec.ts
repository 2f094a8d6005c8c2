import { existsSync, mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { clipFrames, clips, marks, sessions, strokeFigures, strokes } from '@stillstroke/db/schema/film';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';
import { clipFolder, openIncoming } from './clip-store';
import { purgeDeleted } from './purge';
import { sweepFilms } from './sweep';
import { filmsOnDisk, placeClip, placeSession } from './test-films';

describe('what is deleted', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let sessionId: string;
  const at = (time: string) => club.setNow(new Date(`2026-06-01T${time}Z`));

  beforeEach(async () => {
    club = await openTestClub();
    at('10:00:00');
    coach = await club.agentFor('coach');
    sessionId = placeSession(club.context, club.ids.athletes.own);
  });
  afterEach(() => club.close());

  const place = () => placeClip(club.context, club.ids.athletes.own, sessionId);
  const joints = { shoulder: { x: 100, y: 100 }, elbow: { x: 160, y: 130 }, wrist: { x: 190, y: 190 } };

  it('goes for good after the time to undo: film, index, strokes, marks and figures together', async () => {
    const kept = place();
    const clip = place();
    for (const { id } of [kept, clip]) {
      await coach.mutate('put', `/api/clips/${id}/marks/left/20`).send(joints);
      await coach
        .mutate('post', `/api/clips/${id}/strokes`)
        .send({ arm: 'left', entry: 0, catch: 20, exit: 50, nextEntry: 80, breath: false });
    }
    await coach.mutate('delete', `/api/clips/${clip.id}`);
    at('10:59:59');
    expect(await purgeDeleted(club.context)).toEqual([]);
    at('11:00:00');
    expect(await purgeDeleted(club.context)).toEqual([clip.id]);
    expect(filmsOnDisk(club.context).clips).toEqual([kept.id]);
    const { db } = club.context;
    for (const table of [clips, clipFrames, strokes, marks])
      expect(db.select().from(table).all()).toHaveLength(1);
    expect(db.select().from(strokeFigures).all().length).toBeGreaterThan(0);
    expect((await coach.mutate('post', `/api/clips/${clip.id}/restore`)).status).toBe(404);
  });

  it('goes with its session', async () => {
    const clip = place();
    await coach.mutate('delete', `/api/sessions/${sessionId}`);
    at('12:00:00');
    expect(await purgeDeleted(club.context)).toEqual([clip.id]);
    expect(club.context.db.select().from(sessions).all()).toEqual([]);
    expect(filmsOnDisk(club.context).clips).toEqual([]);
  });

  it('and brought back in time stays', async () => {
    const clip = place();
    await coach.mutate('delete', `/api/clips/${clip.id}`);
    await coach.mutate('post', `/api/clips/${clip.id}/restore`);
    at('23:00:00');
    expect(await purgeDeleted(club.context)).toEqual([]);
    expect((await coach.get(`/api/clips/${clip.id}`)).status).toBe(200);
  });

  it('too long ago cannot be brought back', async () => {
    const clip = place();
    await coach.mutate('delete', `/api/clips/${clip.id}`);
    at('11:00:00');
    const late = await coach.mutate('post', `/api/clips/${clip.id}/restore`);
    expect(late.body).toMatchObject({ status: 410, code: 'undo-expired' });
  });
});

describe('a sweep after a crash', () => {
  let club: TestClub;
  beforeEach(async () => {
    club = await openTestClub();
  });
  afterEach(() => club.close());

  it('takes folders without a row and abandoned uploads, and names clips without a film', async () => {
    const { settings } = club.context;
    const sessionId = placeSession(club.context, club.ids.athletes.own);
    const whole = placeClip(club.context, club.ids.athletes.own, sessionId);
    const lost = placeClip(club.context, club.ids.athletes.own, sessionId);
    rmSync(clipFolder(settings, lost.id), { recursive: true });
    const stray = clipFolder(settings, 'a-clip-whose-row-was-never-written');
    mkdirSync(stray);
    writeFileSync(join(stray, 'film'), 'x');
    const abandoned = openIncoming(settings);
    const swept = await sweepFilms(club.context, new Date(Date.now() + 60_000));
    expect(swept).toEqual({ removed: 2, missing: [lost.id] });
    expect(existsSync(stray)).toBe(false);
    expect(existsSync(abandoned)).toBe(false);
    expect(filmsOnDisk(club.context).clips).toEqual([whole.id]);
  });

  it('leaves an upload alone that is under way', async () => {
    const arriving = openIncoming(club.context.settings);
    expect(await sweepFilms(club.context, new Date(Date.now() - 60_000))).toEqual({
      removed: 0,
      missing: [],
    });
    expect(existsSync(arriving)).toBe(true);
  });
});
