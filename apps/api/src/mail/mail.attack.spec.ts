import { randomUUID } from 'node:crypto';
import * as calls from '@stillstroke/contract/mail';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { attack } from '../platform/test-attack';
import { openTestClub, type TestClub } from '../platform/test-club';
import { placeGivenUpMail } from './test-mails';

const nobodyElse = { coach: 403, athlete: 403, guardian: 403, foreignCoach: 403 };

attack(calls.getMailWishes, { path: () => '/api/mail-wishes', by: 'athlete', refused: {} });
attack(calls.setMailWish, {
  path: () => '/api/mail-wishes/answer',
  by: 'athlete',
  good: () => ({ on: false }),
  refused: {},
});
attack(calls.listOutbox, { path: () => '/api/outbox', by: 'admin', refused: nobodyElse });
attack(calls.getOutboxMail, {
  path: () => `/api/outbox/${randomUUID()}`,
  by: 'admin',
  refused: { admin: 404, coach: 404, athlete: 404, guardian: 404, foreignAdmin: 404 },
});
attack(calls.retryMail, {
  path: () => `/api/outbox/${randomUUID()}/retry`,
  by: 'admin',
  refused: { ...nobodyElse, admin: 404, foreignAdmin: 404 },
});

describe('walls around mails', () => {
  let club: TestClub;
  let mailId: string;
  beforeAll(async () => {
    club = await openTestClub();
    mailId = placeGivenUpMail(club);
  });
  afterAll(() => club.close());

  it('keep another club’s admin from seeing or retrying one', async () => {
    const foreign = await club.agentFor('foreignAdmin');
    expect((await foreign.get(`/api/outbox/${mailId}`)).status).toBe(404);
    expect((await foreign.mutate('post', `/api/outbox/${mailId}/retry`)).status).toBe(404);
    expect((await foreign.get('/api/outbox')).body).toMatchObject({ items: [], total: 0 });
    const own = await club.agentFor('admin');
    expect((await own.get('/api/outbox')).body).toMatchObject({ total: 1 });
  });

  it('let nobody switch off those about the account', async () => {
    const athlete = await club.agentFor('athlete');
    for (const kind of calls.accountMails) {
      const answer = await athlete.mutate('put', `/api/mail-wishes/${kind}`).send({ on: false });
      expect(answer.status).toBe(404);
    }
  });
});
