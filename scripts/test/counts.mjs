import { existsSync, readFileSync } from 'node:fs';

/** How many tests a runner saw: `{passed, failed, skipped}`. A report that is missing counts as one failure. */
const missing = { passed: 0, failed: 1, skipped: 0 };

/** From vitest's JSON report (also what `ng test` writes). */
export function countVitest(path) {
  if (!existsSync(path)) return missing;
  const report = JSON.parse(readFileSync(path, 'utf8'));
  const brokenFiles = report.testResults.filter(
    (file) => file.status === 'failed' && file.assertionResults.every((test) => test.status !== 'failed'),
  ).length;
  return {
    passed: report.numPassedTests,
    failed: report.numFailedTests + brokenFiles,
    skipped: report.numPendingTests + report.numTodoTests,
  };
}

/** From Playwright's JSON report. */
export function countPlaywright(path) {
  if (!existsSync(path)) return missing;
  const { stats, errors } = JSON.parse(readFileSync(path, 'utf8'));
  return {
    passed: stats.expected + stats.flaky,
    failed: stats.unexpected + (stats.unexpected === 0 && errors.length > 0 ? errors.length : 0),
    skipped: stats.skipped,
  };
}

export function add(a, b) {
  return { passed: a.passed + b.passed, failed: a.failed + b.failed, skipped: a.skipped + b.skipped };
}
