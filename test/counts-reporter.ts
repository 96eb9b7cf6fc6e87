import type { Reporter, TestModule } from 'vitest/node';

/** Closes a test run with one plain line of counts, for readers that are not people. */
export default class CountsReporter implements Reporter {
  onTestRunEnd(modules: readonly TestModule[]): void {
    const counts = { passed: 0, failed: 0, skipped: 0, pending: 0 };
    let broken = 0;
    for (const module of modules) {
      const tests = [...module.children.allTests()];
      for (const test of tests) counts[test.result().state]++;
      if (module.errors().length > 0) broken++;
    }
    const failed = counts.failed + broken;
    process.stdout.write(
      `\n${counts.passed} passed, ${failed} failed, ${counts.skipped + counts.pending} skipped\n`,
    );
  }
}
