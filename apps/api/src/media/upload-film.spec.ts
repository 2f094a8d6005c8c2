import { createHash, randomUUID } from 'node:crypto';
import { readFileSync, statSync } from 'node:fs';
import { connect, type AddressInfo } from 'node:net';
import { createServer } from 'node:http';
import { once } from 'node:events';
import type { Clip } from '@stillstroke/contract/clip-facts';
import { clipSchema } from '@stillstroke/contract/clip-facts';
import { clipFrames, clips } from '@stillstroke/db/schema/film';
import { Jimp } from 'jimp';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { signInCookie } from '../auth/sign-in-state';
import type { readSettings } from '../platform/settings';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';
import { clipFolder, filmPath, posterPath } from './clip-store';
import { readNumber } from '../../../../test/nasty-media/number-code.mjs';
import { corpusFile, corpusFiles, filmsOnDisk, openSession, upload } from './test-films';

describe('an upload', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let sessionId: string;

  const open = async (limits: Partial<ReturnType<typeof readSettings>['limits']> = {}) => {
    club = await openTestClub();
    Object.assign(club.context.settings.limits, limits);
    coach = await club.agentFor('coach');
    sessionId = (await openSession(coach, club.ids.athletes.own)).id;
  };
  beforeEach(() => open());
  afterEach(() => club.close());

  const nothingKept = () => {
    expect(filmsOnDisk(club.context)).toEqual({ incoming: [], clips: [] });
    expect(club.context.db.select().from(clips).all()).toEqual([]);
  };

  it('becomes a clip with its facts, file, hash, frames and poster', async () => {
    const answer = await upload(coach, sessionId, 'variable-rate.mp4', {
      travel: 'left',
      captureRateFactor: '0.25',
    });
    expect(answer.status).toBe(201);
    const clip = clipSchema.parse(answer.body);
    const sent = readFileSync(corpusFile('variable-rate.mp4'));
    expect(clip).toMatchObject({
      name: 'variable-rate.mp4',
      view: 'side-underwater',
      travel: 'left',
      captureRateFactor: 0.25,
      status: 'ready',
      codec: 'avc',
      frameRate: null,
      sizeBytes: sent.length,
      sha256: createHash('sha256').update(sent).digest('hex'),
      cutOff: false,
      hasPoster: true,
      plumb: null,
    });
    const folder = clipFolder(club.context.settings, clip.id);
    expect(readFileSync(filmPath(folder)).equals(sent)).toBe(true);
    const poster = await Jimp.read(posterPath(folder));
    expect([poster.bitmap.width, poster.bitmap.height]).toEqual([clip.width, clip.height]);
    const frames = await coach.get(`/api/clips/${clip.id}/frames`);
    const { timestampsUs } = frames.body as { timestampsUs: number[] };
    expect(timestampsUs).toHaveLength(clip.frameCount);
    expect(filmsOnDisk(club.context).incoming).toEqual([]);
  });

  it('shows a frame one third in on its poster, upright and in its true proportions', async () => {
    const films = ['b-frames', 'rotated-90', 'rotated-180', 'rotated-270', 'wide-pixels-rotated', 'mirrored'];
    for (const film of films) {
      const clip = (await upload(coach, sessionId, `${film}.mp4`)).body as Clip;
      const { width, height, data } = (
        await Jimp.read(posterPath(clipFolder(club.context.settings, clip.id)))
      ).bitmap;
      const number = readNumber(width, height, (x, y) => data[(y * width + x) * 4] ?? 0);
      expect([film, width, height, number]).toEqual([film, clip.width, clip.height, 16]);
    }
  });

  it('is kept without a poster where no frame can be decoded', async () => {
    const bytes = readFileSync(corpusFile('single-frame.mp4'));
    const pictures = bytes.indexOf('mdat') + 4;
    bytes.fill(0xff, pictures, pictures - 8 + bytes.readUInt32BE(pictures - 8));
    const answer = await upload(coach, sessionId, { bytes, name: 'all-noise.mp4' });
    expect(answer.status).toBe(201);
    expect(answer.body).toMatchObject({ hasPoster: false, frameCount: 1 });
    expect((await coach.get(`/api/clips/${(answer.body as Clip).id}/poster`)).status).toBe(404);
  });

  it('keeps the readable frames of a file that was cut off, and says so', async () => {
    const answer = await upload(coach, sessionId, 'cut-off.mp4');
    expect(answer.status).toBe(201);
    expect(answer.body).toMatchObject({ cutOff: true, frameCount: 30 });
  });

  it('is refused in words that say what to do, by what the file holds', async () => {
    const refused: [string, string, RegExp][] = [
      ['refused/text.mp4', 'not-a-video', /not a video/],
      ['refused/picture.mp4', 'not-a-video', /Choose the file the camera wrote/],
      ['refused/empty.mp4', 'not-a-video', /empty/],
      ['refused/sound-only.m4a', 'no-video-track', /only sound/],
      ['refused/no-frames.mp4', 'no-frames', /Export the clip again/],
      ['refused/table-never-written.mp4', 'unreadable-video', /Copy the file again/],
      ['hevc.mp4', 'unsupported-codec', /HEVC \(H\.265\).*H\.264/],
    ];
    for (const [film, code, words] of refused) {
      const answer = await upload(coach, sessionId, film);
      expect([film, answer.status, (answer.body as { code: string }).code]).toEqual([film, 422, code]);
      expect((answer.body as { detail: string }).detail).toMatch(words);
    }
    nothingKept();
  });

  it('is refused over the limits of length and picture', async () => {
    Object.assign(club.context.settings.limits, { clipMinutes: 0.01 });
    expect((await upload(coach, sessionId, 'b-frames.mp4')).body).toMatchObject({
      status: 422,
      code: 'clip-too-long',
    });
    Object.assign(club.context.settings.limits, { clipMinutes: 20, pictureSide: 100 });
    expect((await upload(coach, sessionId, 'b-frames.mp4')).body).toMatchObject({
      code: 'picture-too-large',
    });
    nothingKept();
  });

  it('stops at the size limit, declared or found out while it streams', async () => {
    Object.assign(club.context.settings.limits, { clipBytes: 5000 });
    const found = await upload(coach, sessionId, 'b-frames.mp4');
    expect(found.body).toMatchObject({ status: 413, code: 'file-too-large' });
    const declared = await upload(coach, sessionId, { bytes: Buffer.alloc(200_000), name: 'long.mp4' });
    expect(declared.body).toMatchObject({ status: 413, code: 'file-too-large' });
    nothingKept();
  });

  it('is refused when the athlete has the file already, naming the session, until that one is deleted', async () => {
    const first = (await upload(coach, sessionId, 'vp9.webm')).body as Clip;
    const later = await openSession(coach, club.ids.athletes.own, '2026-04-01');
    const again = await upload(coach, later.id, 'vp9.webm');
    expect(again.body).toMatchObject({
      status: 409,
      code: 'duplicate-clip',
      current: { clipId: first.id, sessionDate: '2026-03-02' },
    });
    expect((again.body as { detail: string }).detail).toContain('2026-03-02');
    const other = await openSession(coach, club.ids.athletes.other);
    expect((await upload(coach, other.id, 'vp9.webm')).status).toBe(201);
    await coach.mutate('delete', `/api/clips/${first.id}`);
    expect((await upload(coach, later.id, 'vp9.webm')).status).toBe(201);
  });

  it('arriving twice at the same time is one clip', async () => {
    const both = await Promise.all([
      upload(coach, sessionId, 'b-frames.mp4'),
      upload(coach, sessionId, 'b-frames.mp4'),
    ]);
    expect(both.map(({ status }) => status).sort()).toEqual([201, 409]);
    expect(filmsOnDisk(club.context).clips).toHaveLength(1);
  });

  it('leaves nothing behind when the connection breaks', async () => {
    const server = createServer(club.app).listen(0, '127.0.0.1');
    await once(server, 'listening');
    const cookies = [signInCookie(false), 'XSRF-TOKEN']
      .map((name) => `${name}=${coach.cookie(name) ?? ''}`)
      .join('; ');
    const token = coach.cookie('XSRF-TOKEN') ?? '';
    const socket = connect((server.address() as AddressInfo).port, '127.0.0.1');
    socket.write(
      `POST /api/sessions/${sessionId}/clips HTTP/1.1\r\nHost: 127.0.0.1\r\nCookie: ${cookies}\r\nX-XSRF-TOKEN: ${token}\r\n` +
        'Content-Type: multipart/form-data; boundary=rope\r\nContent-Length: 100000\r\n\r\n' +
        '--rope\r\nContent-Disposition: form-data; name="video"; filename="a.mp4"\r\n\r\n' +
        'x'.repeat(20_000),
    );
    await vi.waitFor(() => {
      const [arriving] = filmsOnDisk(club.context).incoming;
      expect(arriving).toBeDefined();
      const film = filmPath(`${club.context.settings.dataFolder}/incoming/${arriving ?? ''}`);
      expect(statSync(film).size).toBeGreaterThan(0);
    });
    socket.destroy();
    await vi.waitFor(nothingKept);
    server.close();
  });

  it(
    'takes in every readable file of the corpus in a codec that browsers show',
    { timeout: 180_000 },
    async () => {
      const codes: Record<string, number> = {};
      for (const film of corpusFiles()) codes[film] = (await upload(coach, sessionId, film)).status;
      const refused = Object.entries(codes).filter(([, status]) => status !== 201);
      expect(refused).toEqual([['hevc.mp4', 422]]);
      const kept = club.context.db.select({ id: clips.id }).from(clips).all().length;
      expect(club.context.db.select({ id: clipFrames.clipId }).from(clipFrames).all()).toHaveLength(kept);
    },
  );

  it('of a session that is not there touches no disk', async () => {
    const answer = await upload(coach, randomUUID(), 'b-frames.mp4');
    expect(answer.status).toBe(404);
    nothingKept();
  });
});
