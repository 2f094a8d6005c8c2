import { type Outcome, ok, refused } from '../outcome';

/** Smaller than this against the largest column, a column depends on the others. */
const DEPENDENT = 1e-10;

/**
 * Least-squares solution of A·x = b (at least as many rows as columns) by Householder reflections; refused when the
 * columns depend on each other.
 */
export function leastSquares(
  a: readonly (readonly number[])[],
  b: readonly number[],
): Outcome<readonly number[], 'singular'> {
  const rows = a.map((row, i) => [...row, b[i] ?? 0]);
  const columns = a[0]?.length ?? 0;
  const scale = Math.max(...a.flat().map(Math.abs));
  if (rows.length < columns || !(scale > 0)) return refused('singular');
  for (let k = 0; k < columns; k += 1) {
    if (!reflect(rows, k, DEPENDENT * scale)) return refused('singular');
  }
  const x = new Array<number>(columns).fill(0);
  for (let k = columns - 1; k >= 0; k -= 1) {
    const row = rows[k] ?? [];
    const known = x.reduce((sum, value, j) => (j > k ? sum + (row[j] ?? 0) * value : sum), 0);
    x[k] = ((row[columns] ?? 0) - known) / (row[k] ?? NaN);
  }
  return ok(x);
}

/** Clears column k below the diagonal; false when nothing is left of it. */
function reflect(rows: number[][], k: number, smallest: number): boolean {
  const v = rows.map((row, i) => (i < k ? 0 : (row[k] ?? 0)));
  const norm = Math.hypot(...v);
  if (!(norm > smallest)) return false;
  v[k] = (v[k] ?? 0) + ((v[k] ?? 0) < 0 ? -norm : norm);
  const length = v.reduce((sum, value) => sum + value * value, 0);
  const width = rows[0]?.length ?? 0;
  for (let j = k; j < width; j += 1) {
    const along = rows.reduce((sum, row, i) => sum + (v[i] ?? 0) * (row[j] ?? 0), 0);
    for (const [i, row] of rows.entries()) row[j] = (row[j] ?? 0) - (2 * along * (v[i] ?? 0)) / length;
  }
  return true;
}
