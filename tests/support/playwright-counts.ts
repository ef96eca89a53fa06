import { writeFileSync } from 'node:fs'
import type { Reporter, Suite, TestCase, TestError } from '@playwright/test/reporter'

/** Counts for `npm test`: a test that was skipped, or that passed at a second attempt only, has not passed. */
export default class PlaywrightCounts implements Reporter {
  private suite: Suite | undefined
  private readonly errors: string[] = []

  onBegin(_config: unknown, suite: Suite): void {
    this.suite = suite
  }

  onError(error: TestError): void {
    this.errors.push(`An error outside the tests: ${error.message ?? error.value ?? 'unknown'}`)
  }

  onEnd(): void {
    const tests = this.suite?.allTests() ?? []
    const complaints = [...tests.flatMap(complaintOf), ...this.errors]
    const passed = tests.filter((test) => complaintOf(test).length === 0).length
    const file = process.env.TEST_COUNTS
    if (file) writeFileSync(file, JSON.stringify({ passed, failed: complaints.length, complaints }))
  }
}

const words = { expected: '', unexpected: 'Failed', flaky: 'Passed only when tried again', skipped: 'Skipped' }

function complaintOf(test: TestCase): string[] {
  const word = words[test.outcome()]
  return word ? [`${word}: ${test.titlePath().filter(Boolean).join(' > ')}`] : []
}
