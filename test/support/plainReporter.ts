import type { Reporter, TestModule } from 'vitest/node';

/** Ends the run with a plain line of counts: `12 passed, 0 failed`. */
export default class PlainReporter implements Reporter {
  onTestRunEnd(modules: readonly TestModule[], errors: readonly unknown[]): void {
    const counts = { passed: 0, failed: errors.length, skipped: 0, pending: 0 };
    for (const module of modules) {
      if (module.errors().length > 0) counts.failed++;
      for (const test of module.children.allTests()) counts[test.result().state]++;
    }
    const skipped = counts.skipped + counts.pending;
    console.log(
      `${counts.passed} passed, ${counts.failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`,
    );
  }
}
