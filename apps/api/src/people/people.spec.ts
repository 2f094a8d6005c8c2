import type { Person } from '@stillstroke/contract/people';
import { users } from '@stillstroke/db/schema/club';
import { invitations } from '@stillstroke/db/schema/sign-in';
import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { emailOf, openTestClub, testPassword, type TestClub } from '../platform/test-club';
import type { TestBrowser } from '../platform/test-browser';

let club: TestClub;
let admin: TestBrowser;
beforeEach(async () => {
  club = await openTestClub();
  admin = await club.agentFor('admin');
});
afterEach(() => club.close());

interface InvitedBody {
  person: Person;
  invitation: { url: string; expiresAt: string };
}
const newCoach = () => ({
  name: 'Mara Holt',
  email: 'Mara.Holt@tarn.example',
  role: 'coach',
  squadIds: [club.ids.squads.dusk],
});
const invite = async (body: object = newCoach()) => {
  const answer = await admin.mutate('post', '/api/people').send(body);
  expect(answer.status).toBe(201);
  return answer.body as InvitedBody;
};
const tokenIn = ({ invitation }: InvitedBody) => invitation.url.split('/').at(-1) ?? '';
const accept = (token: string, password: string, browser = club.anonymous()) =>
  browser
    .get('/api/auth/page')
    .then(() => browser.mutate('post', `/api/invitations/${token}/accept`).send({ password }));

describe('people of the club', () => {
  it('are listed, sorted and filtered', async () => {
    const all = (await admin.get('/api/people')).body as { items: Person[]; total: number };
    expect(all.total).toBe(6);
    expect(all.items.map((person) => person.name)).toEqual([
      'The admin',
      'The athlete',
      'The coach',
      'The guardian',
      'The otherAthlete',
      'The otherCoach',
    ]);
    expect(all.items[1]).toMatchObject({ squadIds: [club.ids.squads.dawn], status: 'active' });
    const coaches = (await admin.get('/api/people?role=coach&sort=status&direction=desc&limit=1')).body as {
      items: Person[];
      nextCursor: string;
      total: number;
    };
    expect(coaches).toMatchObject({
      total: 2,
      items: [{ name: 'The coach', squadIds: [club.ids.squads.dawn] }],
    });
    const next = await admin.get(
      `/api/people?role=coach&sort=status&direction=desc&limit=1&cursor=${coaches.nextCursor}`,
    );
    expect(next.body).toMatchObject({ nextCursor: null, items: [{ name: 'The otherCoach' }] });
    expect((await admin.get('/api/people?search=OTHERC')).body).toMatchObject({ total: 1 });
  });

  it('cannot have an address twice, in any club', async () => {
    for (const email of [emailOf('coach'), emailOf('foreignCoach').toUpperCase()]) {
      const answer = await admin.mutate('post', '/api/people').send({ ...newCoach(), email });
      expect(answer.body).toMatchObject({ status: 409, code: 'email-taken' });
    }
  });

  it.each([
    ['a squad of another club', () => ({ ...newCoach(), squadIds: [club.ids.squads.harbour] }), 'squadIds.0'],
    ['squads for an admin', () => ({ ...newCoach(), role: 'admin' }), 'squadIds'],
    [
      'an athlete account without athlete',
      () => ({ ...newCoach(), role: 'athlete', squadIds: [] }),
      'athleteId',
    ],
    [
      'an athlete of another club',
      () => ({ ...newCoach(), role: 'athlete', squadIds: [], athleteId: club.ids.athletes.foreign }),
      'athleteId',
    ],
    ['an athlete for a coach', () => ({ ...newCoach(), athleteId: club.ids.athletes.dusk }), 'athleteId'],
  ])('are not invited with %s', async (_case, body, path) => {
    const answer = await admin.mutate('post', '/api/people').send(body());
    expect(answer.body).toMatchObject({ status: 400, issues: [{ path }] });
    expect(club.context.db.select().from(users).all()).toHaveLength(9);
  });

  it('have one account an athlete', async () => {
    const body = { name: 'Ebba', email: 'e@tarn.example', role: 'athlete', athleteId: club.ids.athletes.own };
    const answer = await admin.mutate('post', '/api/people').send(body);
    expect(answer.body).toMatchObject({ status: 409, code: 'conflict' });
  });

  it('keep at least one admin who can sign in', async () => {
    const path = `/api/people/${club.ids.users.admin}`;
    const refused = await admin.mutate('patch', path).send({ deactivated: true });
    expect(refused.body).toMatchObject({ status: 409, code: 'conflict' });
    const invited = await invite({ name: 'Second', email: 'second@tarn.example', role: 'admin' });
    expect((await admin.mutate('patch', path).send({ deactivated: true })).status).toBe(409);
    await accept(tokenIn(invited), 'seven herons over weir');
    expect((await admin.mutate('patch', path).send({ deactivated: true })).status).toBe(200);
    expect((await admin.get('/api/auth/me')).status).toBe(401);
  });

  it('lose their sign-ins and invitations when deactivated, and come back with their password', async () => {
    const coach = await club.agentFor('coach');
    const path = `/api/people/${club.ids.users.coach}`;
    const again = (await admin.mutate('post', `${path}/invitation`)).body as InvitedBody;
    const changed = await admin.mutate('patch', path).send({ deactivated: true });
    expect(changed.body).toMatchObject({ status: 'deactivated' });
    expect((await coach.get('/api/auth/me')).status).toBe(401);
    expect((await club.anonymous().get(`/api/invitations/${tokenIn(again)}`)).status).toBe(404);
    expect((await admin.mutate('post', `${path}/invitation`)).status).toBe(409);
    await admin.mutate('patch', path).send({ deactivated: false }).expect(200);
    expect((await coach.get('/api/auth/me')).status).toBe(401);
    expect((await club.anonymous().signIn(emailOf('coach'), testPassword)).status).toBe(200);
  });

  it('get other squads to coach', async () => {
    const path = `/api/people/${club.ids.users.coach}`;
    const { dusk, harbour } = club.ids.squads;
    const changed = await admin.mutate('patch', path).send({ name: 'Renamed', squadIds: [dusk, dusk] });
    expect(changed.body).toMatchObject({ name: 'Renamed', squadIds: [dusk] });
    await admin
      .mutate('patch', path)
      .send({ squadIds: [harbour] })
      .expect(400);
    await admin
      .mutate('patch', `/api/people/${club.ids.users.athlete}`)
      .send({ squadIds: [dusk] })
      .expect(400);
  });
});

describe('an invitation', () => {
  it('says whom it is for, sets the password, signs in, and is spent', async () => {
    const invited = await invite();
    expect(invited.person).toMatchObject({ status: 'invited', email: 'mara.holt@tarn.example' });
    const token = tokenIn(invited);
    expect((await club.anonymous().get(`/api/invitations/${token}`)).body).toEqual({
      name: 'Mara Holt',
      email: 'mara.holt@tarn.example',
      clubName: 'Tarn Valley Swim Club',
      role: 'coach',
    });
    const browser = club.anonymous();
    const accepted = await accept(token, 'seven herons over weir', browser);
    expect(accepted.body).toMatchObject({ user: { name: 'Mara Holt', role: 'coach' } });
    expect((await browser.get(`/api/athletes/${club.ids.athletes.dusk}`)).status).toBe(200);
    // The CSRF token given with the sign-in works at once.
    expect((await browser.mutate('post', '/api/auth/sign-out')).status).toBe(204);
    const second = await accept(token, 'eight herons over weir');
    expect(second.body).toMatchObject({ status: 404, code: 'invitation-spent' });
    expect((await club.anonymous().signIn('mara.holt@tarn.example', 'seven herons over weir')).status).toBe(
      200,
    );
  });

  it('is kept only as a hash', async () => {
    const invited = await invite();
    const kept = club.context.db.select().from(invitations).all();
    expect(kept).toHaveLength(1);
    expect(JSON.stringify(kept)).not.toContain(tokenIn(invited));
    expect((await admin.get('/api/people?search=mara')).text).not.toContain(tokenIn(invited));
  });

  it('leads to the public address where one is set', async () => {
    const settings = { publicUrl: 'https://strokes.tarn.example' };
    const other = await openTestClub({ settings });
    const answer = await (
      await other.agentFor('admin')
    )
      .mutate('post', '/api/people')
      .send({ ...newCoach(), squadIds: [] });
    other.close();
    expect((answer.body as InvitedBody).invitation.url).toMatch(
      /^https:\/\/strokes\.tarn\.example\/invitation\/[\w-]{43}$/,
    );
  });

  it('expires after seven days', async () => {
    const token = tokenIn(await invite());
    club.setNow(new Date(Date.now() + 7 * 86_400_000 + 1000));
    expect((await club.anonymous().get(`/api/invitations/${token}`)).status).toBe(404);
    expect((await accept(token, 'seven herons over weir')).status).toBe(404);
  });

  it('stops working when a new one is made; the password set before works until then', async () => {
    const first = tokenIn(await invite());
    await accept(first, 'seven herons over weir');
    const id = club.context.db
      .select()
      .from(users)
      .where(eq(users.email, 'mara.holt@tarn.example'))
      .get()?.id;
    const again = async () =>
      tokenIn((await admin.mutate('post', `/api/people/${id}/invitation`)).body as InvitedBody);
    const [second, third] = [await again(), await again()];
    const signInWith = async (password: string) =>
      (await club.anonymous().signIn('mara.holt@tarn.example', password)).status;
    expect((await accept(second, 'nine herons over weir')).status).toBe(404);
    expect(await signInWith('seven herons over weir')).toBe(200);
    expect((await accept(third, 'nine herons over weir')).status).toBe(200);
    expect(await signInWith('seven herons over weir')).toBe(401);
  });

  it('lets one of two who accept at once', async () => {
    const token = tokenIn(await invite());
    const both = await Promise.all([
      accept(token, 'seven herons over weir'),
      accept(token, 'eight herons over weir'),
    ]);
    expect(both.map((answer) => answer.status).sort()).toEqual([200, 404]);
  });

  it.each([
    ['a short one', 'short-one-1', 'bad-request'],
    ['a common one', 'password1234', 'weak-password'],
    ['a common one in disguise', 'P4ssw0rd2026', 'weak-password'],
    ['one letter over and over', 'aaaaaaaaaaaaaaaa', 'weak-password'],
    ['a run of keys', 'qwertyuiop12', 'weak-password'],
    ['the own address', 'mara.holt@tarn.example', 'weak-password'],
    ['name and club', 'MaraHoltTarn', 'weak-password'],
    ['one far too long', 'x'.repeat(257), 'bad-request'],
  ])('refuses %s as a password and stays open', async (_case, password, code) => {
    const token = tokenIn(await invite());
    const answer = await accept(token, password);
    expect(answer.body).toMatchObject({ status: 400, code, issues: [{ path: 'password' }] });
    expect((await accept(token, 'seven herons over weir')).status).toBe(200);
  });
});
