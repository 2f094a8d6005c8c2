import type { Observation, Snippet } from '@stillstroke/contract/review-lists';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';
import { firstObservations } from './observations.service';

let club: TestClub;
let coach: TestBrowser;
beforeEach(async () => {
  club = await openTestClub();
  coach = await club.agentFor('coach');
});
afterEach(() => club.close());

const items = <T>({ body }: { body: unknown }) => (body as { items: T[] }).items;

describe('a club’s observations', () => {
  const list = async (browser = coach) => items<Observation>(await browser.get('/api/observations'));

  it('begin with the first ones, by name, once', async () => {
    const names = (await list()).map(({ name }) => name);
    expect(names).toEqual([...firstObservations].sort((a, b) => a.localeCompare(b, 'en')));
    expect(await list()).toHaveLength(firstObservations.length);
  });

  it('are the club’s own to extend, rename and retire', async () => {
    const made = await coach.mutate('post', '/api/observations').send({ name: 'Late breath' });
    const late = made.body as Observation;
    expect(made.status).toBe(201);
    expect(await list()).toHaveLength(firstObservations.length + 1);
    const again = await coach.mutate('post', '/api/observations').send({ name: 'late BREATH' });
    expect(again.body).toMatchObject({ status: 409, code: 'name-taken' });
    const admin = await club.agentFor('admin');
    const change = (browser: TestBrowser, body: object) =>
      browser.mutate('patch', `/api/observations/${late.id}`).send(body);
    expect((await change(admin, { version: 1, name: 'Breathes late' })).body).toMatchObject({ version: 2 });
    expect((await change(coach, { version: 1, retired: true })).body).toMatchObject({
      code: 'changed-meanwhile',
      current: { name: 'Breathes late', version: 2 },
    });
    expect((await change(coach, { version: 2, retired: true })).body).toMatchObject({ retired: true });
    const foreign = await club.agentFor('foreignCoach');
    expect((await list(foreign)).map(({ name }) => name)).not.toContain('Breathes late');
  });
});

describe('kept texts', () => {
  it('are each coach’s own, oldest first, and change by version', async () => {
    const add = async (words: string) =>
      (await coach.mutate('post', '/api/snippets').send({ words })).body as Snippet;
    club.setNow(new Date('2026-03-01T06:00:00Z'));
    const first = await add('One thing at a time.');
    club.setNow(new Date('2026-03-02T06:00:00Z'));
    const second = await add('<b>Slow</b> is smooth.');
    expect(items<Snippet>(await coach.get('/api/snippets'))).toEqual([first, second]);
    const other = await club.agentFor('otherCoach');
    expect(items<Snippet>(await other.get('/api/snippets'))).toEqual([]);
    const path = `/api/snippets/${first.id}`;
    expect((await coach.mutate('patch', path).send({ version: 1, words: 'One.' })).body).toMatchObject({
      words: 'One.',
      version: 2,
    });
    expect((await coach.mutate('delete', `${path}?version=1`)).status).toBe(409);
    expect((await coach.mutate('delete', `${path}?version=2`)).status).toBe(204);
    expect(items<Snippet>(await coach.get('/api/snippets'))).toEqual([second]);
  });
});
