/**
 * `npm test`: every test of every runner, with what they need installed and built first. Ends with one line that sums
 * them all; exit code 1 on any failure. `npm test -- node web` runs only the runners named.
 */
import { spawnSync } from 'node:child_process';
import { mkdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildIfStale } from './build.mjs';
import { ensureChromium } from './test/chromium.mjs';
import { add, countPlaywright, countVitest } from './test/counts.mjs';

const root = fileURLToPath(new URL('..', import.meta.url));
const reports = join(root, 'test-results', 'reports');

const runners = {
  node: {
    what: 'libraries, API, published checks',
    args: [
      'vitest',
      'run',
      '--reporter=default',
      '--reporter=json',
      `--outputFile.json=${join(reports, 'node.json')}`,
    ],
    count: countVitest,
  },
  web: {
    what: 'web app in Chromium',
    args: [
      'ng',
      'test',
      '--reporters=default',
      '--reporters=json',
      `--output-file=${join(reports, 'web.json')}`,
    ],
    count: countVitest,
  },
  browser: {
    what: 'frames of the nasty media in Chromium',
    args: ['playwright', 'test', '-c', 'test/browser/playwright.config.ts', '--reporter=list,json'],
    count: countPlaywright,
  },
  e2e: {
    what: 'the whole job in Chromium, against the started product',
    args: ['playwright', 'test', '-c', 'test/e2e/playwright.config.ts', '--reporter=list,json'],
    count: countPlaywright,
  },
};

function run(name, chromium) {
  const { what, args, count } = runners[name];
  console.log(`\n=== ${name}: ${what}`);
  const report = join(reports, `${name}.json`);
  const { status } = spawnSync('npx', ['--no-install', ...args], {
    cwd: root,
    stdio: 'inherit',
    env: {
      ...process.env,
      CHROME_BIN: chromium,
      PLAYWRIGHT_JSON_OUTPUT_NAME: report,
      NG_CLI_ANALYTICS: 'false',
    },
  });
  const counts = count(report);
  // A runner that says it failed has failed, whatever its report counts.
  return status !== 0 && counts.failed === 0 ? { ...counts, failed: 1 } : counts;
}

async function main() {
  const names = process.argv.slice(2);
  const unknown = names.filter((name) => !(name in runners));
  if (unknown.length > 0)
    throw new Error(`No such runner: ${unknown.join(', ')}. There are: ${Object.keys(runners).join(', ')}.`);
  rmSync(reports, { recursive: true, force: true });
  mkdirSync(reports, { recursive: true });
  const chromium = ensureChromium();
  await buildIfStale();
  let sum = { passed: 0, failed: 0, skipped: 0 };
  for (const name of names.length > 0 ? names : Object.keys(runners)) {
    const counts = run(name, chromium);
    console.log(`${name}: ${counts.passed} passed, ${counts.failed} failed, ${counts.skipped} skipped`);
    sum = add(sum, counts);
  }
  console.log(`\n${sum.passed} passed, ${sum.failed} failed, ${sum.skipped} skipped`);
  process.exitCode = sum.failed > 0 || sum.passed === 0 ? 1 : 0;
}

main().catch((error) => {
  console.error(error instanceof Error ? error.message : error);
  process.exitCode = 1;
});
