import type { Reporter, TestModule, TestCase } from 'vitest/node';

/** What could not run on this machine, and why; `notHere` in `not-here.ts` fills the note of a skipped test. */
function collect(modules: readonly TestModule[]): { passed: number; failed: number; skipped: TestCase[] } {
  let passed = 0;
  let failed = 0;
  const skipped: TestCase[] = [];
  for (const module of modules) {
    if (module.state() === 'failed' && [...module.children.allTests()].length === 0) failed += 1;
    for (const test of module.children.allTests()) {
      const { state } = test.result();
      if (state === 'passed') passed += 1;
      else if (state === 'failed') failed += 1;
      else skipped.push(test);
    }
  }
  return { passed, failed, skipped };
}

/** Ends a test run with what could not run, and with the one line that the CI run closes with. */
export default class ClosingLines implements Reporter {
  onTestRunEnd(modules: readonly TestModule[], errors: readonly unknown[]): void {
    const { passed, failed, skipped } = collect(modules);
    for (const test of skipped) {
      const result = test.result();
      const why = result.state === 'skipped' && result.note ? result.note : 'switched off';
      process.stdout.write(`Could not run here: ${test.fullName} (${why})\n`);
    }
    process.stdout.write(
      `${passed} passed, ${failed + errors.length} failed${skipped.length ? `, ${skipped.length} skipped` : ''}\n`,
    );
  }
}
