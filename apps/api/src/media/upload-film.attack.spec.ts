import { clips } from '@stillstroke/db/schema/film';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { TestBrowser } from '../platform/test-browser';
import { openTestClub, type TestClub } from '../platform/test-club';
import { malformedUpload } from './malformed-upload';
import { filmsOnDisk, placeSession } from './test-films';

/** How many to try; the long run takes STILLSTROKE_FUZZ_UPLOADS=10000. */
const uploads = Number(process.env['STILLSTROKE_FUZZ_UPLOADS'] ?? 220);
/** Refusals that name what is wrong; 201 where a changed film is still one. */
const fine = new Set([201, 400, 409, 413, 415, 422]);

describe('malformed uploads', () => {
  let club: TestClub;
  let coach: TestBrowser;
  let sessionId: string;

  beforeEach(async () => {
    club = await openTestClub();
    coach = await club.agentFor('coach');
    sessionId = placeSession(club.context, club.ids.athletes.own);
  });
  afterEach(() => club.close());

  it('never break the server and leave nothing behind', { timeout: 60_000 + uploads * 2_000 }, async () => {
    const counts: Record<number, number> = {};
    for (let n = 0; n < uploads; n += 1) {
      const { kind, body, contentType } = malformedUpload(n);
      const answer = await coach
        .mutate('post', `/api/sessions/${sessionId}/clips`)
        .set('Content-Type', contentType)
        // An upload that is never answered counts as broken.
        .timeout(60_000)
        .serialize((same: unknown) => same as string)
        .send(body);
      counts[answer.status] = (counts[answer.status] ?? 0) + 1;
      expect([n, kind, answer.status, fine.has(answer.status)]).toEqual([n, kind, answer.status, true]);
    }
    expect(counts[400]).toBeGreaterThan(uploads / 4);
    const kept = club.context.db.select({ id: clips.id, name: clips.name }).from(clips).all();
    const disk = filmsOnDisk(club.context);
    expect(disk.incoming).toEqual([]);
    expect(disk.clips.sort()).toEqual(kept.map(({ id }) => id).sort());
    // Names come without paths and control characters, whatever was sent.
    for (const { name } of kept) expect(name).toMatch(/^[^/\\\p{C}]{1,320}$/u);
  });
});
