import { mailKindSchema, type MailKind } from '@stillstroke/contract/mail';
import { mails } from '@stillstroke/db/schema/mail';
import { users } from '@stillstroke/db/schema/club';
import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { openTestClub, type TestClub } from '../platform/test-club';
import { tokenHash } from '../invitations/issue';
import { invitations } from '@stillstroke/db/schema/sign-in';
import { invitePerson } from '../people/people.service';
import { activeUser } from '../auth/accounts';
import { grantPasswordWishes, wishForPassword } from '../password-reset/password-reset.service';
import { queueMail } from './queue-mail';
import { subjects } from './templates';
import { writeLetter } from './write-letter';

const nasty = 'Ida <img src=x onerror=alert(1)> "&\' Frost';
let club: TestClub;
beforeEach(async () => {
  club = await openTestClub();
});
afterEach(() => club.close());

/** One mail of every kind in the queue, with names that are easy to find and hard to print. */
function queueEveryKind(): void {
  const { context, ids } = club;
  const { db } = context;
  const now = context.now();
  const to = ids.users.athlete;
  db.update(users).set({ name: nasty }).where(eq(users.id, to)).run();
  const page = '/reviews/r1?part=2#f3';
  db.transaction((tx) => {
    queueMail(tx, { kind: 'review-sent', to, data: { page, from: nasty }, now });
    queueMail(tx, { kind: 'question', to, data: { page, from: nasty }, now });
    queueMail(tx, { kind: 'answer', to, data: { page, from: nasty }, now });
    const promise = { page, promised: '2026-12-03', forWhom: nasty };
    queueMail(tx, { kind: 'promise-reminder', to, data: promise, now });
  });
  wishForPassword(context, 'athlete@tarn.example');
  grantPasswordWishes(context);
  const admin = activeUser(db, ids.users.admin);
  if (!admin) throw new Error('no admin');
  invitePerson(context, admin, { name: nasty, email: 'ida@tarn.example', role: 'coach', squadIds: [] });
}

const letters = () =>
  club.context.db
    .select()
    .from(mails)
    .all()
    .map((mail) => ({ kind: mail.kind, ...writeLetter(club.context, mail) }));

describe('every kind of mail', () => {
  it('has a subject that names nobody and tells nothing of what it is about', () => {
    queueEveryKind();
    const written = letters();
    expect(new Set(written.map(({ kind }) => kind))).toEqual(new Set(mailKindSchema.options));
    for (const { kind, subject } of written) {
      expect(subject, kind).toBe(subjects[kind]);
      expect(subject, kind).not.toMatch(/Ida|Frost|Tarn|@|\d/);
    }
  });

  it('says the same as text and as HTML, in which names are text', () => {
    queueEveryKind();
    for (const { kind, text, html } of letters()) {
      expect(text, kind).toContain(`Hello ${nasty},`);
      expect(html, kind).not.toContain('<img');
      expect(html, kind).toContain('Ida &lt;img src=x onerror=alert(1)&gt; &quot;&amp;&#39; Frost');
      const link = /https?:\/\/\S+/.exec(text)?.[0] ?? '';
      expect(html, kind).toContain(`href="${link.replaceAll('&', '&amp;')}"`);
    }
  });

  it('says why it came and where to switch it off, unless it is about the account', () => {
    queueEveryKind();
    const account: MailKind[] = ['invitation', 'password-reset'];
    for (const { kind, text } of letters()) {
      expect(text, kind).toContain('You get this because');
      const words = account.includes(kind) ? 'cannot be switched off' : 'off: http://localhost:4300/mail';
      expect(text, kind).toContain(words);
    }
  });
});

describe('links in mails', () => {
  it('begin with the address in the settings, whatever host a request names', async () => {
    const browser = club.anonymous();
    await browser.get('/api/auth/page');
    await browser
      .mutate('post', '/api/auth/password-wish')
      .set({ Host: 'evil.example', 'X-Forwarded-Host': 'evil.example' })
      .send({ email: 'athlete@tarn.example' });
    grantPasswordWishes(club.context);
    const [letter] = letters();
    expect(letter?.text).toContain('http://localhost:4300/new-password/');
    expect(letter?.text).not.toContain('evil');
  });

  it('are nowhere in the database', () => {
    queueEveryKind();
    const { context } = club;
    const tokens = letters().flatMap(
      ({ text }) => /\/(?:invitation|new-password)\/(\S+)/.exec(text)?.[1] ?? [],
    );
    expect(tokens).toHaveLength(2);
    const dump = context.sqlite.serialize().toString('latin1');
    for (const token of tokens) {
      expect(dump.includes(token)).toBe(false);
      expect(dump.includes(tokenHash(token))).toBe(true);
    }
    expect(context.db.select().from(invitations).all()).toHaveLength(1);
  });

  it('lead to pages of ours alone', () => {
    const { context, ids } = club;
    const to = ids.users.athlete;
    for (const page of [
      '//evil.example',
      'https://evil.example',
      '/\\evil.example',
      'javascript:alert(1)',
      '/a b',
    ]) {
      const queue = () =>
        queueMail(context.db, { kind: 'answer', to, data: { page, from: 'Ida' }, now: context.now() });
      expect(queue, page).toThrow();
    }
  });
});
