import * as calls from '@stillstroke/contract/stills';
import { attack } from '../platform/test-attack';
import type { TestClub } from '../platform/test-club';
import { placeReview, type PlacedReview } from '../reviews/test-reviews';

const placed = new WeakMap<TestClub, PlacedReview>();
function draft(club: TestClub): PlacedReview {
  const there = placed.get(club) ?? placeReview(club, 'draft');
  placed.set(club, there);
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

attack(calls.addStill, {
  path: (club) => `/api/findings/${draft(club).findingId}/stills`,
  by: 'coach',
  refused: writersOnly,
});
attack(calls.replaceStill, {
  path: (club) => `/api/stills/${draft(club).stillId}`,
  by: 'coach',
  refused: writersOnly,
});
attack(calls.updateStill, {
  path: (club) => `/api/stills/${draft(club).stillId}`,
  by: 'coach',
  good: () => ({ version: 1, words: 'The catch, right arm' }),
  refused: writersOnly,
});
attack(calls.deleteStill, {
  path: (club) => `/api/stills/${draft(club).stillId}?version=1`,
  by: 'coach',
  refused: writersOnly,
});
attack(calls.getStillPicture, {
  path: (club) => `/api/stills/${draft(club).stillId}/picture`,
  by: 'coach',
  // A picture in a draft is nothing that the athlete knows of.
  refused: {
    athlete: 404,
    otherCoach: 404,
    otherAthlete: 404,
    guardian: 404,
    foreignAdmin: 404,
    foreignCoach: 404,
    foreignAthlete: 404,
  },
});
