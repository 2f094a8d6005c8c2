import { randomUUID } from 'node:crypto';
import { rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Still } from '@stillstroke/contract/stills';
import type { Finding, Review } from '@stillstroke/contract/reviews';
import { Jimp } from 'jimp';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';
import { placeReview, type PlacedReview } from '../reviews/test-reviews';
import { pictureHead } from './picture-head';
import { storedPictures, stillsFolder } from './still-store';
import { sweepStills } from './sweep-stills';

let club: TestClub;
let coach: TestBrowser;
let placed: PlacedReview;
beforeEach(async () => {
  club = await openTestClub();
  coach = await club.agentFor('coach');
  placed = placeReview(club, 'draft');
});
afterEach(() => club.close());

/** Left half red, right half blue. */
async function painted(
  type: 'image/png' | 'image/jpeg' = 'image/png',
  width = 64,
  height = 32,
): Promise<Buffer> {
  const picture = new Jimp({ width, height, color: 0xff0000ff });
  for (let x = width / 2; x < width; x += 1)
    for (let y = 0; y < height; y += 1) picture.setPixelColor(0x0000ffff, x, y);
  return picture.getBuffer(type);
}

const about = (more: object = {}) => ({
  layout: 'single',
  parts: [{ clipId: placed.clipId, frame: 12 }],
  overlays: false,
  drawings: [{ kind: 'arrow', colour: 'yellow', from: { x: 1, y: 2 }, to: { x: 30, y: 20.5 } }],
  words: 'The catch',
  ...more,
});
const put = (method: 'post' | 'put', path: string, bytes: Buffer, said: object | string = about()) =>
  coach
    .mutate(method, path)
    .field('about', typeof said === 'string' ? said : JSON.stringify(said))
    .attach('picture', bytes, 'still.png');
const add = (bytes: Buffer, said?: object | string) =>
  put('post', `/api/findings/${placed.findingId}/stills`, bytes, said);
const picture = (id: string, browser = coach) =>
  browser.get(`/api/stills/${id}/picture`).responseType('blob');

describe('a still', () => {
  it('is made anew by the server and served to those who may see it, kept by no shared cache', async () => {
    const made = await add(await painted());
    expect(made.status, made.text).toBe(201);
    const still = made.body as Still;
    expect(still).toMatchObject({ ...about(), width: 64, height: 32, version: 1, removedAt: null });
    const answer = await picture(still.id);
    expect(answer.headers).toMatchObject({
      'content-type': 'image/jpeg',
      'cache-control': 'private, no-cache',
      'x-content-type-options': 'nosniff',
    });
    const { bitmap } = await Jimp.read(answer.body as Buffer);
    expect([bitmap.width, bitmap.height]).toEqual([64, 32]);
    const pixel = (x: number) => [...bitmap.data.subarray((16 * 64 + x) * 4, (16 * 64 + x) * 4 + 3)];
    expect(pixel(8)[0]).toBeGreaterThan(240);
    expect(pixel(8)[2]).toBeLessThan(15);
    expect(pixel(56)[2]).toBeGreaterThan(240);
    const { findings } = (await coach.get(`/api/reviews/${placed.reviewId}`)).body as Review;
    expect(findings[0]).toMatchObject({ version: 2, updatedBy: 'The coach' });
    expect(storedPictures(club.context.settings)).toHaveLength(2);
  });

  it('keeps nothing that came along with the picture', async () => {
    const bytes = await painted('image/jpeg');
    const exif = Buffer.concat([
      Buffer.from([0xff, 0xe1, 0x00, 0x2c]),
      Buffer.from('Exif\0\0MM\0*\0\0\0\u0008 54.6 N 3.1 W of the pool'.padEnd(42, ' '), 'latin1'),
    ]);
    const comment = Buffer.concat([Buffer.from([0xff, 0xfe, 0x00, 0x12]), Buffer.from('Wren, lane four!')]);
    const tagged = Buffer.concat([bytes.subarray(0, 2), exif, comment, bytes.subarray(2)]);
    const still = (await add(tagged)).body as Still;
    const kept = (await picture(still.id)).body as Buffer;
    expect(pictureHead(kept)).toEqual({ kind: 'jpeg', width: 64, height: 32 });
    for (const trace of ['Exif', '54.6', 'Wren']) {
      expect(tagged.includes(trace)).toBe(true);
      expect(kept.includes(trace)).toBe(false);
    }
  });

  it('is refused when it is not a picture, by its content', async () => {
    const png = await painted();
    const wrong: [string, Buffer, number, string][] = [
      ['text', Buffer.from('<svg onload="alert(1)"/>'), 422, 'not-a-picture'],
      ['a PNG’s name alone', Buffer.concat([png.subarray(0, 8), Buffer.alloc(200)]), 422, 'not-a-picture'],
      ['a PNG cut off', png.subarray(0, png.length / 2), 422, 'not-a-picture'],
      ['a bomb', bomb(60_000, 60_000), 413, 'picture-too-large'],
      ['a long thread', bomb(40_000, 1), 413, 'picture-too-large'],
      ['no width', bomb(0, 10), 422, 'not-a-picture'],
      ['a GIF', Buffer.from('GIF89a\x01\0\x01\0\0\0\0;', 'latin1'), 422, 'not-a-picture'],
      ['nothing', Buffer.alloc(0), 400, 'upload-malformed'],
    ];
    for (const [what, bytes, status, code] of wrong) {
      const answer = await add(bytes);
      expect([what, answer.status, (answer.body as { code: string }).code]).toEqual([what, status, code]);
    }
    expect(storedPictures(club.context.settings)).toHaveLength(1);
  });

  it('is of frames of this athlete’s films, said once and in full', async () => {
    const png = await painted();
    const wrong: (object | string)[] = [
      'not json',
      '{}',
      about({ parts: [{ clipId: placed.clipId, frame: 200 }] }),
      about({ parts: [{ clipId: randomUUID(), frame: 1 }] }),
      about({ parts: [] }),
      about({ layout: 'left-right' }),
      about({ unknown: 1 }),
      about({ words: 'x'.repeat(301) }),
      about({ drawings: [{ kind: 'arrow', colour: '#fff', from: { x: 0, y: 0 }, to: { x: 1, y: 1 } }] }),
      about({ drawings: Array.from({ length: 61 }, () => about().drawings[0]) }),
    ];
    for (const said of wrong) expect([said, (await add(png, said)).status]).toEqual([said, 400]);
    const twice = coach
      .mutate('post', `/api/findings/${placed.findingId}/stills`)
      .field('about', JSON.stringify(about()))
      .attach('picture', png, 'a.png')
      .attach('picture', png, 'b.png');
    expect((await twice).status).toBe(400);
    expect(storedPictures(club.context.settings)).toHaveLength(1);
  });

  it('is replaced by version, and the old file goes', async () => {
    const path = `/api/stills/${placed.stillId}`;
    const png = await painted();
    expect((await put('put', path, png)).status).toBe(400);
    const replaced = await put('put', path, png, about({ version: 1, overlays: true }));
    expect(replaced.body).toMatchObject({ id: placed.stillId, version: 2, width: 64 });
    const stored = storedPictures(club.context.settings);
    expect(stored).toHaveLength(1);
    expect(stored[0]).not.toBe(`${placed.fileId}.jpg`);
    const late = await put('put', path, png, about({ version: 1 }));
    expect(late.body).toMatchObject({ code: 'changed-meanwhile', current: { version: 2 } });
    const patch = (body: object) => coach.mutate('patch', path).send(body);
    expect((await patch({ version: 2, words: 'Mid-pull' })).body).toMatchObject({
      words: 'Mid-pull',
      version: 3,
    });
    expect((await patch({ version: 2, words: 'Exit' })).status).toBe(409);
    expect(storedPictures(club.context.settings)).toEqual(stored);
  });

  it('goes with itself, its finding and its draft', async () => {
    const left = () => storedPictures(club.context.settings).length;
    const still = (await add(await painted())).body as Still;
    expect(left()).toBe(2);
    expect((await coach.mutate('delete', `/api/stills/${still.id}?version=1`)).status).toBe(204);
    expect(left()).toBe(1);
    const finding = (await coach.get(`/api/reviews/${placed.reviewId}`)).body as { findings: Finding[] };
    const version = finding.findings[0]?.version ?? 0;
    await coach.mutate('delete', `/api/findings/${placed.findingId}?version=${version}`);
    expect(left()).toBe(0);
    const second = placeReview(club, 'draft');
    await coach.mutate('delete', `/api/reviews/${second.reviewId}?version=1`);
    expect(left()).toBe(0);
  });
});

describe('in a review that was sent', () => {
  it('a still stays as it is when its film is deleted, and only its picture can be taken out, for good', async () => {
    const sent = placeReview(club, 'sent');
    const athlete = await club.agentFor('athlete');
    await coach.mutate('delete', `/api/clips/${sent.clipId}`);
    expect((await picture(sent.stillId, athlete)).status).toBe(200);
    const path = `/api/stills/${sent.stillId}`;
    expect((await put('put', path, await painted(), about({ version: 1 }))).body).toMatchObject({
      code: 'review-sent',
    });
    expect((await coach.mutate('patch', path).send({ version: 1, words: 'x' })).status).toBe(409);
    const addition = put('post', `/api/findings/${sent.findingId}/stills`, await painted());
    expect((await addition).body).toMatchObject({ code: 'review-sent' });

    expect((await athlete.mutate('delete', `${path}?version=1`)).status).toBe(403);
    expect((await coach.mutate('delete', `${path}?version=1`)).status).toBe(204);
    expect((await picture(sent.stillId, athlete)).status).toBe(404);
    const { findings } = (await athlete.get(`/api/reviews/${sent.reviewId}`)).body as Review;
    expect(findings[0]?.stills[0]).toMatchObject({
      words: 'The catch',
      removedAt: expect.any(String) as string,
    });
    expect(storedPictures(club.context.settings)).not.toContain(`${sent.fileId}.jpg`);
  });
});

describe('the sweep at start', () => {
  it('takes files without a row and names rows without a file', async () => {
    const folder = stillsFolder(club.context.settings);
    for (const name of [`${randomUUID()}.jpg`, `${randomUUID()}.made`, `${randomUUID()}.came`])
      writeFileSync(join(folder, name), 'left behind');
    expect(await sweepStills(club.context)).toEqual({ removed: 3, missing: [] });
    expect(storedPictures(club.context.settings)).toEqual([`${placed.fileId}.jpg`]);
    await coach.mutate('delete', `/api/stills/${placed.stillId}?version=1`);
    const other = placeReview(club, 'draft');
    writeFileSync(join(folder, 'x'), '');
    rmSync(join(folder, `${other.fileId}.jpg`));
    expect(await sweepStills(club.context)).toEqual({ removed: 1, missing: [other.stillId] });
  });
});

/** A PNG whose head alone is right: so many pixels out of a few bytes. */
function bomb(width: number, height: number): Buffer {
  const head = Buffer.alloc(60);
  Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]).copy(head);
  head.writeUInt32BE(13, 8);
  head.write('IHDR', 12, 'latin1');
  head.writeUInt32BE(width, 16);
  head.writeUInt32BE(height, 20);
  return head;
}
