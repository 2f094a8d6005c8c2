import { once } from 'node:events';
import { readFileSync, writeFileSync } from 'node:fs';
import { type AddressInfo, connect } from 'node:net';
import { join } from 'node:path';
import type { Clip } from '@stillstroke/contract/clip-facts';
import { clips } from '@stillstroke/db/schema/film';
import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';
import { clipFolder, dropFolder, filmPath, posterPath } from './clip-store';
import { placeClip, placeSession } from './test-films';

describe('the film of a clip', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let clip: Clip;
  let folder: string;
  const bytes = Buffer.from(Array.from({ length: 1000 }, (_, n) => n % 251));

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    const sessionId = placeSession(club.context, club.ids.athletes.own);
    clip = placeClip(club.context, club.ids.athletes.own, sessionId);
    folder = clipFolder(club.context.settings, clip.id);
    writeFileSync(filmPath(folder), bytes);
  });
  afterEach(() => club.close());

  const film = (headers: Record<string, string> = {}) =>
    coach
      .get(`/api/clips/${clip.id}/media`)
      .set(headers)
      .buffer(true)
      .parse((res, done) => {
        const parts: Buffer[] = [];
        res.on('data', (part: Buffer) => parts.push(part));
        res.on('end', () => done(null, Buffer.concat(parts)));
      });

  it('comes whole, named, typed, tagged, and kept by nobody but the browser that asks again', async () => {
    club.context.db.update(clips).set({ name: 'lane "4" – früh.mp4' }).where(eq(clips.id, clip.id)).run();
    const answer = await film();
    expect(answer.status).toBe(200);
    expect((answer.body as Buffer).equals(bytes)).toBe(true);
    expect(answer.headers).toMatchObject({
      'content-type': 'video/mp4',
      'accept-ranges': 'bytes',
      'cache-control': 'private, no-cache',
      'x-content-type-options': 'nosniff',
      etag: `"${clip.sha256}"`,
      'content-disposition': `inline; filename="lane _4_ _ fr_h.mp4"; filename*=UTF-8''lane%20%224%22%20%E2%80%93%20fr%C3%BCh.mp4`,
    });
  });

  it('comes in the range asked for', async () => {
    const asked: [string, number, number][] = [
      ['bytes=0-0', 0, 1],
      ['bytes=10-19', 10, 20],
      ['bytes=990-', 990, 1000],
      ['bytes=-5', 995, 1000],
      ['bytes=500-5000', 500, 1000],
    ];
    for (const [range, from, to] of asked) {
      const answer = await film({ Range: range });
      expect([range, answer.status]).toEqual([range, 206]);
      expect(answer.headers['content-range']).toBe(`bytes ${from}-${to - 1}/1000`);
      expect((answer.body as Buffer).equals(bytes.subarray(from, to))).toBe(true);
    }
  });

  it('left before its first byte is no fault of the server', async () => {
    const failed = vi.spyOn(club.context.log, 'error');
    const server = club.app.listen(0);
    await once(server, 'listening');
    const { port } = server.address() as AddressInfo;
    const cookie = `stillstroke=${coach.cookie('stillstroke') ?? ''}`;
    for (let turn = 0; turn < 20; turn++) {
      const reader = connect(port, '127.0.0.1');
      await once(reader, 'connect');
      const lines = [`GET /api/clips/${clip.id}/media HTTP/1.1`, 'Host: pool', `Cookie: ${cookie}`, '', ''];
      const received = once(server, 'request');
      reader.write(lines.join('\r\n'));
      await received;
      reader.destroy();
      await once(reader, 'close');
    }
    server.close();
    await once(server, 'close');
    expect(failed).not.toHaveBeenCalled();
  });

  it('refuses a range beyond its end, saying how long it is', async () => {
    const answer = await coach.get(`/api/clips/${clip.id}/media`).set('Range', 'bytes=1000-');
    expect(answer.status).toBe(416);
    expect(answer.headers['content-range']).toBe('bytes */1000');
    expect(answer.headers['content-type']).toMatch('application/problem+json');
    expect(JSON.parse(answer.text)).toMatchObject({ code: 'range-not-satisfiable' });
  });

  it('comes in part only while it is the same file', async () => {
    const same = await film({ Range: 'bytes=0-9', 'If-Range': `"${clip.sha256}"` });
    expect(same.status).toBe(206);
    const other = await film({ Range: 'bytes=0-9', 'If-Range': '"another"' });
    expect(other.status).toBe(200);
    const known = await film({ 'If-None-Match': `"${clip.sha256}"` });
    expect(known.status).toBe(304);
  });

  it('is not there once the clip is deleted, whatever the browser kept', async () => {
    await coach.mutate('delete', `/api/clips/${clip.id}`);
    expect((await film({ 'If-None-Match': `"${clip.sha256}"` })).status).toBe(404);
  });

  it('that is gone from the disk is a 404 in words, without a name of the disk', async () => {
    await dropFolder(folder);
    const answer = await coach.get(`/api/clips/${clip.id}/media`);
    expect(answer.status).toBe(404);
    expect(answer.text).not.toContain(club.context.settings.dataFolder);
  });

  it('has a poster where one was made', async () => {
    expect((await coach.get(`/api/clips/${clip.id}/poster`)).status).toBe(404);
    club.context.db.update(clips).set({ hasPoster: true }).where(eq(clips.id, clip.id)).run();
    writeFileSync(posterPath(folder), readFileSync(join(folder, 'film')));
    const answer = await coach.get(`/api/clips/${clip.id}/poster`);
    expect(answer.headers['content-type']).toBe('image/jpeg');
    expect(answer.headers['cache-control']).toBe('private, no-cache');
  });
});
