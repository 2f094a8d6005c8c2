import * as calls from '@stillstroke/contract/scale';
import { clipScales } from '@stillstroke/db/schema/scale';
import { eq } from 'drizzle-orm';
import { placeClip, placeSession } from '../media/test-films';
import { attack } from '../platform/test-attack';
import type { TestClub } from '../platform/test-club';

const placed = new WeakMap<TestClub, string>();

const length = {
  kind: 'length',
  plane: 'swimmer',
  from: { x: 100, y: 100 },
  to: { x: 400, y: 100 },
  metres: 1,
  uncertaintyM: 0,
  check: null,
};

/** A clip with a scale, once for each club. */
function scaleOfClip(club: TestClub): string {
  const known = placed.get(club);
  if (known) return known;
  const { context, ids } = club;
  const sessionId = placeSession(context, ids.athletes.own);
  const { id } = placeClip(context, ids.athletes.own, sessionId);
  context.db.delete(clipScales).where(eq(clipScales.clipId, id)).run();
  context.db.insert(clipScales).values({ clipId: id, scale: length, updatedAt: '2026-11-30' }).run();
  const path = `/api/clips/${id}/scale`;
  placed.set(club, path);
  return path;
}

const outsiders = { otherCoach: 404, foreignAdmin: 404, foreignCoach: 404 } as const;
const readers = { ...outsiders, otherAthlete: 404, foreignAthlete: 404, guardian: 404 } as const;
const lookersOn = { athlete: 403, otherAthlete: 403, guardian: 403, foreignAthlete: 403 } as const;

attack(calls.getScale, { path: scaleOfClip, by: 'coach', refused: readers });

attack(calls.putScale, {
  path: scaleOfClip,
  by: 'coach',
  good: () => ({ scale: { ...length, metres: 2 }, version: 1 }),
  refused: { ...outsiders, ...lookersOn },
});

attack(calls.deleteScale, {
  path: scaleOfClip,
  by: 'coach',
  refused: { ...outsiders, ...lookersOn },
});
