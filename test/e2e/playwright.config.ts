import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { defineConfig } from '@playwright/test';

/** The whole product, started as its README says, on a data folder of its own that begins empty. */
const port = 4390;
const root = fileURLToPath(new URL('../..', import.meta.url));
// Workers load this file too and must not make a folder each.
process.env['STILLSTROKE_E2E_DATA'] ??= mkdtempSync(join(tmpdir(), 'stillstroke-e2e-'));

export default defineConfig({
  testDir: '.',
  outputDir: join(root, 'test-results', 'e2e'),
  workers: 1,
  timeout: 180_000,
  expect: { timeout: 20_000 },
  use: {
    baseURL: `http://localhost:${port}`,
    viewport: { width: 1440, height: 900 },
    trace: 'retain-on-failure',
    launchOptions: {
      executablePath: process.env['CHROME_BIN'] ?? '/usr/bin/chromium',
      args: [
        '--no-sandbox',
        '--disable-gpu',
        '--disable-quic',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    },
  },
  webServer: {
    command: 'node scripts/start.mjs',
    cwd: root,
    url: `http://localhost:${port}/api/health`,
    timeout: 300_000,
    reuseExistingServer: false,
    stdout: 'pipe',
    gracefulShutdown: { signal: 'SIGTERM', timeout: 10_000 },
    env: { PORT: String(port), STILLSTROKE_DATA: process.env['STILLSTROKE_E2E_DATA'] ?? '' },
  },
});
