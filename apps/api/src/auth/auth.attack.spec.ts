import * as calls from '@stillstroke/contract/auth';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { attack } from '../platform/test-attack';
import { emailOf, openTestClub, testPassword, type TestClub } from '../platform/test-club';

attack(calls.getMe, { path: () => '/api/auth/me', by: 'coach', refused: {} });
attack(calls.signOut, { path: () => '/api/auth/sign-out', by: 'coach', refused: {} });

describe('attacks on signing in', () => {
  let club: TestClub;
  beforeAll(async () => {
    club = await openTestClub();
  });
  afterAll(() => club.close());

  const good = { email: emailOf('coach'), password: testPassword };
  it.each([
    ['no body', {}],
    ['no password', { email: good.email }],
    ['a list as the address', { ...good, email: [good.email] }],
    ['an object as the password', { ...good, password: { $ne: '' } }],
    ['true as the password', { ...good, password: true }],
    ['an empty password', { ...good, password: '' }],
    ['a password without end', { ...good, password: 'x'.repeat(257) }],
    ['an unknown key', { ...good, role: 'admin' }],
  ])('with %s', async (_case, body) => {
    const browser = club.anonymous();
    await browser.get('/api/health');
    const answer = await browser.mutate('post', '/api/auth/sign-in').send(body);
    expect(answer.body).toMatchObject({ status: 400, code: 'bad-request' });
    expect((await browser.get('/api/auth/me')).status).toBe(401);
  });

  it.each(['x', 'x'.repeat(43), '%00'.repeat(20), '..%2f'.repeat(8)])(
    'with the invitation %s',
    async (token) => {
      const browser = club.anonymous();
      const shown = await browser.get(`/api/invitations/${token}`);
      expect(shown.status).toBe(404);
      const accepted = await browser
        .mutate('post', `/api/invitations/${token}/accept`)
        .send({ password: 'seven herons over weir' });
      expect(accepted.status).toBe(404);
    },
  );
});
