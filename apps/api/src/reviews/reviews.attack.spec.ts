import { randomUUID } from 'node:crypto';
import * as calls from '@stillstroke/contract/reviews';
import { attack } from '../platform/test-attack';
import type { TestClub } from '../platform/test-club';
import { placeQuestion, placeReview, type PlacedReview } from './test-reviews';

/** One draft and one sent review per club under attack. */
const placed = new WeakMap<TestClub, { draft: PlacedReview; sent: PlacedReview; questionId: string }>();
function of(club: TestClub) {
  let there = placed.get(club);
  if (!there) {
    const sent = placeReview(club, 'sent');
    there = { draft: placeReview(club, 'draft'), sent, questionId: placeQuestion(club, sent.findingId) };
    placed.set(club, there);
  }
  return there;
}

const writersOnly = {
  otherCoach: 404,
  athlete: 403,
  otherAthlete: 403,
  guardian: 403,
  foreignAdmin: 404,
  foreignCoach: 404,
  foreignAthlete: 403,
} as const;
const others = {
  otherCoach: 404,
  otherAthlete: 404,
  guardian: 404,
  foreignAdmin: 404,
  foreignCoach: 404,
  foreignAthlete: 404,
} as const;

attack(calls.listReviews, {
  path: (club) => `/api/athletes/${club.ids.athletes.own}/reviews`,
  by: 'coach',
  refused: others,
});
attack(calls.createReview, {
  path: (club) => `/api/athletes/${club.ids.athletes.own}/reviews`,
  by: 'coach',
  good: (club) => ({ sessionId: of(club).draft.sessionId, id: randomUUID() }),
  refused: writersOnly,
});
attack(calls.getReview, {
  path: (club) => `/api/reviews/${of(club).draft.reviewId}`,
  by: 'coach',
  // A draft is nothing that the athlete knows of.
  refused: { ...others, athlete: 404 },
});
attack(calls.updateReview, {
  path: (club) => `/api/reviews/${of(club).draft.reviewId}`,
  by: 'coach',
  good: (club) => ({ version: 1, order: [of(club).draft.findingId], mainFocus: of(club).draft.findingId }),
  refused: writersOnly,
  nullable: ['mainFocus'],
});
attack(calls.deleteReview, {
  path: (club) => `/api/reviews/${of(club).draft.reviewId}?version=1`,
  by: 'coach',
  refused: writersOnly,
});
attack(calls.sendReview, {
  path: (club) => `/api/reviews/${of(club).draft.reviewId}/send`,
  by: 'coach',
  good: (club) => ({ version: 1, findings: [{ id: of(club).draft.findingId, version: 1 }] }),
  refused: writersOnly,
});
attack(calls.readReview, {
  path: (club) => `/api/reviews/${of(club).sent.reviewId}/read`,
  by: 'athlete',
  refused: { coach: 403, admin: 403, otherAthlete: 404, guardian: 403, foreignAthlete: 404 },
});
attack(calls.addFinding, {
  path: (club) => `/api/reviews/${of(club).draft.reviewId}/findings`,
  by: 'coach',
  good: (club) => ({
    id: randomUUID(),
    kind: 'good',
    words: 'A long reach on the left.',
    arm: 'left',
    phase: 'entry-and-catch',
    observationId: null,
    readings: [
      {
        kind: 'session',
        sessionId: of(club).draft.sessionId,
        arm: 'left',
        measure: 'verticalAt',
        split: 'all',
      },
    ],
  }),
  refused: writersOnly,
  nullable: ['observationId'],
});
attack(calls.updateFinding, {
  path: (club) => `/api/findings/${of(club).draft.findingId}`,
  by: 'coach',
  good: () => ({ version: 1, words: 'The right hand slips.' }),
  refused: writersOnly,
});
attack(calls.deleteFinding, {
  path: (club) => `/api/findings/${of(club).draft.findingId}?version=1`,
  by: 'coach',
  refused: writersOnly,
});
attack(calls.askQuestion, {
  path: (club) => `/api/findings/${of(club).sent.findingId}/questions`,
  by: 'athlete',
  good: () => ({ words: 'Is it the same on the left?', id: randomUUID() }),
  refused: { coach: 403, admin: 403, otherAthlete: 404, guardian: 403, foreignAthlete: 404 },
});
attack(calls.answerQuestion, {
  path: (club) => `/api/questions/${of(club).questionId}/answers`,
  by: 'coach',
  good: () => ({ words: 'In the palm and the forearm together.', id: randomUUID() }),
  refused: writersOnly,
});
