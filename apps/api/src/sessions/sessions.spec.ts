import { randomUUID } from 'node:crypto';
import type { Session } from '@stillstroke/contract/sessions';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { openSession, placeClip, placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

describe('sessions', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let athleteId: string;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    athleteId = club.ids.athletes.own;
  });
  afterEach(() => club.close());

  const datesOf = (items: readonly Session[]) => items.map(({ date }) => date);

  it('come newest first, page by page, each once', async () => {
    for (const date of ['2026-01-03', '2026-03-01', '2026-02-10', '2026-03-01', '2025-12-31'])
      placeSession(club.context, athleteId, date);
    const seen: Session[] = [];
    let cursor = '';
    do {
      const answer = await coach.get(`/api/athletes/${athleteId}/sessions?limit=2${cursor}`);
      const page = answer.body as { items: Session[]; nextCursor: string | null; total: number };
      expect(page.total).toBe(5);
      seen.push(...page.items);
      cursor = page.nextCursor === null ? '' : `&cursor=${page.nextCursor}`;
    } while (cursor !== '');
    expect(datesOf(seen)).toEqual(['2026-03-01', '2026-03-01', '2026-02-10', '2026-01-03', '2025-12-31']);
    expect(new Set(seen.map(({ id }) => id)).size).toBe(5);
  });

  it('can be opened by the athlete, and carry their clips and names', async () => {
    const athlete = await club.agentFor('athlete');
    const opened = await openSession(athlete, athleteId, '2026-05-05');
    placeClip(club.context, athleteId, opened.id);
    const seen = (await coach.get(`/api/sessions/${opened.id}`)).body as Session;
    expect(seen).toMatchObject({
      athleteName: 'Ebba Lindqvist',
      squadName: 'Dawn squad',
      date: '2026-05-05',
      place: null,
      summary: { strokes: { left: 0, right: 0 }, verticalAt: { left: null, right: null } },
    });
    expect(seen.clips).toHaveLength(1);
  });

  it('change only in what is said', async () => {
    const { id } = await openSession(coach, athleteId);
    const path = `/api/sessions/${id}`;
    await coach.mutate('patch', path).send({ place: 'Ferrow Lido', note: 'windy' });
    const changed = await coach.mutate('patch', path).send({ note: null });
    expect(changed.body).toMatchObject({ place: 'Ferrow Lido', note: null, date: '2026-03-02' });
  });

  it('are out of sight once deleted, with their clips, and come back whole within the time', async () => {
    club.setNow(new Date('2026-06-01T10:00:00Z'));
    const { id } = await openSession(coach, athleteId);
    const clip = placeClip(club.context, athleteId, id);
    const deleted = await coach.mutate('delete', `/api/sessions/${id}`);
    expect(deleted.body).toEqual({ undoUntil: '2026-06-01T11:00:00.000Z' });
    for (const path of [`/api/sessions/${id}`, `/api/clips/${clip.id}`, `/api/clips/${clip.id}/marks`])
      expect((await coach.get(path)).status).toBe(404);
    const listed = await coach.get(`/api/athletes/${athleteId}/sessions`);
    expect(listed.body).toMatchObject({ items: [], total: 0 });
    expect((await coach.mutate('delete', `/api/sessions/${id}`)).status).toBe(404);

    club.setNow(new Date('2026-06-01T10:59:59Z'));
    const back = await coach.mutate('post', `/api/sessions/${id}/restore`);
    expect(back.status).toBe(200);
    expect((back.body as Session).clips.map((one) => one.id)).toEqual([clip.id]);
  });

  it('cannot be brought back too late', async () => {
    club.setNow(new Date('2026-06-01T10:00:00Z'));
    const { id } = await openSession(coach, athleteId);
    await coach.mutate('delete', `/api/sessions/${id}`);
    club.setNow(new Date('2026-06-01T11:00:00Z'));
    const late = await coach.mutate('post', `/api/sessions/${id}/restore`);
    expect(late.body).toMatchObject({ status: 410, code: 'undo-expired' });
  });

  it('of a cursor that nobody gave out start no list', async () => {
    for (const cursor of ['x', Buffer.from('["2026-01-01"]').toString('base64url'), 'e30']) {
      const answer = await coach.get(`/api/athletes/${athleteId}/sessions?cursor=${cursor}`);
      expect(answer.body).toMatchObject({ status: 400, code: 'bad-request' });
    }
  });

  it('of an athlete that is not there are no list', async () => {
    expect((await coach.get(`/api/athletes/${randomUUID()}/sessions`)).status).toBe(404);
  });
});
