import type { Reporter, TestModule } from 'vitest/node';

/**
 * Prints one last line, `N passed, N failed`, after everything else has been written.
 * A suite that could not be loaded counts as a failure, and so does any other reason
 * for which the run ends with an exit code that is not zero.
 */
export class LastLineReporter implements Reporter {
  private isCounting = false;
  private passed = 0;
  private failed = 0;

  onTestRunEnd(modules: readonly TestModule[], unhandledErrors: readonly unknown[]): void {
    this.passed = 0;
    this.failed = unhandledErrors.length;
    for (const module of modules) {
      this.failed += module.errors().length;
      for (const suite of module.children.allSuites()) this.failed += suite.errors().length;
      for (const test of module.children.allTests()) {
        const state = test.result().state;
        if (state === 'passed') this.passed += 1;
        else if (state !== 'skipped') this.failed += 1;
      }
    }
    if (this.isCounting) return;
    this.isCounting = true;
    process.once('exit', (code) => {
      const failed = code !== 0 && this.failed === 0 ? 1 : this.failed;
      process.stdout.write(`\n${this.passed} passed, ${failed} failed\n`);
    });
  }
}
