import type { SignedInUser } from '@stillstroke/contract/auth';
import type { BreathComparison, MeasureComparison } from '@stillstroke/contract/comparison';
import type {
  ExportBreath,
  ExportComparison,
  ExportSession,
  ExportTrend,
} from '@stillstroke/contract/export';
import { snake, unitCode } from '@stillstroke/contract/export-dictionary';
import { trendMeasureSchema, type TrendMeasure } from '@stillstroke/contract/trend';
import { clips } from '@stillstroke/db/schema/film';
import { and, asc, eq, isNull } from 'drizzle-orm';
import type { ClipRow } from '../clips/clip-answer';
import { getComparison } from '../comparison/comparison.service';
import type { AppContext } from '../platform/context';
import { liveSession } from '../sessions/live-film';
import { getTrend } from '../trend/trend.service';
import { exportedClip } from './export-clip';

type Context = Pick<AppContext, 'db'>;

/**
 * A session with its clips as it leaves the product, all of one moment. One clip alone carries no comparison: that is of
 * the session.
 */
export function exportedSession(
  context: Context,
  user: SignedInUser,
  sessionId: string,
  onlyClipId?: string,
): ExportSession {
  const { db } = context;
  const { session } = liveSession(db, user, sessionId);
  const { id, date, place, note } = session;
  const rows = liveClips(context, sessionId).filter((row) => !onlyClipId || row.id === onlyClipId);
  return {
    id,
    date,
    place,
    note,
    clips: rows.map((row) => exportedClip(db, row)),
    ...(onlyClipId ? { comparison: [], breath: [] } : exportedComparison(context, user, sessionId)),
  };
}

/** Clips of a session that are not deleted, oldest first. */
export function liveClips({ db }: Context, sessionId: string): ClipRow[] {
  return db
    .select()
    .from(clips)
    .where(and(eq(clips.sessionId, sessionId), isNull(clips.deletedAt)))
    .orderBy(asc(clips.createdAt), asc(clips.id))
    .all();
}

function exportedComparison(
  context: Context,
  user: SignedInUser,
  sessionId: string,
): Pick<ExportSession, 'comparison' | 'breath'> {
  const { splits, breath } = getComparison(context, user, sessionId);
  return {
    comparison: Object.entries(splits).flatMap(([split, measures]) =>
      measures.map((compared) => comparisonRow(snake(split), compared)),
    ),
    breath: Object.entries(breath).flatMap(([arm, measures]) =>
      measures.map((compared) => breathRow(arm, compared)),
    ),
  };
}

function comparisonRow(split: string, compared: MeasureComparison): ExportComparison {
  const { measure, unit, left, right, difference, interval, verdict, moreStrokes } = compared;
  return {
    split,
    measure,
    unit: unitCode(unit),
    left: armMean(left),
    right: armMean(right),
    difference,
    low: interval?.low ?? null,
    high: interval?.high ?? null,
    verdict,
    moreStrokes,
  };
}

function breathRow(arm: string, compared: BreathComparison): ExportBreath {
  const { measure, unit, breathing, others, difference, interval, verdict, moreStrokes } = compared;
  return {
    arm,
    measure,
    unit: unitCode(unit),
    breathing: armMean(breathing),
    others: armMean(others),
    difference,
    low: interval?.low ?? null,
    high: interval?.high ?? null,
    verdict,
    moreStrokes,
  };
}

function armMean({ count, mean, interval }: BreathComparison['others']): ExportComparison['left'] {
  return { count, mean, low: interval?.low ?? null, high: interval?.high ?? null };
}

/** Every measure over the athlete's sessions, each arm. */
export function exportedTrend(context: Context, user: SignedInUser, athleteId: string): ExportTrend[] {
  return trendMeasureSchema.options.flatMap((measure) => trendOf(context, user, athleteId, measure));
}

function trendOf(
  context: Context,
  user: SignedInUser,
  athleteId: string,
  measure: TrendMeasure,
): ExportTrend[] {
  const { unit, view, arms } = getTrend(context, user, athleteId, { measure, stroke: 'full' });
  return arms.map(({ arm, points, change, interval, detectable, verdict, slope }) => ({
    measure,
    unit: unitCode(unit),
    view,
    arm,
    points: points.map(({ sessionId, date, mean, uncertainty, count }) => ({
      sessionId,
      date,
      mean,
      uncertainty,
      count,
    })),
    change,
    low: interval?.low ?? null,
    high: interval?.high ?? null,
    detectable,
    verdict,
    slope: slope && { value: slope.value, low: slope.low, high: slope.high, robust: slope.robust },
  }));
}
