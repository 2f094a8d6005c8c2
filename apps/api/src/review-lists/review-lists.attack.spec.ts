import { randomUUID } from 'node:crypto';
import * as calls from '@stillstroke/contract/review-lists';
import { observations, snippets } from '@stillstroke/db/schema/review';
import { attack } from '../platform/test-attack';
import type { TestClub } from '../platform/test-club';

const placed = new WeakMap<TestClub, { observationId: string; snippetId: string }>();
/** One of each, the snippet the coach's own. */
function of(club: TestClub) {
  const there = placed.get(club);
  if (there) return there;
  const [observationId, snippetId] = [randomUUID(), randomUUID()];
  const createdAt = '2026-03-03T18:00:00.000Z';
  const { db } = club.context;
  db.insert(observations)
    .values({
      id: observationId,
      clubId: club.ids.clubs.tarnValley,
      name: 'Wrist leads the elbow',
      createdAt,
    })
    .run();
  db.insert(snippets)
    .values({ id: snippetId, userId: club.ids.users.coach, words: 'Slow is smooth.', createdAt })
    .run();
  placed.set(club, { observationId, snippetId });
  return { observationId, snippetId };
}

const notSwimmers = { athlete: 403, guardian: 403, foreignAthlete: 403 } as const;

attack(calls.listObservations, { path: () => '/api/observations', by: 'coach', refused: notSwimmers });
attack(calls.addObservation, {
  path: () => '/api/observations',
  by: 'coach',
  good: () => ({ name: 'Late breath' }),
  refused: notSwimmers,
});
attack(calls.updateObservation, {
  path: (club) => `/api/observations/${of(club).observationId}`,
  by: 'coach',
  good: () => ({ version: 1, name: 'Wrist leads', retired: true }),
  refused: { ...notSwimmers, foreignAdmin: 404, foreignCoach: 404 },
});
attack(calls.listSnippets, { path: () => '/api/snippets', by: 'coach', refused: notSwimmers });
attack(calls.addSnippet, {
  path: () => '/api/snippets',
  by: 'coach',
  good: () => ({ words: 'One thing at a time.' }),
  refused: notSwimmers,
});
attack(calls.updateSnippet, {
  path: (club) => `/api/snippets/${of(club).snippetId}`,
  by: 'coach',
  good: () => ({ version: 1, words: 'Slow is smooth, smooth is fast.' }),
  // Kept texts are a person's own, also among colleagues.
  refused: { ...notSwimmers, admin: 404, otherCoach: 404, foreignCoach: 404 },
});
attack(calls.deleteSnippet, {
  path: (club) => `/api/snippets/${of(club).snippetId}?version=1`,
  by: 'coach',
  refused: { ...notSwimmers, admin: 404, otherCoach: 404, foreignCoach: 404 },
});
