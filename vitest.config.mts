import { defineConfig } from 'vitest/config';

const limits = { testTimeout: 60_000, hookTimeout: 120_000 };

export default defineConfig({
  test: {
    reporters: ['default', './test/support/plainReporter.ts'],
    projects: [
      {
        // Files share their workers' modules: none of them changes a module's state, and loading them anew takes half the time.
        test: {
          ...limits,
          name: 'unit',
          include: ['test/**/*.test.ts'],
          exclude: ['test/e2e/**'],
          isolate: false,
          // One fewer than the processors is the default, which of two leaves one idle.
          maxWorkers: '100%',
        },
      },
      {
        // After the others: a browser that has to share its processor clicks into pages that are not there yet.
        test: {
          ...limits,
          name: 'workbench',
          include: ['test/e2e/**/*.test.ts'],
          maxWorkers: 1,
          sequence: { groupOrder: 1 },
        },
      },
    ],
  },
});
