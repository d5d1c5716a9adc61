import { defineConfig } from 'vitest/config';

const limits = { testTimeout: 60_000, hookTimeout: 120_000 };

export default defineConfig({
  test: {
    reporters: ['default', './test/support/plainReporter.ts'],
    projects: [
      {
        test: { ...limits, name: 'unit', include: ['test/**/*.test.ts'], exclude: ['test/e2e/**'] },
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
