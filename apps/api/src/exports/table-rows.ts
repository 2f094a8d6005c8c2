import type {
  ExportBreath,
  ExportComparison,
  ExportSession,
  ExportTrend,
} from '@stillstroke/contract/export';
import { exportTables, type TableName } from '@stillstroke/contract/export-dictionary';
import { clipTableRow, eventRows, markRows, readingRows, strokeRows } from './clip-rows';
import type { Row } from './csv-text';
import type { ExportHead } from './export-parts';

type Rows = Partial<Record<TableName, readonly Row[]>>;

/** Rows that are there before any session. */
export function headRows({ format, exportedAt, scope, athlete }: ExportHead): Rows {
  const facts = {
    format: format.name,
    format_version: String(format.version),
    exported_at: exportedAt,
    scope: scope.kind,
    scope_id: scope.id,
    athlete_id: athlete.id,
    athlete_name: athlete.name,
  };
  return {
    about: Object.entries(facts).map(([key, value]) => ({ key, value })),
    dictionary: Object.values(exportTables).flatMap(({ file, columns }) =>
      columns.map(({ name, kind, unit, meaning }) => ({ file, column: name, kind, unit, meaning })),
    ),
  };
}

export function sessionRows(session: ExportSession): Rows {
  const { id, date, place, note, clips, comparison, breath } = session;
  return {
    sessions: [{ session_id: id, date, place, note }],
    clips: clips.map((clip) => clipTableRow(id, clip)),
    marks: clips.flatMap(markRows),
    readings: clips.flatMap(readingRows),
    events: clips.flatMap(eventRows),
    strokes: clips.flatMap(strokeRows),
    comparison: comparison.map((row) => comparisonCells(id, row)),
    breath: breath.map((row) => breathCells(id, row)),
  };
}

function comparisonCells(sessionId: string, row: ExportComparison): Row {
  return {
    session_id: sessionId,
    split: row.split,
    measure: row.measure,
    unit: row.unit,
    left_count: row.left.count,
    left_mean: row.left.mean,
    left_low: row.left.low,
    left_high: row.left.high,
    right_count: row.right.count,
    right_mean: row.right.mean,
    right_low: row.right.low,
    right_high: row.right.high,
    difference: row.difference,
    difference_low: row.low,
    difference_high: row.high,
    verdict: row.verdict,
    more_strokes: row.moreStrokes,
  };
}

function breathCells(sessionId: string, row: ExportBreath): Row {
  return {
    session_id: sessionId,
    arm: row.arm,
    measure: row.measure,
    unit: row.unit,
    breathing_count: row.breathing.count,
    breathing_mean: row.breathing.mean,
    breathing_low: row.breathing.low,
    breathing_high: row.breathing.high,
    others_count: row.others.count,
    others_mean: row.others.mean,
    others_low: row.others.low,
    others_high: row.others.high,
    difference: row.difference,
    difference_low: row.low,
    difference_high: row.high,
    verdict: row.verdict,
    more_strokes: row.moreStrokes,
  };
}

export function trendRows(trend: readonly ExportTrend[]): Rows {
  return {
    trend: trend.flatMap(({ measure, unit, view, arm, points }) =>
      points.map(({ sessionId, date, mean, uncertainty, count }) => ({
        measure,
        unit,
        view,
        arm,
        session_id: sessionId,
        date,
        mean,
        mean_u: uncertainty,
        count,
      })),
    ),
    change: trend.map(({ measure, unit, view, arm, change, low, high, detectable, verdict, slope }) => ({
      measure,
      unit,
      view,
      arm,
      change,
      change_low: low,
      change_high: high,
      detectable,
      verdict,
      slope_per_30_days: slope?.value ?? null,
      slope_low: slope?.low ?? null,
      slope_high: slope?.high ?? null,
      slope_robust: slope?.robust ?? null,
    })),
  };
}
