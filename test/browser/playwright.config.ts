import { defineConfig } from '@playwright/test';

/** Tests of browser parts in a real Chromium, without the application around them. */
export default defineConfig({
  testDir: '.',
  testMatch: '**/*.spec.ts',
  outputDir: '../../test-results/browser',
  fullyParallel: false,
  workers: 1,
  timeout: 120_000,
  reporter: [['list'], ['json', { outputFile: '../../test-results/browser/report.json' }]],
  use: {
    browserName: 'chromium',
    launchOptions: {
      executablePath: process.env['CHROME_BIN'] ?? '/usr/bin/chromium',
      args: ['--no-sandbox', '--headless', '--disable-gpu', '--disable-background-networking'],
    },
  },
});
