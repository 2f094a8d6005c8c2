import { type Outcome, ok, refused } from '../outcome';
import { meanOf, sumOfSquares, total } from './sample';

/** Mean squares of a table of n things (rows) each read by the same k readers (columns). */
export interface MeanSquares {
  readonly between: number;
  readonly within: number;
  readonly readers: number;
  readonly error: number;
}

/** Intraclass correlations of Shrout and Fleiss (1979): single reader, then the mean of all k. */
export interface Intraclass {
  readonly meanSquares: MeanSquares;
  readonly icc11: number;
  readonly icc21: number;
  readonly icc31: number;
  readonly icc1k: number;
  readonly icc2k: number;
  readonly icc3k: number;
  /** √(error mean square): the standard error of measurement without the readers' offsets. Report this first. */
  readonly semConsistency: number;
  /** √(within mean square): with them. */
  readonly semAbsolute: number;
}

export type IntraclassReason = 'not-finite' | 'uneven-table' | 'too-few-values' | 'no-spread';

export function intraclass(table: readonly (readonly number[])[]): Outcome<Intraclass, IntraclassReason> {
  const n = table.length;
  const k = table[0]?.length ?? 0;
  if (n < 2 || k < 2) return refused('too-few-values');
  if (table.some((row) => row.length !== k)) return refused('uneven-table');
  const all = table.flat();
  if (!all.every(Number.isFinite)) return refused('not-finite');
  const grand = meanOf(all);
  const rowSquares = k * sumOfSquares(table.map(meanOf), grand);
  const columns = Array.from({ length: k }, (_, j) => meanOf(table.map((row) => row[j] ?? NaN)));
  const columnSquares = n * sumOfSquares(columns, grand);
  const withinSquares = total(table.map((row) => sumOfSquares(row, meanOf(row))));
  const between = rowSquares / (n - 1);
  const within = withinSquares / (n * (k - 1));
  const readers = columnSquares / (k - 1);
  const error = Math.max(0, withinSquares - columnSquares) / ((n - 1) * (k - 1));
  if (between === 0) return refused('no-spread');
  const offset = (readers - error) / n;
  return ok({
    meanSquares: { between, within, readers, error },
    icc11: (between - within) / (between + (k - 1) * within),
    icc21: (between - error) / (between + (k - 1) * error + k * offset),
    icc31: (between - error) / (between + (k - 1) * error),
    icc1k: (between - within) / between,
    icc2k: (between - error) / (between + offset),
    icc3k: (between - error) / between,
    semConsistency: Math.sqrt(error),
    semAbsolute: Math.sqrt(within),
  });
}
