import { athletes, users } from '@stillstroke/db/schema/club';
import { targets } from '@stillstroke/db/schema/targets';
import type { Target } from '@stillstroke/contract/targets';
import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { purgeDeleted } from '../media/purge';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

const early = { measure: 'verticalAt', arm: 'both', low: null, high: 0.35, words: 'fingers down early' };

describe('targets', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let path: string;

  beforeEach(async () => {
    club = await openTestClub();
    club.setNow(new Date('2026-06-01T10:00:00Z'));
    coach = await club.agentFor('coach');
    path = `/api/athletes/${club.ids.athletes.own}/targets`;
  });
  afterEach(() => club.close());

  const set = async (body: object = {}) => {
    const answer = await coach.mutate('post', path).send({ ...early, ...body });
    expect(answer.status, answer.text).toBe(201);
    return answer.body as Target;
  };
  const list = async (who: TestBrowser = coach) => ((await who.get(path)).body as { items: Target[] }).items;
  const change = (id: string, body: object) => coach.mutate('patch', `/api/targets/${id}`).send(body);

  it('are none until a coach sets one, in their words, and the athlete reads it', async () => {
    expect(await list()).toEqual([]);
    const made = await set();
    const name = club.context.db.select().from(users).where(eq(users.id, club.ids.users.coach)).get()?.name;
    expect(made).toEqual({
      ...early,
      id: made.id,
      athleteId: club.ids.athletes.own,
      setBy: name,
      setAt: '2026-06-01T10:00:00.000Z',
      version: 1,
    });
    expect(await list(await club.agentFor('athlete'))).toEqual([made]);
  });

  it('are one for a measure and arm; an arm may have its own beside that for both', async () => {
    await set();
    const again = await coach.mutate('post', path).send(early);
    expect(again.body).toMatchObject({ status: 409, code: 'conflict' });
    await set({ arm: 'left' });
    await set({ measure: 'strokeRate', low: 28, high: null });
    expect((await list()).map(({ measure, arm }) => `${measure} ${arm}`)).toEqual([
      'strokeRate both',
      'verticalAt both',
      'verticalAt left',
    ]);
  });

  it('of another athlete are no obstacle and not in the list', async () => {
    const others = `/api/athletes/${club.ids.athletes.other}/targets`;
    expect((await coach.mutate('post', others).send(early)).status).toBe(201);
    await set();
    expect(await list()).toHaveLength(1);
  });

  it.each([
    [{ low: null, high: null }, 'low'],
    [{ low: 0.5, high: 0.4 }, 'high'],
    [{ low: 0.4, high: 0.4 }, 'high'],
    [{ low: null, high: 35 }, 'high'],
    [{ low: -0.1 }, 'low'],
    [{ measure: 'elbowAtMidPull', low: 90, high: 181 }, 'high'],
    [{ measure: 'peakDrop', low: -181, high: 20 }, 'low'],
    [{ words: '   ' }, 'words'],
  ])('with %o are refused at %s', async (body, at) => {
    const answer = await coach.mutate('post', path).send({ ...early, ...body });
    expect(answer.body).toMatchObject({ status: 400, issues: [{ path: at }] });
    expect(await list()).toEqual([]);
  });

  it('change from the version they were read at, and the band stays one', async () => {
    const { id } = await set();
    const changed = await change(id, { low: 0.2, words: 'by a third', version: 1 });
    expect(changed.body).toMatchObject({ low: 0.2, high: 0.35, words: 'by a third', version: 2 });
    const late = await change(id, { high: 0.4, version: 1 });
    expect(late.body).toMatchObject({
      status: 409,
      code: 'changed-meanwhile',
      current: { id, words: 'by a third', version: 2 },
    });
    // Each end alone would do; together with what is there it would not.
    expect((await change(id, { high: 0.1, version: 2 })).body).toMatchObject({ issues: [{ path: 'high' }] });
    expect((await change(id, { low: null, high: null, version: 2 })).status).toBe(400);
    expect((await change(id, { high: null, version: 2 })).body).toMatchObject({ low: 0.2, high: null });
  });

  it('that are deleted are out of sight and can be brought back for a while', async () => {
    const { id } = await set();
    const deleted = await coach.mutate('delete', `/api/targets/${id}`);
    expect(deleted.status).toBe(200);
    const until = Date.parse((deleted.body as { undoUntil: string }).undoUntil);
    expect(until).toBeGreaterThan(Date.parse('2026-06-01T10:00:00Z'));
    expect(await list()).toEqual([]);
    expect((await change(id, { words: 'x', version: 1 })).status).toBe(404);
    expect((await coach.mutate('delete', `/api/targets/${id}`)).status).toBe(404);

    const back = await coach.mutate('post', `/api/targets/${id}/restore`);
    expect(back.body).toMatchObject({ ...early, id });
    expect(await list()).toHaveLength(1);

    await coach.mutate('delete', `/api/targets/${id}`);
    club.setNow(new Date(until + 1000));
    const late = await coach.mutate('post', `/api/targets/${id}/restore`);
    expect(late.body).toMatchObject({ status: 410, code: 'undo-expired' });
    expect(club.context.db.select().from(targets).all()).toHaveLength(1);
    await purgeDeleted(club.context);
    expect(club.context.db.select().from(targets).all()).toEqual([]);
  });

  it('do not come back beside one that was set in their place', async () => {
    const { id } = await set();
    await coach.mutate('delete', `/api/targets/${id}`);
    const other = await set({ high: 0.4 });
    const back = await coach.mutate('post', `/api/targets/${id}/restore`);
    expect(back.body).toMatchObject({ status: 409, code: 'conflict' });
    expect((await list()).map((target) => target.id)).toEqual([other.id]);
  });

  it('outlive the account that set them, and go with their athlete', async () => {
    await set();
    const { db } = club.context;
    db.delete(users).where(eq(users.id, club.ids.users.coach)).run();
    const admin = await club.agentFor('admin');
    expect(await list(admin)).toMatchObject([{ words: early.words, setBy: null }]);
    db.delete(athletes).where(eq(athletes.id, club.ids.athletes.own)).run();
    expect(db.select().from(targets).all()).toEqual([]);
  });
});
