import { randomUUID } from 'node:crypto';
import type { Stroke } from '@stillstroke/contract/strokes';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { placeClip, placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

const events = { arm: 'left', entry: 10, catch: 20, exit: 50, nextEntry: 70, breath: false };

describe('strokes', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let clipId: string;
  let path: string;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    const sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId).id;
    path = `/api/clips/${clipId}/strokes`;
  });
  afterEach(() => club.close());

  const add = async (change: object = {}) => coach.mutate('post', path).send({ ...events, ...change });
  const codeOf = ({ body }: { body: unknown }) => (body as { code?: string }).code ?? 'none';

  it('are listed by arm and entry, and follow one another from entry to next entry', async () => {
    const later = (await add({ entry: 70, catch: 80, exit: 110, nextEntry: null })).body as Stroke;
    const right = (await add({ arm: 'right' })).body as Stroke;
    const first = (await add()).body as Stroke;
    const listed = (await coach.get(path)).body as { items: Stroke[] };
    expect(listed.items).toEqual([first, later, right]);
    const seen = 'hand-seen';
    const sources = { entrySource: seen, catchSource: seen, exitSource: seen, nextEntrySource: seen };
    expect(first).toEqual({ ...events, ...sources, id: first.id, clipId, version: 1 });
  });

  it('have their events in order, within the clip', async () => {
    const wrong: [object, string][] = [
      [{ catch: 10 }, 'events-out-of-order'],
      [{ exit: 20 }, 'events-out-of-order'],
      [{ nextEntry: 50 }, 'events-out-of-order'],
      [{ nextEntry: 200 }, 'frame-out-of-range'],
    ];
    for (const [change, code] of wrong) {
      const answer = await add(change);
      expect([change, answer.status, codeOf(answer)]).toEqual([change, 422, code]);
    }
  });

  it('of one arm do not overlap', async () => {
    await add();
    for (const change of [
      { entry: 5, catch: 6, exit: 11, nextEntry: null },
      { entry: 60, catch: 65, exit: 90, nextEntry: 100 },
      {},
    ])
      expect(codeOf(await add(change))).toBe('strokes-overlap');
    expect((await add({ arm: 'right' })).status).toBe(201);
    expect((await add({ entry: 70, catch: 75, exit: 90, nextEntry: 100 })).status).toBe(201);
  });

  it('sent twice under one id are one stroke; another under that id is refused', async () => {
    const id = randomUUID();
    const first = await add({ id });
    const again = await add({ id });
    expect([again.status, again.body]).toEqual([201, first.body]);
    const other = await add({ id, breath: true });
    expect(other.body).toMatchObject({
      status: 409,
      code: 'changed-meanwhile',
      current: first.body as object,
    });
    const foreign = await club.agentFor('foreignCoach');
    const elsewhere = placeClip(
      club.context,
      club.ids.athletes.foreign,
      placeSession(club.context, club.ids.athletes.foreign),
    );
    const taken = await foreign.mutate('post', `/api/clips/${elsewhere.id}/strokes`).send({ ...events, id });
    expect(taken.status).toBe(409);
    expect(taken.text).not.toContain(clipId);
  });

  it('change in what is said, counted, and not over somebody else’s change', async () => {
    const { id } = (await add()).body as Stroke;
    const change = (body: object) => coach.mutate('patch', `/api/strokes/${id}`).send(body);
    expect((await change({ breath: true, version: 1 })).body).toMatchObject({
      breath: true,
      version: 2,
      exit: 50,
    });
    const late = await change({ exit: 55, version: 1 });
    expect(late.body).toMatchObject({
      status: 409,
      code: 'changed-meanwhile',
      current: { version: 2, exit: 50 },
    });
    expect((await change({ nextEntry: null })).body).toMatchObject({ nextEntry: null, version: 3 });
    expect(codeOf(await change({ catch: 60 }))).toBe('events-out-of-order');
    await add({ entry: 100, catch: 110, exit: 130, nextEntry: 150 });
    expect(codeOf(await change({ exit: 105 }))).toBe('strokes-overlap');
  });
});
