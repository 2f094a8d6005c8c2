import { readFileSync, statSync } from 'node:fs';
import { createServer } from 'node:net';
import { join } from 'node:path';
import { mails } from '@stillstroke/db/schema/mail';
import { eq } from 'drizzle-orm';
import { simpleParser } from 'mailparser';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { emailOf, openTestClub, type TestClub } from '../platform/test-club';
import { readSettings } from '../platform/settings';
import { callOffMails, queueMail } from './queue-mail';
import { sendNext, startSending } from './sender';
import { smtpDelivery } from './smtp-delivery';
import { settleMail, takeMail } from './take-mail';
import { openMailServer, placeAnswerMail, type TestMailServer } from './test-mails';

let club: TestClub;
const servers: TestMailServer[] = [];
beforeEach(async () => {
  club = await openTestClub();
});
afterEach(async () => {
  for (const server of servers.splice(0)) await server.close();
  club.close();
});

async function mailServer(...options: Parameters<typeof openMailServer>) {
  const server = await openMailServer(...options);
  servers.push(server);
  return server;
}

/** Through a server, waiting for it only this long. */
function through(url: string, answerMs = 5000, mailMs = 10_000) {
  const { server } = readSettings({ SMTP_URL: url }).mail;
  if (!server) throw new Error('no server');
  return smtpDelivery(server, { answerMs, mailMs });
}

const row = (id: string) => club.context.db.select().from(mails).where(eq(mails.id, id)).get();
const later = (minutes: number) => club.setNow(new Date(Date.now() + minutes * 60_000));
const toAthlete = () => placeAnswerMail(club, club.ids.users.athlete);

describe('a mail server that works', () => {
  it('gets text and HTML that say the same, with the headers that such mails carry', async () => {
    const server = await mailServer();
    const id = toAthlete();
    expect(await sendNext(club.context, through(server.url))).toBe('settled');
    expect(row(id)).toMatchObject({ status: 'sent', attempts: 1, lastError: null, takenBy: null });
    const [mail] = server.taken;
    expect(server.recipients).toEqual([emailOf('athlete')]);
    expect(mail?.subject).toBe('There is an answer for you');
    expect(mail?.from?.value).toEqual([{ name: 'Stillstroke', address: 'stillstroke@localhost' }]);
    expect(mail?.text).toContain('Ebba Lindqvist has answered you.');
    expect(mail?.html).toContain('Ebba Lindqvist has answered you.');
    expect(mail?.text).toContain('http://localhost:4300/reviews/r1');
    expect(mail?.messageId).toBe(row(id)?.messageId);
    expect(mail?.headers.get('auto-submitted')).toBe('auto-generated');
    expect(mail?.headerLines.find(({ key }) => key === 'list-unsubscribe')?.line).toContain(
      '<http://localhost:4300/mail>',
    );
    expect(await sendNext(club.context, through(server.url))).toBe('nothing-due');
  });

  it('gets no mail that its reader switched off, that was called off, or whose account is closed', async () => {
    const server = await mailServer();
    const { context, ids } = club;
    const athlete = await club.agentFor('athlete');
    await athlete.mutate('put', '/api/mail-wishes/answer').send({ on: false });
    const off = toAthlete();
    const on = placeAnswerMail(club, ids.users.coach);
    const now = context.now();
    const calledOff = queueMail(context.db, {
      kind: 'promise-reminder',
      to: ids.users.coach,
      data: { page: '/reviews/r1', promised: '2026-12-03', forWhom: 'Ebba Lindqvist' },
      about: 'r1',
      now,
    });
    callOffMails(context.db, { kind: 'promise-reminder', about: 'r1', now });
    const closed = placeAnswerMail(club, ids.users.guardian);
    const admin = await club.agentFor('admin');
    await admin.mutate('patch', `/api/people/${ids.users.guardian}`).send({ deactivated: true });
    while ((await sendNext(context, through(server.url))) !== 'nothing-due');
    expect(server.recipients).toEqual([emailOf('coach')]);
    expect(row(on)?.status).toBe('sent');
    for (const id of [off, calledOff, closed]) expect(row(id)?.status).toBe('withheld');
    expect(row(off)?.lastError).toBe('The reader has switched mails of this kind off.');

    await athlete.mutate('put', '/api/mail-wishes/answer').send({ on: true });
    const again = toAthlete();
    await sendNext(context, through(server.url));
    expect(row(again)?.status).toBe('sent');
  });

  it('gets an invitation with the link that the admin was shown, unless a fresh one has replaced it', async () => {
    const server = await mailServer();
    const admin = await club.agentFor('admin');
    const body = { name: 'Mara Holt', email: 'mara@tarn.example', role: 'coach' };
    const first = await admin.mutate('post', '/api/people').send(body);
    const { person } = first.body as { person: { id: string } };
    const second = await admin.mutate('post', `/api/people/${person.id}/invitation`);
    const { invitation } = second.body as { invitation: { url: string; mailed: boolean } };
    expect(invitation.mailed).toBe(false);
    while ((await sendNext(club.context, through(server.url))) !== 'nothing-due');
    expect(server.taken).toHaveLength(1);
    expect(server.taken[0]?.text).toContain(invitation.url);
    expect(server.taken[0]?.headers.has('list')).toBe(false);
  });

  it('gets a mail that is due later then, not now', async () => {
    const server = await mailServer();
    const { context, ids } = club;
    const due = new Date(Date.now() + 60 * 60_000);
    const data = { page: '/reviews/r1', from: 'Ebba Lindqvist' };
    queueMail(context.db, { kind: 'question', to: ids.users.coach, data, now: context.now(), due });
    expect(await sendNext(context, through(server.url))).toBe('nothing-due');
    later(61);
    expect(await sendNext(context, through(server.url))).toBe('settled');
    expect(server.taken).toHaveLength(1);
  });
});

describe('a mail server in trouble', () => {
  it('that is down gets the mail once it is back, after a wait that grows', async () => {
    const probe = createServer();
    await new Promise<void>((resolve) => probe.listen(0, '127.0.0.1', resolve));
    const { port } = probe.address() as { port: number };
    await new Promise((resolve) => probe.close(resolve));
    const delivery = through(`smtp://127.0.0.1:${port}`);
    const id = toAthlete();
    expect(await sendNext(club.context, delivery)).toBe('server-in-trouble');
    expect(row(id)).toMatchObject({ status: 'waiting', attempts: 1, takenBy: null });
    expect(row(id)?.lastError).toContain('cannot be reached');
    expect(await sendNext(club.context, delivery)).toBe('nothing-due');
    later(1.3);
    expect(await sendNext(club.context, delivery)).toBe('server-in-trouble');
    const first = row(id)?.messageId;
    const server = await mailServer({}, port);
    later(10);
    expect(await sendNext(club.context, delivery)).toBe('settled');
    expect(row(id)).toMatchObject({ status: 'sent', attempts: 3, messageId: first });
    expect(server.taken).toHaveLength(1);
  });

  it('that never greets is left alone after a while, and the mail waits', async () => {
    const server = await mailServer({ onConnect: () => undefined });
    const id = toAthlete();
    expect(await sendNext(club.context, through(server.url, 150))).toBe('server-in-trouble');
    expect(row(id)).toMatchObject({
      status: 'waiting',
      lastError: 'The mail server did not answer in time.',
    });
  });

  it('that drips along is left when one mail takes too long in all', async () => {
    const server = await mailServer({ onConnect: (_session, done) => void setTimeout(done, 60_000) });
    const id = toAthlete();
    expect(await sendNext(club.context, through(server.url, 30_000, 150))).toBe('server-in-trouble');
    expect(row(id)?.lastError).toBe('The mail server did not answer in time.');
  });

  it('that takes a mail and loses its answer gets it again under the same message id', async () => {
    let calls = 0;
    const seen: (string | undefined)[] = [];
    const server = await mailServer({
      onData: (stream, _session, done) => {
        calls += 1;
        const first = calls === 1;
        void simpleParser(stream).then((mail) => {
          seen.push(mail.messageId);
          if (!first) done();
        });
      },
    });
    const id = toAthlete();
    await sendNext(club.context, through(server.url, 200));
    expect(row(id)?.status).toBe('waiting');
    later(5);
    await sendNext(club.context, through(server.url));
    expect(row(id)?.status).toBe('sent');
    expect(seen).toEqual([row(id)?.messageId, row(id)?.messageId]);
  });

  it('that refuses one address gets the others; the admin reads why and can try again', async () => {
    let refuses = true;
    const server = await mailServer({
      onRcptTo: ({ address }, _session, done) => {
        const no = Object.assign(new Error('No such mailbox here'), { responseCode: 550 });
        done(refuses && address === emailOf('athlete') ? no : null);
      },
    });
    const { context, ids } = club;
    placeAnswerMail(club, ids.users.coach);
    const id = toAthlete();
    placeAnswerMail(club, ids.users.otherCoach);
    while ((await sendNext(context, through(server.url))) !== 'nothing-due');
    expect([...server.recipients].sort()).toEqual([emailOf('coach'), emailOf('otherCoach')]);
    const admin = await club.agentFor('admin');
    const list = await admin.get('/api/outbox?status=given-up');
    expect(list.body).toMatchObject({
      total: 1,
      items: [{ id, reason: 'The mail server refused the address: 550 No such mailbox here' }],
    });
    refuses = false;
    expect((await admin.mutate('post', `/api/outbox/${id}/retry`)).body).toMatchObject({ status: 'waiting' });
    expect((await admin.mutate('post', `/api/outbox/${id}/retry`)).status).toBe(409);
    await sendNext(context, through(server.url));
    expect(row(id)?.status).toBe('sent');
  });

  it('that asks to come back later gets the mail later', async () => {
    let busy = true;
    const server = await mailServer({
      onRcptTo: (_address, _session, done) =>
        done(busy ? Object.assign(new Error('Come back'), { responseCode: 451 }) : null),
    });
    const id = toAthlete();
    expect(await sendNext(club.context, through(server.url))).toBe('settled');
    expect(row(id)).toMatchObject({
      status: 'waiting',
      lastError: expect.stringContaining('try later') as string,
    });
    busy = false;
    later(5);
    await sendNext(club.context, through(server.url));
    expect(row(id)?.status).toBe('sent');
  });

  it('that rejects name and password leaves neither in the reason', async () => {
    const server = await mailServer({
      authOptional: false,
      authMethods: ['PLAIN'],
      allowInsecureAuth: true,
      onAuth: ({ password }, _session, done) => done(new Error(`not ${password ?? ''}`)),
    });
    const id = toAthlete();
    const url = server.url.replace('smtp://', 'smtp://postman:hush-hush@');
    expect(await sendNext(club.context, through(url))).toBe('server-in-trouble');
    expect(row(id)).toMatchObject({ status: 'waiting' });
    expect(row(id)?.lastError).toContain('did not accept the name and password');
    expect(JSON.stringify(row(id))).not.toMatch(/hush|postman/);
  });

  it('is given up on in the end', async () => {
    const id = toAthlete();
    const { db } = club.context;
    db.update(mails).set({ attempts: 13 }).where(eq(mails.id, id)).run();
    await sendNext(club.context, through('smtp://127.0.0.1:1'));
    expect(row(id)).toMatchObject({ status: 'given-up', attempts: 14 });
    expect(row(id)?.lastError).toContain('Tried 14 times.');
  });
});

describe('a sender', () => {
  it('that is late may no longer say how it went', async () => {
    const server = await mailServer();
    const id = toAthlete();
    const slow = takeMail(club.context);
    expect(slow?.mail.id).toBe(id);
    expect(await sendNext(club.context, through(server.url))).toBe('nothing-due');
    later(6);
    expect(await sendNext(club.context, through(server.url))).toBe('settled');
    if (slow) settleMail(club.context, slow, { how: 'refused', reason: 'Too late to say.' });
    expect(row(id)).toMatchObject({ status: 'sent', attempts: 2, lastError: null });
    expect(server.taken).toHaveLength(1);
  });

  it('finishes the mail it is sending when it is told to stop, and takes no further one', async () => {
    let arrived: () => void = () => undefined;
    const there = new Promise<void>((resolve) => (arrived = resolve));
    let answer: () => void = () => undefined;
    const server = await mailServer({
      onData: (stream, _session, done) => {
        stream.resume();
        stream.on('end', () => {
          answer = () => done();
          arrived();
        });
      },
    });
    const [first, second] = [toAthlete(), placeAnswerMail(club)];
    const stop = startSending(club.context, through(server.url), { idleMs: 10, troubleMs: 10 });
    await there;
    const stopped = stop(10_000);
    answer();
    await stopped;
    expect([row(first)?.status, row(second)?.status].sort()).toEqual(['sent', 'waiting']);
  });

  it('does not wait for ever for a server when it is told to stop', async () => {
    let arrived: () => void = () => undefined;
    const there = new Promise<void>((resolve) => (arrived = resolve));
    const server = await mailServer({ onConnect: () => arrived() });
    const id = toAthlete();
    const stop = startSending(club.context, through(server.url, 2000));
    await there;
    await stop(20);
    expect(row(id)?.status).toBe('sending');
  });

  it('writes files while there is no server: whole mails for the owner’s eyes, one each', async () => {
    const { context } = club;
    const id = toAthlete();
    const stop = startSending(context, undefined, { idleMs: 10, troubleMs: 10 });
    await vi.waitFor(() => expect(row(id)?.status).toBe('sent'));
    await stop(5000);
    const path = join(context.settings.dataFolder, 'outbox', `${id}.eml`);
    const mail = await simpleParser(readFileSync(path));
    expect(mail.text).toContain('Ebba Lindqvist has answered you.');
    expect(mail.html).toContain('Ebba Lindqvist has answered you.');
    expect(statSync(path).mode & 0o077).toBe(0);
    const admin = await club.agentFor('admin');
    const shown = await admin.get(`/api/outbox/${id}`);
    const { written } = shown.body as { written: { subject: string; text: string; file: string } };
    expect(written.file).toBe(`outbox/${id}.eml`);
    expect(written.text.trim()).toBe(mail.text?.trim());
  });
});
