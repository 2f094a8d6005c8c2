import { randomUUID } from 'node:crypto';
import { rm } from 'node:fs/promises';
import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BodyOf } from '@stillstroke/contract/endpoint';
import type { AboutStill, Still, updateStill as updateCall } from '@stillstroke/contract/stills';
import { stills } from '@stillstroke/db/schema/review';
import { count, eq, max } from 'drizzle-orm';
import type { Request } from 'express';
import type { AppContext } from '../platform/context';
import { badField, changedMeanwhile, HttpProblem, notFound } from '../platform/problem';
import { touchFinding } from '../reviews/findings.service';
import { clipOf } from '../reviews/reading-stand';
import { findingInReach, refuseSent, stillInReach, type Reader } from '../reviews/review-reach';
import { makePicture, type MadePicture } from './make-picture';
import { receivePicture } from './receive-picture';
import { stillAnswer } from './still-answer';
import { dropPictures, keepPicture } from './still-store';

type Context = Pick<AppContext, 'db' | 'now' | 'settings'>;

const MOST_STILLS = 8;

/** Takes a picture in and puts it under a finding of a draft. */
export async function addStill(
  context: Context,
  user: SignedInUser,
  findingId: string,
  req: Request,
): Promise<Still> {
  const { db, now, settings } = context;
  // Before the first byte is read, and again once the picture is made.
  refuseSent(findingInReach(db, user, findingId).review);
  const { bytes, about } = await receivePicture(req);
  refuseForeign(db, findingInReach(db, user, findingId).athlete.id, about);
  const picture = await makePicture(settings, bytes);
  return kept(context, picture, () => {
    const { review, finding } = findingInReach(db, user, findingId);
    refuseSent(review);
    return db.transaction(
      (tx) => {
        const there = tx
          .select({ n: count(), last: max(stills.position) })
          .from(stills)
          .where(eq(stills.findingId, findingId))
          .get();
        if ((there?.n ?? 0) >= MOST_STILLS)
          throw new HttpProblem(
            409,
            'conflict',
            `A finding holds ${MOST_STILLS} pictures; take one away first.`,
          );
        keepPicture(settings, picture);
        const row = tx
          .insert(stills)
          .values({
            id: randomUUID(),
            findingId,
            position: (there?.last ?? -1) + 1,
            ...columns(about, picture),
          })
          .returning()
          .get();
        touchFinding(tx, finding, user, now());
        return stillAnswer(row);
      },
      { behavior: 'immediate' },
    );
  });
}

/** Puts another picture in the place of a still; the old one's file goes. */
export async function replaceStill(
  context: Context,
  user: SignedInUser,
  stillId: string,
  req: Request,
): Promise<Still> {
  const { db, now, settings } = context;
  refuseSent(stillInReach(db, user, stillId).review);
  const { bytes, about } = await receivePicture(req);
  if (about.version === undefined) throw badField('about.version', 'Say which version is replaced.');
  refuseForeign(
    db,
    stillInReach(db, user, stillId).athlete.id,
    about,
    stillInReach(db, user, stillId).still.parts,
  );
  const picture = await makePicture(settings, bytes);
  return kept(context, picture, () => {
    const { review, finding, still } = stillInReach(db, user, stillId);
    refuseSent(review);
    if (about.version !== still.version) throw changedMeanwhile('picture', stillAnswer(still));
    const replaced = db.transaction(
      (tx) => {
        keepPicture(settings, picture);
        const row = tx
          .update(stills)
          .set({ ...columns(about, picture), version: still.version + 1 })
          .where(eq(stills.id, stillId))
          .returning()
          .get();
        if (!row) throw notFound('picture');
        touchFinding(tx, finding, user, now());
        return stillAnswer(row);
      },
      { behavior: 'immediate' },
    );
    dropPictures(settings, [still.fileId]);
    return replaced;
  });
}

/** Changes the words under a still of a draft. */
export function updateStill(
  { db, now }: Context,
  user: SignedInUser,
  stillId: string,
  { version, words }: BodyOf<typeof updateCall>,
): Still {
  const { review, finding, still } = stillInReach(db, user, stillId);
  refuseSent(review);
  if (still.words === words) return stillAnswer(still);
  if (version !== still.version) throw changedMeanwhile('picture', stillAnswer(still));
  return db.transaction(
    (tx) => {
      const row = tx
        .update(stills)
        .set({ words, version: still.version + 1 })
        .where(eq(stills.id, stillId))
        .returning()
        .get();
      if (!row) throw notFound('picture');
      touchFinding(tx, finding, user, now());
      return stillAnswer(row);
    },
    { behavior: 'immediate' },
  );
}

/**
 * Takes a still out of a draft. Of a review that was sent only the picture goes, for good: whoever is in it may want it
 * gone, and the review says that there was one.
 */
export function deleteStill(
  { db, now, settings }: Context,
  user: SignedInUser,
  stillId: string,
  version: number,
): void {
  const { review, finding, still } = stillInReach(db, user, stillId);
  if (version !== still.version) throw changedMeanwhile('picture', stillAnswer(still));
  db.transaction(
    (tx) => {
      if (review.state === 'draft') {
        tx.delete(stills).where(eq(stills.id, stillId)).run();
        touchFinding(tx, finding, user, now());
      } else {
        const removedAt = still.removedAt ?? now().toISOString();
        tx.update(stills)
          .set({ fileId: null, removedAt, version: still.version + 1 })
          .where(eq(stills.id, stillId))
          .run();
      }
    },
    { behavior: 'immediate' },
  );
  dropPictures(settings, [still.fileId]);
}

/** The file of a still that may be seen, or 404. */
export function pictureOf({ db }: Pick<Context, 'db'>, user: SignedInUser, stillId: string): string {
  const { still } = stillInReach(db, user, stillId);
  if (still.fileId === null) throw notFound('picture');
  return still.fileId;
}

function columns(about: AboutStill, { fileId, width, height }: MadePicture) {
  const { layout, parts, overlays, drawings, words } = about;
  return {
    fileId,
    layout,
    parts: JSON.stringify(parts),
    overlays,
    drawings: JSON.stringify(drawings),
    words,
    width,
    height,
  };
}

/** A still is of this athlete's films and frames that they have. Parts that it had before may stay when their film is gone. */
function refuseForeign(db: Reader, athleteId: string, { parts }: AboutStill, before?: string): void {
  if (before === JSON.stringify(parts)) return;
  parts.forEach(({ clipId, frame }, at) => {
    const found = clipOf(db, athleteId, clipId);
    if (!found || frame >= found.clip.frameCount)
      throw badField(`about.parts.${at}`, 'There is no such frame in a film of this athlete.');
  });
}

/** Nothing of a picture stays on the disk unless it was entered. */
async function kept({ settings }: Context, picture: MadePicture, enter: () => Still): Promise<Still> {
  try {
    return enter();
  } catch (error) {
    dropPictures(settings, [picture.fileId]);
    throw error;
  } finally {
    await rm(picture.made, { force: true });
  }
}
