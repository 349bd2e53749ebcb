import type { Reporter, TestModule } from 'vitest/node'

/** Prints `N passed, N failed` alone on a line, so that a script can read the outcome without knowing the runner. */
export default class ClosingLine implements Reporter {
  onTestRunEnd(modules: readonly TestModule[], errors: readonly unknown[]): void {
    const counts = { passed: 0, failed: errors.length, skipped: 0, pending: 0 }
    for (const module of modules) {
      for (const test of module.children.allTests()) counts[test.result().state] += 1
      if (module.state() === 'failed' && [...module.children.allTests()].length === 0) counts.failed += 1
    }
    const skipped = counts.skipped > 0 ? `, ${counts.skipped} skipped` : ''
    process.stdout.write(`\n${counts.passed} passed, ${counts.failed} failed${skipped}\n`)
  }
}
