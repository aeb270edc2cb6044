import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    // Generous, since no test is about time and a shared machine can be slow.
    testTimeout: 60_000,
    hookTimeout: 120_000,
    projects: [
      {
        extends: true,
        test: {
          name: 'unit',
          include: ['{shared,service,schema}/src/**/*.{test,spec}.ts', 'testdata/**/*.test.ts'],
          // Pure functions need no room of their own; loading the modules for every file took most of the time.
          isolate: false,
        },
      },
      { extends: true, test: { name: 'app', include: ['app/src/**/*.test.{ts,tsx}'], environment: 'jsdom' } },
      {
        extends: true,
        test: { name: 'architecture', include: ['tests/architecture/**/*.test.ts'], testTimeout: 120_000 },
      },
      { extends: true, test: { name: 'accuracy', include: ['tests/accuracy/**/*.test.ts'], testTimeout: 120_000 } },
      {
        extends: true,
        test: {
          name: 'integration',
          include: ['tests/{integration,anomaly}/**/*.test.ts'],
          globalSetup: 'tests/support/global-setup.ts',
          testTimeout: 60_000,
          hookTimeout: 120_000,
          sequence: { groupOrder: 1 },
        },
      },
      {
        extends: true,
        test: {
          name: 'browser',
          include: ['tests/browser/**/*.test.ts'],
          globalSetup: ['tests/support/global-setup.ts', 'tests/browser/support/global-setup.ts'],
          testTimeout: 180_000,
          hookTimeout: 180_000,
          fileParallelism: false,
          sequence: { groupOrder: 2 },
        },
      },
    ],
  },
});
