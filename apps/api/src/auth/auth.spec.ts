import { signIns } from '@stillstroke/db/schema/sign-in';
import { users } from '@stillstroke/db/schema/club';
import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { emailOf, openTestClub, testPassword, type TestClub } from '../platform/test-club';
import { attemptLimits } from './attempt-limits';
import { DEMO_PASSWORD } from '../demo/season';

let club: TestClub;
beforeEach(async () => {
  club = await openTestClub();
});
afterEach(() => club.close());

const minutesLater = (minutes: number) => new Date(Date.now() + minutes * 60_000);
const rows = () => club.context.db.select().from(signIns).all();

describe('sign-in', () => {
  it('answers who signed in and keeps it over requests', async () => {
    const browser = club.anonymous();
    const answer = await browser.signIn(emailOf('coach'), testPassword);
    expect(answer.body).toEqual({
      user: {
        id: club.ids.users.coach,
        name: 'The coach',
        email: emailOf('coach'),
        role: 'coach',
        clubId: club.ids.clubs.tarnValley,
        clubName: 'Tarn Valley Swim Club',
        athleteId: null,
      },
    });
    const me = await browser.get('/api/auth/me');
    expect(me.body).toEqual(answer.body);
  });

  it('takes the address in any case', async () => {
    const answer = await club.anonymous().signIn(` ${emailOf('coach').toUpperCase()} `, testPassword);
    expect(answer.status).toBe(200);
  });

  it.each([
    ['a wrong password', emailOf('coach'), 'lane five at dawn'],
    ['an unknown account', 'nobody@tarnvalley.example', testPassword],
  ])('refuses %s in the same words', async (_case, email, password) => {
    const answer = await club.anonymous().signIn(email, password);
    expect(answer.status).toBe(401);
    expect(answer.type).toBe('application/problem+json');
    expect(answer.body).toMatchObject({
      code: 'wrong-credentials',
      detail: 'E-mail and password do not match an account. Check both and try again.',
    });
    expect(rows()).toHaveLength(0);
  });

  it('refuses an account whose invitation has not been accepted', async () => {
    const { db } = club.context;
    db.update(users).set({ passwordHash: null }).where(eq(users.id, club.ids.users.coach)).run();
    expect((await club.anonymous().signIn(emailOf('coach'), testPassword)).status).toBe(401);
  });

  it('changes the id at sign-in, so that one planted before is worthless', async () => {
    const browser = await club.agentFor('coach');
    const before = browser.cookie('stillstroke');
    await browser
      .mutate('post', '/api/auth/sign-in')
      .send({ email: emailOf('admin'), password: testPassword });
    const after = browser.cookie('stillstroke');
    expect(before).toBeDefined();
    expect(after).not.toBe(before);
    const old = await club.anonymous().get('/api/auth/me').set('Cookie', `stillstroke=${before}`);
    expect(old.status).toBe(401);
  });

  it('stores only a hash of the id', async () => {
    const browser = await club.agentFor('coach');
    const id =
      decodeURIComponent(browser.cookie('stillstroke') ?? '')
        .slice(2)
        .split('.')[0] ?? '';
    expect(id.length).toBeGreaterThan(20);
    expect(JSON.stringify(rows())).not.toContain(id);
    expect(rows()[0]?.userId).toBe(club.ids.users.coach);
  });

  it('sets cookies that scripts and other sites cannot use', async () => {
    const answer = await club.anonymous().signIn(emailOf('coach'), testPassword);
    const cookies = answer.get('Set-Cookie') ?? [];
    expect(cookies.find((cookie) => cookie.startsWith('stillstroke='))).toMatch(/HttpOnly; SameSite=Lax/);
    expect(cookies.find((cookie) => cookie.startsWith('XSRF-TOKEN='))).not.toMatch(/HttpOnly/);
  });

  it('sets Secure cookies bound to this host behind TLS', async () => {
    const secure = await openTestClub({ settings: { behindTls: true } });
    const page = await secure.anonymous().get('/api/auth/page').set('X-Forwarded-Proto', 'https');
    const csrf = /XSRF-TOKEN=([^;]+)/.exec(page.get('Set-Cookie')?.join() ?? '')?.[1] ?? '';
    const answer = await secure
      .anonymous()
      .mutate('post', '/api/auth/sign-in')
      .set({ 'X-Forwarded-Proto': 'https', Cookie: `XSRF-TOKEN=${csrf}`, 'X-XSRF-TOKEN': csrf })
      .send({ email: emailOf('coach'), password: testPassword });
    secure.close();
    const cookie = answer.get('Set-Cookie')?.find((one) => one.startsWith('__Host-stillstroke='));
    expect(cookie).toMatch(/Path=\/;.*Secure/);
    expect(cookie).not.toMatch(/Domain/);
  });
});

describe('sign-out', () => {
  it('makes the cookie worthless and lets the next person sign in', async () => {
    const browser = await club.agentFor('coach');
    const cookie = browser.cookie('stillstroke');
    expect((await browser.mutate('post', '/api/auth/sign-out')).status).toBe(204);
    expect(rows()).toHaveLength(0);
    const old = await club.anonymous().get('/api/auth/me').set('Cookie', `stillstroke=${cookie}`);
    expect(old.status).toBe(401);
    const next = await browser
      .mutate('post', '/api/auth/sign-in')
      .send({ email: emailOf('athlete'), password: testPassword });
    expect(next.status).toBe(200);
  });
});

describe('an existing sign-in', () => {
  it('dies at once when the account is deactivated', async () => {
    const browser = await club.agentFor('coach');
    const { db } = club.context;
    db.update(users)
      .set({ deactivatedAt: '2026-02-01T00:00:00.000Z' })
      .where(eq(users.id, club.ids.users.coach))
      .run();
    expect((await browser.get('/api/auth/me')).status).toBe(401);
    expect((await club.anonymous().signIn(emailOf('coach'), testPassword)).status).toBe(401);
  });

  it('lives on while it is used, expires when it is not, and is pruned', async () => {
    const browser = await club.agentFor('coach');
    club.setNow(minutesLater(10 * 24 * 60));
    expect((await browser.get('/api/auth/me')).status).toBe(200);
    club.setNow(minutesLater(20 * 24 * 60));
    expect((await browser.get('/api/auth/me')).status).toBe(200);
    club.setNow(minutesLater(35 * 24 * 60));
    expect((await browser.get('/api/auth/me')).status).toBe(401);
    await club.anonymous().signIn(emailOf('admin'), testPassword);
    expect(rows().map((row) => row.userId)).toEqual([club.ids.users.admin]);
  });

  it('ends after sixty days however much it is used', async () => {
    const browser = await club.agentFor('coach');
    for (const day of [10, 20, 30, 40, 50, 59]) {
      club.setNow(minutesLater(day * 24 * 60));
      expect((await browser.get('/api/auth/me')).status).toBe(200);
    }
    club.setNow(minutesLater(61 * 24 * 60));
    expect((await browser.get('/api/auth/me')).status).toBe(401);
  });
});

describe('CSRF token', () => {
  const credentials = { email: emailOf('coach'), password: testPassword };

  it('is needed to sign in', async () => {
    const browser = club.anonymous();
    await browser.get('/api/health');
    const answer = await browser.mutateWithoutToken('post', '/api/auth/sign-in').send(credentials);
    expect(answer.status).toBe(403);
    expect(answer.body).toMatchObject({ code: 'csrf' });
  });

  it('is refused when it was made up, even when cookie and header agree', async () => {
    const answer = await club
      .anonymous()
      .mutate('post', '/api/auth/sign-in')
      .set({ Cookie: 'XSRF-TOKEN=abc.def', 'X-XSRF-TOKEN': 'abc.def' })
      .send(credentials);
    expect(answer.body).toMatchObject({ status: 403, code: 'csrf' });
  });

  it('is refused when it belongs to another sign-in', async () => {
    const foreign = (await club.agentFor('foreignAdmin')).cookie('XSRF-TOKEN') ?? '';
    const coach = await club.agentFor('coach');
    const answer = await coach.mutate('post', '/api/auth/sign-out').set({
      Cookie: `stillstroke=${coach.cookie('stillstroke')}; XSRF-TOKEN=${foreign}`,
      'X-XSRF-TOKEN': foreign,
    });
    expect(answer.body).toMatchObject({ status: 403, code: 'csrf' });
  });

  it('survives a cookie that is not text', async () => {
    const answer = await club.anonymous().get('/api/health').set('Cookie', 'XSRF-TOKEN=j:{"split":1}');
    expect(answer.status).toBe(200);
  });

  it('works for the next try after a refusal', async () => {
    const browser = club.anonymous();
    await browser.mutate('post', '/api/auth/sign-in').send(credentials).expect(403);
    await browser.mutate('post', '/api/auth/sign-in').send(credentials).expect(200);
  });
});

describe('limits of attempts', () => {
  const guess = async (count: number, email: string, from: string) => {
    const browser = club.anonymous();
    await browser.get('/api/auth/page');
    let last = 0;
    for (let i = 0; i < count; i += 1) {
      const answer = await browser
        .mutate('post', '/api/auth/sign-in')
        .set('X-Forwarded-For', from)
        .send({ email, password: `guess ${i}` });
      last = answer.status;
    }
    return last;
  };

  it('shut an account from one address for a while, say how long, and open by the clock', async () => {
    const { attempts } = attemptLimits.accountFromAddress;
    expect(await guess(attempts, emailOf('coach'), '')).toBe(401);
    const browser = club.anonymous();
    const refused = await browser.signIn(emailOf('coach'), testPassword);
    expect(refused.status).toBe(429);
    expect(refused.body).toMatchObject({ code: 'too-many-attempts' });
    expect(Number(refused.get('Retry-After'))).toBeGreaterThan(800);
    expect((await browser.signIn(emailOf('admin'), testPassword)).status).toBe(200);
    club.setNow(minutesLater(16));
    expect((await club.anonymous().signIn(emailOf('coach'), testPassword)).status).toBe(200);
  });

  it('leave the owner in: from another address, and from a known browser under attack from everywhere', async () => {
    club.close();
    club = await openTestClub({ settings: { behindTls: true } });
    const email = emailOf('coach');
    const send = async (from: string, cookie: string, password: string) => {
      const headers = { 'X-Forwarded-For': from, 'X-Forwarded-Proto': 'https' };
      const page = await club.anonymous().get('/api/auth/page').set(headers);
      const csrf = /XSRF-TOKEN=([^;]+)/.exec(page.get('Set-Cookie')?.join() ?? '')?.[1] ?? '';
      return club
        .anonymous()
        .mutate('post', '/api/auth/sign-in')
        .set({ ...headers, Cookie: `XSRF-TOKEN=${csrf}; ${cookie}`, 'X-XSRF-TOKEN': csrf })
        .send({ email, password });
    };
    const first = await send('203.0.113.9', '', testPassword);
    const known = /stillstroke-known=[^;]+/.exec(first.get('Set-Cookie')?.join() ?? '')?.[0] ?? '';
    expect(known).not.toBe('');

    for (let i = 0; i < attemptLimits.accountFromAddress.attempts + 1; i += 1) {
      await send('198.51.100.1', '', 'guess');
    }
    expect((await send('198.51.100.1', '', testPassword)).status).toBe(429);
    expect((await send('203.0.113.9', '', testPassword)).status).toBe(200);

    for (let i = 0; i < attemptLimits.account.attempts; i += 1) {
      await send(`198.51.100.${20 + i}`, '', 'guess');
    }
    expect((await send('203.0.113.77', '', testPassword)).status).toBe(429);
    expect((await send('203.0.113.9', known, testPassword)).status).toBe(200);
    expect((await send('203.0.113.77', known.slice(0, -4), testPassword)).status).toBe(429);
  });

  it('stop one address that tries many accounts', async () => {
    for (let i = 0; i < attemptLimits.address.attempts; i += 1) {
      await guess(1, `nobody${i}@tarnvalley.example`, '');
    }
    expect(await guess(1, 'nobody@tarnvalley.example', '')).toBe(429);
  });
});

describe('the sign-in page', () => {
  it('offers no accounts where there is no demo', async () => {
    expect((await club.anonymous().get('/api/auth/page')).body).toEqual({ demo: null });
  });

  it('offers the demo accounts that exist, and none with the demo off', async () => {
    const { db } = club.context;
    db.update(users)
      .set({ email: 'coach@tarnvalley.example', name: 'Mara Holt' })
      .where(eq(users.id, club.ids.users.coach))
      .run();
    const page = await club.anonymous().get('/api/auth/page');
    expect(page.body).toMatchObject({
      demo: { password: DEMO_PASSWORD, accounts: [{ name: 'Mara Holt', role: 'coach' }] },
    });
    club.close();
    club = await openTestClub({ settings: { demo: false } });
    expect((await club.anonymous().get('/api/auth/page')).body).toEqual({ demo: null });
  });
});
