import path from 'node:path';
import { defineConfig } from 'vitest/config';

const root = path.resolve(import.meta.dirname, '..');

export default defineConfig({
  root,
  test: {
    maxWorkers: 2,
    testTimeout: 30_000,
    hookTimeout: 120_000,
    projects: [
      {
        root,
        test: { name: 'domain', include: ['app/**/*.test.ts', 'fakes/**/*.test.ts', 'storage/**/*.test.ts'] },
      },
      {
        root,
        test: {
          name: 'features',
          include: ['tests/features/**/*.test.ts'],
          setupFiles: ['tests/setup/database.ts', 'tests/setup/no-console-errors.ts'],
          testTimeout: 60_000,
        },
      },
      {
        root,
        test: {
          name: 'routes',
          include: ['tests/routes/**/*.test.ts'],
          setupFiles: ['tests/setup/database.ts', 'tests/setup/no-console-errors.ts'],
          testTimeout: 60_000,
        },
      },
      {
        root,
        test: {
          name: 'e2e',
          include: ['tests/e2e/**/*.test.ts'],
          globalSetup: ['tests/setup/served-app.ts'],
          fileParallelism: false,
          testTimeout: 180_000,
        },
      },
    ],
  },
});
