import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

/** Node-side tests: libraries, API, published checks. The web app's own specs run through `ng test`. */
export default defineConfig({
  resolve: { alias: { '@stillstroke': fileURLToPath(new URL('./libs', import.meta.url)) } },
  test: {
    include: ['libs/**/*.spec.ts', 'apps/api/**/*.spec.ts', 'test/**/*.spec.ts'],
    exclude: ['**/node_modules/**', 'test/e2e/**', 'test/browser/**'],
    pool: 'forks',
    testTimeout: 60_000,
    hookTimeout: 120_000,
  },
});
