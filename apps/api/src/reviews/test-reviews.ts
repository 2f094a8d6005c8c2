import { randomUUID } from 'node:crypto';
import { mkdirSync, writeFileSync } from 'node:fs';
import { findingMessages, findings, reviews, stills } from '@stillstroke/db/schema/review';
import { placeClip, placeSession } from '../media/test-films';
import type { TestClub } from '../platform/test-club';
import { picturePath, stillsFolder } from '../stills/still-store';

export interface PlacedReview {
  readonly sessionId: string;
  readonly clipId: string;
  readonly reviewId: string;
  readonly findingId: string;
  readonly stillId: string;
  readonly fileId: string;
}

/** A review of the athlete `own` by `coach` in the database: one finding, its main focus, with a still. */
export function placeReview({ context, ids }: TestClub, state: 'draft' | 'sent'): PlacedReview {
  const sessionId = placeSession(context, ids.athletes.own);
  const clipId = placeClip(context, ids.athletes.own, sessionId).id;
  const [reviewId, findingId, stillId, fileId] = [randomUUID(), randomUUID(), randomUUID(), randomUUID()];
  const at = '2026-03-03T18:00:00.000Z';
  context.db
    .insert(reviews)
    .values({
      id: reviewId,
      athleteId: ids.athletes.own,
      sessionId,
      authorId: ids.users.coach,
      state,
      createdAt: at,
      updatedAt: at,
      sentAt: state === 'sent' ? at : null,
    })
    .run();
  context.db
    .insert(findings)
    .values({
      id: findingId,
      reviewId,
      position: 0,
      kind: 'to-work-on',
      words: 'The right hand slips before it holds water.',
      arm: 'right',
      phase: 'pull',
      mainFocus: true,
      updatedAt: at,
    })
    .run();
  mkdirSync(stillsFolder(context.settings), { recursive: true });
  writeFileSync(picturePath(context.settings, fileId), `picture of ${fileId}`);
  context.db
    .insert(stills)
    .values({
      id: stillId,
      findingId,
      position: 0,
      fileId,
      layout: 'single',
      parts: JSON.stringify([{ clipId, frame: 12 }]),
      overlays: true,
      drawings: '[]',
      words: 'The catch',
      width: 640,
      height: 360,
    })
    .run();
  return { sessionId, clipId, reviewId, findingId, stillId, fileId };
}

/** A question of the athlete's under a finding. */
export function placeQuestion({ context, ids }: TestClub, findingId: string): string {
  const id = randomUUID();
  context.db
    .insert(findingMessages)
    .values({
      id,
      findingId,
      words: 'Should I feel it in the forearm?',
      authorId: ids.users.athlete,
      createdAt: '2026-03-04T06:00:00.000Z',
    })
    .run();
  return id;
}
