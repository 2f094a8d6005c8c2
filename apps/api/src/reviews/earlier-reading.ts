import {
  readingSourceSchema,
  readingStandSchema,
  type EarlierReading,
  type ReadingSource,
  type ReadingStand,
} from '@stillstroke/contract/review-readings';
import { findingReadings, findings, reviews } from '@stillstroke/db/schema/review';
import { sessionChange, type ChangeVerdict } from '@stillstroke/geometry/trend/change';
import { and, desc, eq, isNotNull, ne } from 'drizzle-orm';
import { standNow, type Standing } from './reading-stand';
import type { Reader, ReviewRow } from './review-reach';
import { targetWords } from './target-words';

/** How many readings that were sent before are looked through for the same measure. */
const LOOK_BACK = 400;

const verdicts: Readonly<Record<ChangeVerdict, EarlierReading['verdict']>> = {
  changed: 'changed',
  'not-more-than-marking-could-produce': 'not-more-than-marking',
  'not-more-than-strokes-vary': 'not-more-than-strokes-vary',
  'too-few': 'too-few',
};

/** Answers what readings of one review say now, set against the newest sent review that read the same. */
export class LiveReadings {
  private sent: readonly SentReading[] | null = null;

  constructor(
    private readonly db: Reader,
    private readonly review: Pick<ReviewRow, 'id' | 'athleteId'>,
  ) {}

  standOf(source: ReadingSource): ReadingStand {
    const stand = standNow(this.db, this.review.athleteId, source);
    const target = targetWords(this.db, this.review.athleteId, stand);
    return { ...stand, target, earlier: this.earlierOf(source, stand) };
  }

  /** Means of sessions alone are set against each other: single strokes and frames differ by chance. */
  private earlierOf(source: ReadingSource, stand: Standing): EarlierReading | null {
    if (source.kind !== 'session' || stand.value === null || stand.spread === null) return null;
    this.sent ??= sentReadings(this.db, this.review);
    const before = this.sent.find(
      (sent) =>
        sent.source.kind === 'session' &&
        sent.source.sessionId !== source.sessionId &&
        sent.source.arm === source.arm &&
        sent.source.measure === source.measure &&
        sent.source.split === source.split &&
        sent.stand.view === stand.view &&
        (sent.stand.date ?? '') <= (stand.date ?? ''),
    );
    const then = before?.stand;
    if (!before || !then?.date || then.value === null || then.uncertainty === null || !then.spread)
      return null;
    const change = sessionChange(
      { ...then.spread, mean: then.value, uncertainty: then.uncertainty },
      { ...stand.spread, mean: stand.value, uncertainty: stand.uncertainty ?? 0 },
    );
    if (!change.ok) return null;
    return {
      reviewId: before.reviewId,
      date: then.date,
      value: then.value,
      uncertainty: then.uncertainty,
      change: change.value.change,
      verdict: verdicts[change.value.verdict],
    };
  }
}

interface SentReading {
  readonly reviewId: string;
  readonly source: ReadingSource;
  readonly stand: ReadingStand;
}

function sentReadings(db: Reader, review: Pick<ReviewRow, 'id' | 'athleteId'>): SentReading[] {
  return db
    .select({ reviewId: reviews.id, source: findingReadings.source, frozen: findingReadings.frozen })
    .from(reviews)
    .innerJoin(findings, eq(findings.reviewId, reviews.id))
    .innerJoin(findingReadings, eq(findingReadings.findingId, findings.id))
    .where(
      and(
        eq(reviews.athleteId, review.athleteId),
        ne(reviews.id, review.id),
        eq(reviews.state, 'sent'),
        isNotNull(findingReadings.frozen),
      ),
    )
    .orderBy(desc(reviews.sentAt), desc(reviews.id))
    .limit(LOOK_BACK)
    .all()
    .map(({ reviewId, source, frozen }) => ({
      reviewId,
      source: readSource(source),
      stand: readStand(frozen ?? 'null'),
    }));
}

/** Kept JSON is ours; it is checked all the same, so that a damaged row is an error and not a wrong number. */
export const readSource = (text: string): ReadingSource => readingSourceSchema.parse(JSON.parse(text));
export const readStand = (text: string): ReadingStand => readingStandSchema.parse(JSON.parse(text));
