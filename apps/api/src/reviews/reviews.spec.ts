import { randomUUID } from 'node:crypto';
import type { ReadingSource } from '@stillstroke/contract/review-readings';
import type { Finding, Question, Review, ReviewList } from '@stillstroke/contract/reviews';
import { mails } from '@stillstroke/db/schema/mail';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { purgeDeleted } from '../media/purge';
import { placeClip, placeSession } from '../media/test-films';
import { coachOf, enterStroke, STROKE_FRAMES } from '../measures/test-strokes';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

let club: TestClub;
let coach: TestBrowser;
let athlete: TestBrowser;
let sessionId: string;
let clipId: string;
beforeEach(async () => {
  club = await openTestClub();
  coach = await club.agentFor('coach');
  athlete = await club.agentFor('athlete');
  sessionId = placeSession(club.context, club.ids.athletes.own);
  clipId = film(sessionId);
});
afterEach(() => club.close());

const film = (session: string) =>
  placeClip(club.context, club.ids.athletes.own, session, { frameCount: 800 }).id;
const enter = (clip: string, verticalAt: number[]) =>
  verticalAt.map((share, n) =>
    enterStroke(club.context, coachOf(club.ids), clip, {
      arm: 'right',
      entry: n * STROKE_FRAMES,
      verticalAt: share,
      breath: n === 0,
    }),
  );
const listPath = () => `/api/athletes/${club.ids.athletes.own}/reviews`;
const begin = async (session = sessionId) =>
  (await coach.mutate('post', listPath()).send({ sessionId: session })).body as Review;
const add = async (reviewId: string, fields: object = {}) =>
  (await coach.mutate('post', `/api/reviews/${reviewId}/findings`).send(fields)).body as Finding;
const get = async (reviewId: string, browser = coach) =>
  (await browser.get(`/api/reviews/${reviewId}`)).body as Review;
const change = (findingId: string, body: object, browser = coach) =>
  browser.mutate('patch', `/api/findings/${findingId}`).send(body);
const patch = (reviewId: string, body: object, browser = coach) =>
  browser.mutate('patch', `/api/reviews/${reviewId}`).send(body);
async function send(reviewId: string, browser = coach) {
  const { version, findings } = await get(reviewId);
  const seen = findings.map(({ id, version }) => ({ id, version }));
  return browser.mutate('post', `/api/reviews/${reviewId}/send`).send({ version, findings: seen });
}
/** A draft with one finding, the main focus, resting on the right arm's vertical at. */
async function ready(session = sessionId, words = 'The right forearm comes to vertical late.') {
  const { id } = await begin(session);
  const source = { kind: 'session', sessionId: session, arm: 'right', measure: 'verticalAt', split: 'all' };
  const finding = await add(id, { words, arm: 'right', phase: 'pull', readings: [source] });
  await patch(id, { version: 2, mainFocus: finding.id });
  return { id, finding };
}

describe('a draft', () => {
  it('is begun once under one id, for a session of that athlete', async () => {
    const id = randomUUID();
    const create = (body: object) => coach.mutate('post', listPath()).send(body);
    const first = await create({ id, sessionId });
    expect(first.status).toBe(201);
    expect(first.body).toMatchObject({
      id,
      state: 'draft',
      findings: [],
      version: 1,
      sessionDate: '2026-03-02',
    });
    expect((await create({ id, sessionId })).body).toEqual(first.body);
    const elsewhere = placeSession(club.context, club.ids.athletes.other);
    expect((await create({ id, sessionId: elsewhere })).status).toBe(400);
    const foreign = placeSession(club.context, club.ids.athletes.foreign);
    expect((await create({ sessionId: foreign })).text).toContain('no such session');
  });

  it('tells findings in the order it is given, with one main focus at most', async () => {
    const { id } = await begin();
    const ids = [await add(id), await add(id, { kind: 'good' }), await add(id)].map((finding) => finding.id);
    const order = [ids[2], ids[0], ids[1]];
    const changed = await patch(id, { version: 4, order, mainFocus: ids[1] });
    expect(changed.body).toMatchObject({ version: 5 });
    const { findings } = await get(id);
    expect(findings.map((finding) => finding.id)).toEqual(order);
    expect(findings.map(({ mainFocus }) => mainFocus)).toEqual([false, false, true]);
    await patch(id, { version: 5, mainFocus: ids[0] });
    expect((await get(id)).findings.map(({ mainFocus }) => mainFocus)).toEqual([false, true, false]);
    for (const wrong of [
      [ids[0], ids[1]],
      [ids[0], ids[0], ids[1]],
      [...ids, randomUUID()],
    ])
      expect((await patch(id, { version: 6, order: wrong })).status).toBe(400);
  });

  it('is nothing that its athlete knows of', async () => {
    const { id, finding } = await ready();
    expect((await athlete.get(`/api/reviews/${id}`)).status).toBe(404);
    expect((await athlete.get(listPath())).body).toMatchObject({ items: [], total: 0, unread: 0 });
    const ask = athlete.mutate('post', `/api/findings/${finding.id}/questions`).send({ words: 'Why?' });
    expect((await ask).status).toBe(404);
  });

  it('is thrown away by its newest version only', async () => {
    const { id } = await ready();
    expect((await coach.mutate('delete', `/api/reviews/${id}?version=1`)).status).toBe(409);
    expect((await coach.mutate('delete', `/api/reviews/${id}?version=3`)).status).toBe(204);
    expect((await coach.get(`/api/reviews/${id}`)).status).toBe(404);
  });

  it('keeps words as they are typed: text, never markup', async () => {
    const { finding } = await ready();
    const words = '<img src=x onerror=alert(1)> & “quotes”\n\nnew line ';
    expect((await change(finding.id, { version: 1, words })).body).toMatchObject({ words, version: 2 });
  });
});

describe('two people in one draft', () => {
  it('do not overwrite each other unseen', async () => {
    const { finding } = await ready();
    const admin = await club.agentFor('admin');
    const theirs = await change(finding.id, { version: 1, words: 'Later on the right.' }, admin);
    expect(theirs.body).toMatchObject({ version: 2, updatedBy: 'The admin' });
    const mine = await change(finding.id, { version: 1, words: 'Late.' });
    expect(mine.body).toMatchObject({
      status: 409,
      code: 'changed-meanwhile',
      current: { words: 'Later on the right.', version: 2, updatedBy: 'The admin' },
    });
    // Sent again because its answer was lost: it is there already, and counts once.
    const again = await change(finding.id, { version: 1, words: 'Later on the right.' }, admin);
    expect([again.status, (again.body as Finding).version]).toEqual([200, 2]);
  });

  it('do not send what they have not seen', async () => {
    const { id, finding } = await ready();
    const admin = await club.agentFor('admin');
    const { version } = await get(id);
    await change(finding.id, { version: 1, words: 'Something else.' }, admin);
    const body = { version, findings: [{ id: finding.id, version: 1 }] };
    const sent = await coach.mutate('post', `/api/reviews/${id}/send`).send(body);
    expect(sent.body).toMatchObject({ code: 'changed-meanwhile', current: { state: 'draft' } });
    const added = await add(id);
    expect((await coach.mutate('post', `/api/reviews/${id}/send`).send(body)).status).toBe(409);
    await coach.mutate('delete', `/api/findings/${added.id}?version=1`);
    expect((await send(id)).status).toBe(200);
  });

  it('change and take away only what they have seen', async () => {
    const { id, finding } = await ready();
    await change(finding.id, { version: 1, kind: 'good' });
    expect((await coach.mutate('delete', `/api/findings/${finding.id}?version=1`)).status).toBe(409);
    expect((await patch(id, { version: 2, order: [finding.id] })).status).toBe(409);
    expect((await coach.mutate('delete', `/api/findings/${finding.id}?version=2`)).status).toBe(204);
  });
});

describe('sending', () => {
  it('says everything that is missing', async () => {
    const { id } = await begin();
    const words = async () => ((await send(id)).body as { detail: string }).detail;
    expect(await words()).toBe('Write at least one finding.');
    await add(id, { words: 'A long reach.' });
    const empty = await add(id, { words: '  ' });
    expect(await words()).toBe('Finding 2 has no words yet. Choose the one finding that is the main focus.');
    await change(empty.id, { version: 1, words: 'Rolls well.' });
    expect(await words()).toBe('Choose the one finding that is the main focus.');
    await patch(id, { version: 3, mainFocus: empty.id });
    expect((await send(id)).body).toMatchObject({ state: 'sent', readAt: null });
  });

  it('freezes what the review rests on: marks, strokes and films may go', async () => {
    const strokes = enter(clipId, [0.5, 0.6, 0.7]);
    const { id, finding } = await ready();
    const more: ReadingSource[] = [
      { kind: 'session', sessionId, arm: 'right', measure: 'verticalAt', split: 'not-breathing' },
      { kind: 'stroke', clipId, strokeId: strokes[0] ?? '', measure: 'peakDrop' },
      { kind: 'frame', clipId, arm: 'right', frame: 20, angle: 'forearmDeg' },
    ];
    await change(finding.id, { version: 1, readings: more });
    const live = (await get(id)).findings[0]?.readings ?? [];
    expect(live[0]?.stand).toMatchObject({
      words: 'Vertical at, right arm, mean of 2 strokes without a breath',
      unit: 'share',
      date: '2026-03-02',
    });
    expect(live[0]?.stand.value).toBeCloseTo(0.65, 6);
    expect(live[1]?.stand).toMatchObject({ unit: 'deg', arm: 'right', clipId });
    expect(live[2]?.stand).toMatchObject({ words: 'Forearm, right arm, frame 20', frame: 20 });
    expect(live[2]?.stand.value).toBeCloseTo(75, 6);
    expect(live[2]?.stand.uncertainty).toBeGreaterThan(0.1);
    await send(id);
    const sent = await get(id);
    expect(sent.findings[0]?.readings).toEqual(live);

    const mark = await coach
      .mutate('put', `/api/clips/${clipId}/marks/right/20`)
      .send({ shoulder: { x: 900, y: 300 }, elbow: { x: 905, y: 500 }, wrist: { x: 910, y: 690 } });
    expect(mark.status).toBe(200);
    await coach.mutate('patch', `/api/clips/${clipId}`).send({ travel: 'left' });
    expect(await get(id)).toEqual(sent);
    await coach.mutate('delete', `/api/strokes/${strokes[0] ?? ''}`);
    await coach.mutate('delete', `/api/clips/${clipId}`);
    club.setNow(new Date(Date.now() + 48 * 3_600_000));
    expect(await purgeDeleted(club.context)).toEqual([clipId]);
    coach = await club.agentFor('coach');
    expect((await get(id)).findings).toEqual(sent.findings);
  });

  it('copies the words of the target, the arm’s own before one for both', async () => {
    const setTarget = async (arm: string, high: number, words: string) => {
      const body = { measure: 'verticalAt', arm, low: null, high, words };
      const answer = await coach.mutate('post', `/api/athletes/${club.ids.athletes.own}/targets`).send(body);
      expect(answer.status, answer.text).toBe(201);
      return answer.body as { id: string; version: number };
    };
    const { id } = await ready();
    const target = async () => (await get(id)).findings[0]?.readings[0]?.stand.target;
    expect(await target()).toBeNull();
    await setTarget('both', 0.5, 'By the middle');
    expect(await target()).toBe('By the middle (up to 50 %)');
    const own = await setTarget('right', 0.335, 'Early on the right');
    expect(await target()).toBe('Early on the right (up to 33.5 %)');
    await send(id);
    const changed = await coach
      .mutate('patch', `/api/targets/${own.id}`)
      .send({ version: own.version, high: 0.9, words: 'Later is fine' });
    expect(changed.status, changed.text).toBe(200);
    await coach.mutate('delete', `/api/targets/${own.id}?version=${own.version + 1}`);
    expect(await target()).toBe('Early on the right (up to 33.5 %)');
  });

  it('does not freeze before: a draft follows the marks, and says what is gone', async () => {
    enter(clipId, [0.5]);
    const { id, finding } = await ready();
    const stand = async () => (await get(id)).findings[0]?.readings[0]?.stand;
    expect((await stand())?.value).toBeCloseTo(0.5, 6);
    enterStroke(club.context, coachOf(club.ids), clipId, { arm: 'right', entry: 80, verticalAt: 0.7 });
    expect((await stand())?.value).toBeCloseTo(0.6, 6);
    await coach.mutate('delete', `/api/sessions/${sessionId}`);
    expect(await stand()).toMatchObject({ value: null, reason: 'gone' });
    // What has gone may stay in the list while something else is changed.
    const source = (await get(id)).findings[0]?.readings[0]?.source;
    const kept = await change(finding.id, { version: 1, readings: [source], words: 'Gone.' });
    expect(kept.status).toBe(200);
  });

  it('leaves nothing to change: 409 in words, for everybody', async () => {
    const { id, finding } = await ready();
    await send(id);
    const before = await get(id);
    const tries = [
      change(finding.id, { version: finding.version, words: 'x' }),
      patch(id, { version: before.version, mainFocus: null }),
      coach.mutate('delete', `/api/reviews/${id}?version=${before.version}`),
      coach.mutate('delete', `/api/findings/${finding.id}?version=${finding.version}`),
      coach.mutate('post', `/api/reviews/${id}/findings`).send({ words: 'One more.' }),
    ];
    for (const tried of tries) expect((await tried).body).toMatchObject({ status: 409, code: 'review-sent' });
    expect((await send(id)).body).toMatchObject({ code: 'review-sent' });
    expect(await get(id)).toEqual(before);
  });

  it('keeps an observation by the name it had', async () => {
    const { items } = (await coach.get('/api/observations')).body as {
      items: { id: string; name: string }[];
    };
    const roll = items.find(({ name }) => name === 'Body roll');
    const { id, finding } = await ready();
    await change(finding.id, { version: 1, observationId: roll?.id });
    await send(id);
    await coach.mutate('patch', `/api/observations/${roll?.id ?? ''}`).send({ version: 1, name: 'Rotation' });
    expect((await get(id)).findings[0]?.observation?.name).toBe('Body roll');
  });

  it('takes readings of this athlete’s films only', async () => {
    const { finding } = await ready();
    const other = placeSession(club.context, club.ids.athletes.other);
    const theirs = placeClip(club.context, club.ids.athletes.other, other).id;
    for (const source of [
      { kind: 'session', sessionId: other, arm: 'left', measure: 'pull', split: 'all' },
      { kind: 'frame', clipId: theirs, arm: 'left', frame: 1, angle: 'elbowDeg' },
      { kind: 'stroke', clipId: theirs, strokeId: randomUUID(), measure: 'pull' },
    ])
      expect((await change(finding.id, { version: 1, readings: [source] })).status).toBe(400);
  });
});

describe('then and now', () => {
  it('sets a mean against the same one of the review sent before', async () => {
    enter(clipId, [0.7, 0.71, 0.69, 0.7]);
    const first = await ready();
    await send(first.id);
    const later = placeSession(club.context, club.ids.athletes.own, '2026-04-06');
    enter(film(later), [0.45, 0.46, 0.44, 0.45]);
    const second = await ready(later, 'Much earlier now.');
    const stand = async () => (await get(second.id)).findings[0]?.readings[0]?.stand;
    expect((await stand())?.earlier).toMatchObject({
      reviewId: first.id,
      date: '2026-03-02',
      verdict: 'changed',
    });
    expect((await stand())?.earlier?.change).toBeCloseTo(-0.25, 6);
    await send(second.id);
    await coach.mutate('delete', `/api/sessions/${sessionId}`);
    expect((await stand())?.earlier?.value).toBeCloseTo(0.7, 6);
    // The first knows nothing of what came later.
    expect((await get(first.id)).findings[0]?.readings[0]?.stand.earlier).toBeNull();
  });
});

describe('reading', () => {
  it('is noted once, by the athlete, and answers are unread until opened', async () => {
    const { id, finding } = await ready();
    await send(id);
    const list = async (browser: TestBrowser) => (await browser.get(listPath())).body as ReviewList;
    expect(await list(athlete)).toMatchObject({ unread: 1, items: [{ unread: true, findingCount: 1 }] });
    club.setNow(new Date('2026-05-01T06:00:00Z'));
    athlete = await club.agentFor('athlete');
    const read = () => athlete.mutate('post', `/api/reviews/${id}/read`);
    expect((await read()).body).toMatchObject({ readAt: '2026-05-01T06:00:00.000Z' });
    club.setNow(new Date('2026-05-02T06:00:00Z'));
    expect((await read()).body).toMatchObject({ readAt: '2026-05-01T06:00:00.000Z' });
    expect(await list(athlete)).toMatchObject({ unread: 0 });

    const sent = { id: randomUUID(), words: '<i>Is</i> it the elbow?' };
    const ask = () => athlete.mutate('post', `/api/findings/${finding.id}/questions`).send(sent);
    const question = (await ask()).body as Question;
    expect((await ask()).body).toEqual(question);
    expect((await list(coach)).items[0]).toMatchObject({ openQuestions: 1 });
    const answer = await coach
      .mutate('post', `/api/questions/${question.id}/answers`)
      .send({ words: 'Yes: keep it in front of the hand.' });
    expect(answer.body).toMatchObject({ id: question.id, answers: [{ readAt: null }] });
    expect(await list(athlete)).toMatchObject({ unread: 1, items: [{ unread: true, openQuestions: 0 }] });
    await read();
    expect(await list(athlete)).toMatchObject({ unread: 0 });
    expect((await get(id)).findings[0]?.questions[0]).toMatchObject({
      words: '<i>Is</i> it the elbow?',
      answers: [{ authorName: 'The coach', readAt: '2026-05-02T06:00:00.000Z' }],
    });
    // Answers hang on questions, not on each other.
    const onAnswer = (answer.body as Question).answers[0]?.id ?? '';
    const nested = coach.mutate('post', `/api/questions/${onAnswer}/answers`).send({ words: 'x' });
    expect((await nested).status).toBe(404);
  });

  it('queues a mail with each step: to the athlete, to the coach, to who asked, and none twice', async () => {
    const queued = () =>
      club.context.db
        .select({ kind: mails.kind, personId: mails.personId, data: mails.data })
        .from(mails)
        .all();
    const { id, finding } = await ready();
    expect(queued()).toEqual([]);
    await send(id);
    const sent = { id: randomUUID(), words: 'Is it the elbow?' };
    for (let times = 0; times < 2; times += 1)
      await athlete.mutate('post', `/api/findings/${finding.id}/questions`).send(sent);
    await coach.mutate('post', `/api/questions/${sent.id}/answers`).send({ words: 'Yes.' });
    const { users } = club.ids;
    const page = `/reviews/${id}`;
    expect(queued()).toEqual([
      { kind: 'review-sent', personId: users.athlete, data: { page, from: 'The coach' } },
      { kind: 'question', personId: users.coach, data: { page, from: 'The athlete' } },
      { kind: 'answer', personId: users.athlete, data: { page, from: 'The coach' } },
    ]);
  });

  it('lists reviews newest first, page by page, and of one session', async () => {
    const made: string[] = [];
    for (const day of [1, 2, 3]) {
      club.setNow(new Date(`2026-03-0${day}T06:00:00Z`));
      made.unshift((await begin()).id);
    }
    const first = (await coach.get(`${listPath()}?limit=2`)).body as ReviewList;
    expect(first.items.map(({ id }) => id)).toEqual(made.slice(0, 2));
    const second = (await coach.get(`${listPath()}?limit=2&cursor=${first.nextCursor ?? ''}`))
      .body as ReviewList;
    expect(second).toMatchObject({ items: [{ id: made[2] }], nextCursor: null, total: 3 });
    const other = placeSession(club.context, club.ids.athletes.own);
    expect((await coach.get(`${listPath()}?sessionId=${other}`)).body).toMatchObject({ total: 0 });
    expect((await coach.get(`${listPath()}?cursor=nonsense`)).status).toBe(400);
  });
});
