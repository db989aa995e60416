import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

/** Far beyond what any test takes alone: a loaded machine makes nothing wrong. */
const PATIENCE_MS = 60_000;

export default defineConfig({
  test: {
    projects: [
      {
        test: {
          name: 'unit',
          isolate: false, // pure: a file that changed what another sees would be a fault; loading all anew takes minutes
          include: ['packages/*/src/**/*.test.ts', 'apps/*/src/**/*.test.ts', 'scripts/**/*.test.ts'],
          setupFiles: ['tests/support/fast-check-seed.ts'],
          testTimeout: PATIENCE_MS,
        },
        resolve: { alias: { '@': fileURLToPath(new URL('./apps/mobile/src', import.meta.url)) } },
      },
      {
        test: {
          name: 'architecture',
          include: ['tests/architecture/**/*.test.ts'],
          testTimeout: PATIENCE_MS,
        },
      },
      {
        test: {
          name: 'reference',
          isolate: false,
          include: ['tests/reference/**/*.test.ts'],
          setupFiles: ['tests/support/fast-check-seed.ts'],
          testTimeout: PATIENCE_MS,
        },
      },
      {
        test: {
          name: 'api',
          isolate: false, // every file has a database and a server of its own; loading the program anew for each takes minutes
          include: ['tests/api/**/*.test.ts'],
          globalSetup: ['tests/support/postgres.ts'],
          setupFiles: ['tests/support/fast-check-seed.ts'],
          testTimeout: PATIENCE_MS,
          hookTimeout: PATIENCE_MS,
        },
      },
    ],
  },
});
