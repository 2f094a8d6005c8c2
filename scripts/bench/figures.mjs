/** The value below which a share of all values lies. */
export function quantile(values, share) {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.ceil(share * sorted.length) - 1)] ?? Number.NaN;
}

export const median = (values) => quantile(values, 0.5);
export const p95 = (values) => quantile(values, 0.95);

/** Median and p95 of the ratios of two lists that were measured pair by pair. */
export function pairedRatio(values, references) {
  const ratios = values.map((value, n) => value / references[n]);
  return { median: median(ratios), p95: p95(ratios) };
}

/** A table of texts with its columns aligned, numbers to the right. */
export function table(head, rows) {
  const all = [head, ...rows];
  const widths = head.map((_, column) => Math.max(...all.map((row) => row[column].length)));
  const line = (row) =>
    row.map((text, n) => (n === 0 ? text.padEnd(widths[n]) : text.padStart(widths[n]))).join('  ');
  return [line(head), widths.map((width) => '-'.repeat(width)).join('  '), ...rows.map(line)].join('\n');
}

export const ms = (value) => `${value.toFixed(value < 10 ? 1 : 0)} ms`;
export const times = (value) => `${value.toFixed(2)}×`;
