import { randomUUID } from 'node:crypto';
import type { ExportFile } from '@stillstroke/contract/export';
import { IMPORT_BYTES, type ImportPreview } from '@stillstroke/contract/import';
import type { Problem } from '@stillstroke/contract/problem';
import { strokes } from '@stillstroke/db/schema/film';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { coachOf, enterStroke } from '../measures/test-strokes';
import { tryAsEverybody } from '../media/attack';
import { placeClip, placeSession } from '../media/test-films';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';

describe('attacks on exports and imports', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let sessionId: string;
  let clipId: string;
  let file: ExportFile;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    sessionId = placeSession(club.context, club.ids.athletes.own);
    clipId = placeClip(club.context, club.ids.athletes.own, sessionId).id;
    enterStroke(club.context, coachOf(club.ids), clipId, { arm: 'left', entry: 10, verticalAt: 0.5 });
    file = (await coach.get(`/api/sessions/${sessionId}/export`)).body as ExportFile;
  });
  afterEach(() => club.close());

  const to = (what = '/preview', id = sessionId) => `/api/sessions/${id}/import${what}`;
  const send = (body: string | object, path = to()) => coach.mutate('post', path).type('json').send(body);

  it('reach nobody outside the squad and the club', async () => {
    const seen = { admin: 200, coach: 200, athlete: 200 };
    for (const path of [
      `/api/clips/${clipId}/export`,
      `/api/sessions/${sessionId}/export?format=csv`,
      `/api/athletes/${club.ids.athletes.own}/export`,
    ])
      await tryAsEverybody(club, { method: 'get', path, answers: seen });
    const mayNot = { athlete: 403, otherAthlete: 403, guardian: 403, foreignAthlete: 403 };
    await tryAsEverybody(club, {
      method: 'post',
      path: to(),
      body: { file },
      answers: { ...mayNot, admin: 200, coach: 200 },
    });
    const { basis } = (await send({ file })).body as ImportPreview;
    await tryAsEverybody(club, {
      method: 'post',
      path: to(''),
      body: { file, choice: 'add', basis },
      answers: { ...mayNot, admin: 200, coach: 200 },
    });
  });

  it('put nothing onto clips of others, whatever ids the file or the choice names', async () => {
    const theirs = placeSession(club.context, club.ids.athletes.foreign);
    const theirClip = placeClip(club.context, club.ids.athletes.foreign, theirs).id;
    expect((await send({ file, pairs: [{ from: clipId, to: theirClip }] })).status).toBe(400);
    const strange = structuredClone(file);
    const [clip] = strange.sessions[0]?.clips ?? [];
    if (!clip) throw new Error('no clip');
    clip.id = theirClip;
    strange.athlete.id = club.ids.athletes.foreign;
    const { basis } = (await send({ file: strange })).body as ImportPreview;
    expect((await send({ file: strange, choice: 'match', basis }, to(''))).status).toBe(200);
    const owners = club.context.db.select().from(strokes).all();
    expect(owners.map((stroke) => stroke.clipId)).toEqual([clipId]);
  });

  it('never take a stroke from another clip by its id', async () => {
    const otherClip = placeClip(club.context, club.ids.athletes.own, sessionId).id;
    const pairs = [{ from: clipId, to: otherClip }];
    const { basis } = (await send({ file, pairs })).body as ImportPreview;
    expect((await send({ file, pairs, choice: 'match', basis }, to(''))).status).toBe(200);
    const rows = club.context.db.select().from(strokes).all();
    expect(rows.map((stroke) => stroke.clipId).sort()).toEqual([clipId, otherClip].sort());
  });

  it('refuse files that are none, each with words', async () => {
    const text = JSON.stringify({ file });
    const clip = text.indexOf('"width":1920');
    expect(clip).toBeGreaterThan(0);
    const cases: [string, string, RegExp][] = [
      ['nothing', '{}', /not a file that Stillstroke exported/],
      ['a list', '{"file":[]}', /not a file that Stillstroke exported/],
      [
        'another format',
        text.replace('stillstroke-export', 'swim-data'),
        /not a file that Stillstroke exported/,
      ],
      ['a later version', text.replace('"version":1', '"version":2'), /another version of the format/],
      ['NaN as a word', text.replace('"width":1920', '"width":"NaN"'), /width/],
      [
        'Infinity as a word',
        text.replace('"captureRateFactor":1', '"captureRateFactor":"Infinity"'),
        /captureRateFactor/,
      ],
      ['infinity', text.replace('"captureRateFactor":1', '"captureRateFactor":1e999'), /captureRateFactor/],
      [
        'an unknown key',
        text.replace('"width":1920', '"width":1920,"isAdmin":true'),
        /isAdmin|[Uu]nrecognized/,
      ],
      ['an unknown key at the top', text.replace('"trend":', '"owner":1,"trend":'), /owner/],
      ['a fraction of a frame', text.replace('"entry":10', '"entry":10.5'), /entry/],
      ['no id', text.replaceAll(clipId, 'not-an-id'), /id/i],
      ['broken JSON', text.slice(0, -2), /well-formed JSON/],
      ['NaN', text.replace('"width":1920', '"width":NaN'), /well-formed JSON/],
      [
        'two choices',
        text.replace(
          '{"file"',
          `{"pairs":[{"from":"${clipId}","to":null},{"from":"${clipId}","to":null}],"file"`,
        ),
        /twice/,
      ],
      [
        'an unknown choice',
        text.replace('{"file"', `{"pairs":[{"from":"${randomUUID()}","to":null}],"file"`),
        /not in the file/,
      ],
    ];
    for (const [what, body, words] of cases) {
      const answer = await send(body);
      expect([what, answer.status]).toEqual([what, 400]);
      expect([what, (answer.body as Problem).detail]).toEqual([what, expect.stringMatching(words)]);
    }
    const twice = structuredClone(file);
    const [session] = twice.sessions;
    if (session?.clips[0]) session.clips.push(session.clips[0]);
    expect(((await send({ file: twice })).body as Problem).detail).toMatch(/clip twice/);
    expect((await send({ file, choice: 'everything', basis: '' }, to(''))).status).toBe(400);
  });

  it('stand up to deep nesting and to bodies that are too large', async () => {
    const deep = `{"file":${'['.repeat(200_000)}${']'.repeat(200_000)}}`;
    expect((await send(deep)).status).toBe(400);
    const proto = JSON.stringify({ file }).replace('"figures":{', '"figures":{"__proto__":{"value":1},');
    expect([200, 400]).toContain((await send(proto)).status);
    expect(({} as Record<string, unknown>)['value']).toBeUndefined();
    const large = `{"file":"${'x'.repeat(IMPORT_BYTES)}"}`;
    const answer = await send(large);
    expect([answer.status, (answer.body as Problem).detail]).toEqual([413, 'The request is too large.']);
    // Only here may a body be large, and only for somebody signed in.
    const big = JSON.stringify({ file, pad: 'x'.repeat(100_000) });
    expect((await send(big)).status).toBe(400);
    expect((await send(big, `/api/clips/${clipId}/strokes`)).status).toBe(413);
    const anonymous = club.anonymous();
    await anonymous.get('/api/auth/page');
    expect((await anonymous.mutate('post', to()).type('json').send(big)).status).not.toBe(400);
  });

  it('on queries that are none are refused', async () => {
    for (const query of ['format=xml', 'format=json&all=1', 'format=json&format=csv'])
      expect((await coach.get(`/api/clips/${clipId}/export?${query}`)).status).toBe(400);
  });
});
