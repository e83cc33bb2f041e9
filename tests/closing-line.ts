import type { Reporter, TestModule } from 'vitest/node';

/** Ends a run with one plain line: how many tests passed, failed and were skipped. */
export default class ClosingLine implements Reporter {
  onTestRunEnd(modules: readonly TestModule[], errors: readonly unknown[]): void {
    const counts = { passed: 0, failed: errors.length, skipped: 0 };
    for (const module of modules) {
      // a file that fails before its tests are known holds none to count
      if (module.state() === 'failed' && [...module.children.allTests()].length === 0) counts.failed += 1;
      for (const test of module.children.allTests()) {
        const { state } = test.result();
        if (state === 'passed' || state === 'failed') counts[state] += 1;
        else counts.skipped += 1;
      }
    }
    const skipped = counts.skipped > 0 ? `, ${counts.skipped} skipped` : '';
    console.log(`\n${counts.passed} passed, ${counts.failed} failed${skipped}`);
  }
}
