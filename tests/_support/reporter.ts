import { writeFileSync } from 'node:fs'
import type { Reporter, TestModule } from 'vitest/node'

interface Counts {
  passed: number
  failed: number
  skipped: number
}

/** Ends a run with `N passed, N failed, N skipped` alone on the last line, or leaves the counts in `COUNTS_FILE`. */
export default class CountsReporter implements Reporter {
  onTestRunEnd(modules: readonly TestModule[], errors: readonly unknown[]): void {
    const counts = count(modules, errors)
    const file = process.env.COUNTS_FILE
    if (file) writeFileSync(file, JSON.stringify(counts))
    else process.once('exit', () => process.stdout.write(`${say(counts)}\n`))
  }
}

export function count(modules: readonly TestModule[], errors: readonly unknown[]): Counts {
  const counts = { passed: 0, failed: errors.length, skipped: 0 }
  for (const module of modules) {
    let failed = 0
    for (const test of module.children.allTests()) {
      const { state } = test.result()
      if (state === 'passed') counts.passed += 1
      else if (state === 'failed') failed += 1
      else counts.skipped += 1
    }
    // A file that could not be loaded, or whose set-up failed, has no failed test to show for it.
    counts.failed += failed === 0 && module.state() === 'failed' ? 1 : failed
  }
  return counts
}

export function say({ passed, failed, skipped }: Counts): string {
  return `${passed} passed, ${failed} failed, ${skipped} skipped`
}
