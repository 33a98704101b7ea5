/** A vitest reporter: one plain last line that tells how many tests passed and failed. */
export default class ClosingLine {
  onTestRunEnd(modules) {
    const count = { passed: 0, failed: 0, skipped: 0 };
    for (const module of modules) {
      const tests = [...module.children.allTests()];
      for (const test of tests) count[test.result().state] += 1;
      if (tests.length === 0 && module.state() === 'failed') count.failed += 1;
    }
    const skipped = count.skipped > 0 ? `, ${count.skipped} skipped` : '';
    console.log(`\n${count.passed} passed, ${count.failed} failed${skipped}`);
  }
}
