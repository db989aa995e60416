import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    projects: [
      {
        test: {
          name: 'unit',
          include: ['packages/*/src/**/*.test.ts', 'apps/*/src/**/*.test.ts', 'scripts/**/*.test.ts'],
          setupFiles: ['tests/support/fast-check-seed.ts'],
        },
        resolve: { alias: { '@': fileURLToPath(new URL('./apps/mobile/src', import.meta.url)) } },
      },
      { test: { name: 'architecture', include: ['tests/architecture/**/*.test.ts'] } },
      {
        test: {
          name: 'reference',
          include: ['tests/reference/**/*.test.ts'],
          setupFiles: ['tests/support/fast-check-seed.ts'],
        },
      },
      {
        test: {
          name: 'api',
          include: ['tests/api/**/*.test.ts'],
          globalSetup: ['tests/support/postgres.ts'],
          setupFiles: ['tests/support/fast-check-seed.ts'],
          testTimeout: 20_000,
          hookTimeout: 60_000,
        },
      },
    ],
  },
});
