import { defineConfig } from 'vitest/config';

/** Each kind of test has its own project, so that one kind can be run alone: `vitest run --project unit`. */
export default defineConfig({
  test: {
    environment: 'node',
    // Threads end with the run that is stopped; a process deep in a computation would go on for a while.
    pool: 'threads',
    maxWorkers: 2,
    allowOnly: false,
    passWithNoTests: false,
    projects: [
      {
        extends: true,
        test: { name: 'unit', include: ['shared/**/*.spec.ts', 'server/**/*.spec.ts'], testTimeout: 20_000 },
      },
      {
        extends: true,
        test: { name: 'reference', include: ['tests/reference/**/*.spec.ts'], testTimeout: 60_000 },
      },
      {
        extends: true,
        test: { name: 'properties', include: ['tests/properties/**/*.spec.ts'], testTimeout: 120_000 },
      },
      {
        extends: true,
        test: {
          name: 'api',
          include: ['tests/api/**/*.spec.ts'],
          globalSetup: ['tests/api/support/cluster-setup.ts'],
          testTimeout: 20_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'recovery',
          include: ['tests/recovery/**/*.spec.ts'],
          globalSetup: ['tests/api/support/cluster-setup.ts'],
          testTimeout: 60_000,
        },
      },
      {
        extends: true,
        test: {
          name: 'e2e',
          include: ['tests/e2e/**/*.spec.ts'],
          globalSetup: ['tests/e2e/support/set-up.ts', 'tests/api/support/cluster-setup.ts'],
          testTimeout: 60_000,
          hookTimeout: 60_000,
        },
      },
      {
        extends: true,
        test: { name: 'commands', include: ['tests/commands/**/*.spec.ts'], testTimeout: 60_000 },
      },
      {
        extends: true,
        test: { name: 'lint', include: ['tests/lint/**/*.spec.ts'], testTimeout: 60_000 },
      },
    ],
  },
});
