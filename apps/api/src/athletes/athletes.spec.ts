import { randomUUID } from 'node:crypto';
import type { Athlete } from '@stillstroke/contract/athletes';
import { athletes } from '@stillstroke/db/schema/club';
import { clips, marks, sessions, strokeFigures, strokes } from '@stillstroke/db/schema/film';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { openTestClub, type TestClub } from '../platform/test-club';

let club: TestClub;
beforeEach(async () => {
  club = await openTestClub();
});
afterEach(() => club.close());

interface Page {
  items: Athlete[];
  nextCursor: string | null;
  total: number;
}
const list = async (who: Parameters<TestClub['agentFor']>[0], query = '') => {
  const answer = await (await club.agentFor(who)).get(`/api/athletes${query}`);
  expect(answer.status).toBe(200);
  return answer.body as Page;
};
const names = (page: Page) => page.items.map((athlete) => athlete.name);

function addAthlete(name: string): string {
  const id = randomUUID();
  const { clubs, squads } = club.ids;
  club.context.db
    .insert(athletes)
    .values({
      id,
      clubId: clubs.tarnValley,
      squadId: squads.dawn,
      name,
      createdAt: '2026-01-06T06:00:00.000Z',
    })
    .run();
  return id;
}

/** A session with one ready clip, and a measured stroke of each arm where shares are given. */
function addSession(
  athleteId: string,
  date: string,
  more: { deletedAt?: string; marked?: boolean; left?: number; right?: number } = {},
): void {
  const { db } = club.context;
  const [sessionId, clipId] = [randomUUID(), randomUUID()];
  const at = `${date}T07:00:00.000Z`;
  db.insert(sessions)
    .values({ id: sessionId, athleteId, date, createdAt: at, deletedAt: more.deletedAt ?? null })
    .run();
  db.insert(clips)
    .values({
      id: clipId,
      sessionId,
      name: 'lane 4.mp4',
      view: 'side-underwater',
      travel: 'right',
      stroke: 'full',
      status: 'ready',
      width: 1280,
      height: 720,
      frameCount: 600,
      durationUs: 10_000_000,
      codec: 'avc',
      container: 'mp4',
      sizeBytes: 1,
      sha256: 'x',
      cutOff: false,
      hasPoster: false,
      createdAt: at,
    })
    .run();
  if (more.marked) {
    const joints = { shoulderX: 1, shoulderY: 1, elbowX: 2, elbowY: 2, wristX: 3, wristY: 3 };
    db.insert(marks)
      .values({ clipId, arm: 'left', frame: 1, ...joints, updatedAt: at })
      .run();
  }
  for (const arm of ['left', 'right'] as const) {
    const value = more[arm];
    if (value === undefined) continue;
    const id = randomUUID();
    db.insert(strokes)
      .values({ id, clipId, arm, entryFrame: 0, catchFrame: 9, exitFrame: 50, breath: false, updatedAt: at })
      .run();
    db.insert(strokeFigures)
      .values({ strokeId: id, measure: 'verticalAt', value, uncertainty: 0.01, frame: 20 })
      .run();
  }
}

describe('the list of athletes', () => {
  it('is the club for an admin, the squads coached for a coach, oneself for an athlete', async () => {
    expect(names(await list('admin'))).toEqual(['Ebba Lindqvist', 'Nuri Halloran', 'Otis Farrow']);
    expect(names(await list('coach'))).toEqual(['Ebba Lindqvist', 'Otis Farrow']);
    expect(names(await list('otherCoach'))).toEqual(['Nuri Halloran']);
    expect(names(await list('athlete'))).toEqual(['Ebba Lindqvist']);
    expect(names(await list('foreignCoach'))).toEqual(['Wren Calloway']);
  });

  it('tells last session, sessions, clips without marks, and vertical at of the newest measured session', async () => {
    const { own } = club.ids.athletes;
    addSession(own, '2026-02-01', { left: 0.2, right: 0.4, marked: true });
    addSession(own, '2026-03-01', { left: 0.3, right: 0.5, marked: true });
    addSession(own, '2026-03-08');
    addSession(own, '2026-04-01', { deletedAt: '2026-04-02T00:00:00.000Z', left: 0.9 });
    const [ebba, otis] = (await list('coach')).items;
    expect(ebba).toMatchObject({
      lastSession: '2026-03-08',
      sessionCount: 3,
      clipsToMark: 1,
      verticalAt: { left: 0.3, right: 0.5 },
      squadName: 'Dawn squad',
      deactivated: false,
    });
    expect(otis).toMatchObject({
      lastSession: null,
      sessionCount: 0,
      clipsToMark: 0,
      verticalAt: { left: null, right: null },
    });
  });

  it.each([
    ['name', 'asc'],
    ['name', 'desc'],
    ['lastSession', 'asc'],
    ['lastSession', 'desc'],
    ['clipsToMark', 'asc'],
    ['clipsToMark', 'desc'],
  ])('pages by %s %s without missing or repeating anybody', async (sort, direction) => {
    for (let i = 0; i < 12; i += 1) {
      const id = addAthlete(`Swimmer ${String.fromCharCode(76 - i)}`);
      if (i % 3 === 0) addSession(id, `2026-0${1 + (i % 2)}-10`);
    }
    const query = `?sort=${sort}&direction=${direction}`;
    const whole = await list('coach', `${query}&limit=200`);
    expect(whole.items).toHaveLength(14);
    const paged: string[] = [];
    let cursor: string | null = '';
    while (cursor !== null) {
      const page: Page = await list('coach', `${query}&limit=5${cursor ? `&cursor=${cursor}` : ''}`);
      expect(page.total).toBe(14);
      paged.push(...names(page));
      cursor = page.nextCursor;
    }
    expect(paged).toEqual(names(whole));
    const keys = whole.items.map((athlete) => athlete[sort as 'name' | 'lastSession' | 'clipsToMark'] ?? '');
    const sorted = [...keys].sort((a, b) => (a < b ? -1 : a > b ? 1 : 0));
    expect(keys).toEqual(direction === 'asc' ? sorted : sorted.reverse());
  });

  it('refuses a cursor from another order or made up', async () => {
    const browser = await club.agentFor('coach');
    const { nextCursor } = await list('coach', '?limit=1');
    for (const query of [`?sort=lastSession&cursor=${nextCursor}`, '?cursor=bm90aGluZw', '?cursor=%00']) {
      const answer = await browser.get(`/api/athletes${query}`);
      expect(answer.body).toMatchObject({ status: 400, code: 'bad-request' });
    }
  });

  it('searches without regard to case and accents, and takes signs as signs', async () => {
    addAthlete('Åsa Nyström');
    expect(names(await list('coach', '?search=asa'))).toEqual(['Åsa Nyström']);
    expect(names(await list('coach', `?search=${encodeURIComponent('NYSTRÖM')}`))).toEqual(['Åsa Nyström']);
    expect(names(await list('coach', '?search=%25'))).toEqual([]);
    expect(names(await list('coach', '?search=_'))).toEqual([]);
  });

  it('filters by squad and leaves the deactivated out unless asked', async () => {
    const { squads, athletes: ids } = club.ids;
    expect(names(await list('admin', `?squadId=${squads.dusk}`))).toEqual(['Nuri Halloran']);
    expect(await list('coach', `?squadId=${squads.dusk}`)).toMatchObject({ items: [], total: 0 });
    const coach = await club.agentFor('coach');
    await coach.mutate('patch', `/api/athletes/${ids.other}`).send({ deactivated: true }).expect(200);
    expect(names(await list('coach'))).toEqual(['Ebba Lindqvist']);
    expect(names(await list('coach', '?includeDeactivated=true'))).toEqual(['Ebba Lindqvist', 'Otis Farrow']);
  });
});

describe('changing athletes', () => {
  it('lets a coach add to a squad of their own only', async () => {
    const coach = await club.agentFor('coach');
    const made = await coach
      .mutate('post', '/api/athletes')
      .send({ name: '  Juno Tarrant ', squadId: club.ids.squads.dawn });
    expect(made.status).toBe(201);
    expect(made.body).toMatchObject({ name: 'Juno Tarrant', squadName: 'Dawn squad', sessionCount: 0 });
    const { dusk, harbour } = club.ids.squads;
    const refusals = [];
    for (const squadId of [dusk, harbour, randomUUID()]) {
      const answer = await coach.mutate('post', '/api/athletes').send({ name: 'Juno Tarrant', squadId });
      expect(answer.status).toBe(400);
      refusals.push(answer.text);
    }
    expect(new Set(refusals).size, 'a squad of others looks like one that is not there').toBe(1);
  });

  it('lets a coach move an athlete only between own squads, an admin within the club', async () => {
    const path = `/api/athletes/${club.ids.athletes.own}`;
    const move = { squadId: club.ids.squads.dusk };
    await (await club.agentFor('coach')).mutate('patch', path).send(move).expect(400);
    const admin = await club.agentFor('admin');
    expect((await admin.mutate('patch', path).send(move)).body).toMatchObject({ squadName: 'Dusk squad' });
    await admin.mutate('patch', path).send({ squadId: club.ids.squads.harbour }).expect(400);
    await (await club.agentFor('coach')).get(path).expect(404);
  });

  it('does not fill a deactivated squad', async () => {
    const admin = await club.agentFor('admin');
    const squad = await admin.mutate('post', '/api/squads').send({ name: 'Noon squad' });
    const { id } = squad.body as { id: string };
    await admin.mutate('patch', `/api/squads/${id}`).send({ deactivated: true }).expect(200);
    const answer = await admin.mutate('post', '/api/athletes').send({ name: 'Juno', squadId: id });
    expect(answer.body).toMatchObject({ status: 400, issues: [{ path: 'squadId' }] });
  });
});
