import { mails, passwordResets, passwordWishes } from '@stillstroke/db/schema/mail';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { wishLimits } from '../auth/attempt-limits';
import { writeLetter } from '../mail/write-letter';
import { updatePerson } from '../people/people.service';
import { activeUser } from '../auth/accounts';
import { emailOf, openTestClub, testPassword, type TestClub } from '../platform/test-club';
import { TestBrowser } from '../platform/test-browser';
import { grantPasswordWishes } from './password-reset.service';

const fresh = 'seven herons over weir';
let club: TestClub;
let browser: TestBrowser;
beforeEach(async () => {
  club = await openTestClub();
  browser = club.anonymous();
  await browser.get('/api/auth/page');
});
afterEach(() => club.close());

const ask = (email: string) => browser.mutate('post', '/api/auth/password-wish').send({ email });
const set = (token: string, password: string) =>
  browser.mutate('post', `/api/password-resets/${token}`).send({ password });

/** Asks for a new password and reads the link from the mail. */
async function tokenFor(email: string): Promise<string> {
  await ask(email);
  grantPasswordWishes(club.context);
  const mail = club.context.db.select().from(mails).all().at(-1);
  if (!mail) throw new Error('no mail');
  return /new-password\/(\S+)/.exec(writeLetter(club.context, mail).text)?.[1] ?? '';
}

describe('asking for a new password', () => {
  it('answers the same for an account, for none and for a deactivated one, and writes the same', async () => {
    const { context, ids } = club;
    const admin = activeUser(context.db, ids.users.admin);
    if (!admin) throw new Error('no admin');
    updatePerson(context, admin, ids.users.guardian, { deactivated: true });
    const answers = [];
    for (const email of [emailOf('coach'), 'nobody@tarn.example', emailOf('guardian')]) {
      const before = context.sqlite.prepare('select total_changes() as n').get() as { n: number };
      const { status, text, headers } = await ask(email);
      const after = context.sqlite.prepare('select total_changes() as n').get() as { n: number };
      const {
        date: _date,
        'set-cookie': _cookie,
        'content-security-policy': _policy,
        ...rest
      } = headers as Record<string, unknown>;
      answers.push({ status, text, rest, written: after.n - before.n });
    }
    expect(answers[0]?.status).toBe(204);
    expect(answers[1]).toEqual(answers[0]);
    expect(answers[2]).toEqual(answers[0]);
    grantPasswordWishes(context);
    expect(context.db.select().from(mails).all()).toMatchObject([
      { address: emailOf('coach'), kind: 'password-reset' },
    ]);
    expect(context.db.select().from(passwordWishes).all()).toEqual([]);
  });

  it('is limited by account and address, for accounts that are none too', async () => {
    for (const email of [emailOf('coach'), 'nobody@tarn.example']) {
      const { attempts } = wishLimits.accountFromAddress;
      for (let n = 0; n < attempts; n++) expect((await ask(email)).status).toBe(204);
      const refused = await ask(email.toUpperCase());
      expect(refused.status).toBe(429);
      expect(refused.body).toMatchObject({ code: 'too-many-attempts' });
    }
    expect((await ask(emailOf('athlete'))).status).toBe(204);
  });

  it('takes nothing but an address, and no change without the token', async () => {
    for (const body of [{}, { email: 7 }, { email: 'x' }, { email: emailOf('coach'), more: 1 }]) {
      expect((await browser.mutate('post', '/api/auth/password-wish').send(body)).status).toBe(400);
    }
    const forged = await browser
      .mutateWithoutToken('post', '/api/auth/password-wish')
      .send({ email: emailOf('coach') });
    expect(forged.status).toBe(403);
    expect(club.context.db.select().from(passwordWishes).all()).toEqual([]);
  });
});

describe('setting the new password', () => {
  it('works once, signs in here and ends every other sign-in of that person alone', async () => {
    const elsewhere = await club.agentFor('coach');
    const other = await club.agentFor('athlete');
    const token = await tokenFor(emailOf('coach'));
    expect((await browser.get(`/api/password-resets/${token}`)).body).toEqual({
      name: 'The coach',
      email: emailOf('coach'),
    });
    const answer = await set(token, fresh);
    expect(answer.status).toBe(200);
    expect((await browser.get('/api/auth/me')).body).toMatchObject({ user: { email: emailOf('coach') } });
    expect((await elsewhere.get('/api/auth/me')).status).toBe(401);
    expect((await other.get('/api/auth/me')).status).toBe(200);

    expect((await set(token, 'gravel kettle seven oars')).body).toMatchObject({
      code: 'password-link-spent',
    });
    expect((await browser.get(`/api/password-resets/${token}`)).status).toBe(404);
    expect((await new TestBrowser(club.app).signIn(emailOf('coach'), testPassword)).status).toBe(401);
    expect((await new TestBrowser(club.app).signIn(emailOf('coach'), fresh)).status).toBe(200);
  });

  it('works for one of two who use the link at once', async () => {
    const token = await tokenFor(emailOf('coach'));
    const both = await Promise.all([set(token, fresh), set(token, 'gravel kettle seven oars')]);
    expect(both.map(({ status }) => status).sort()).toEqual([200, 404]);
  });

  it('refuses a short and a common one, and leaves the link usable', async () => {
    const token = await tokenFor(emailOf('coach'));
    expect((await set(token, 'elevenchars')).status).toBe(400);
    expect((await set(token, 'password1234')).body).toMatchObject({ code: 'weak-password' });
    expect((await set(token, fresh)).status).toBe(200);
  });

  it('knows no link that ran out, was replaced, belongs to a deactivated account or was never given', async () => {
    const first = await tokenFor(emailOf('coach'));
    const second = await tokenFor(emailOf('coach'));
    expect((await set(first, fresh)).status).toBe(404);
    club.setNow(new Date(Date.now() + 61 * 60_000));
    expect((await set(second, fresh)).status).toBe(404);
    const third = await tokenFor(emailOf('coach'));
    const { context, ids } = club;
    const admin = activeUser(context.db, ids.users.admin);
    if (!admin) throw new Error('no admin');
    updatePerson(context, admin, ids.users.coach, { deactivated: true });
    updatePerson(context, admin, ids.users.coach, { deactivated: false });
    expect((await set(third, fresh)).status).toBe(404);
    for (const token of ['x'.repeat(43), '1', '..%2f', "'or'1'='1"]) {
      expect((await set(token, fresh)).status, token).toBe(404);
    }
    expect(
      context.db
        .select()
        .from(passwordResets)
        .all()
        .every(({ usedAt }) => usedAt !== null),
    ).toBe(true);
  });
});
