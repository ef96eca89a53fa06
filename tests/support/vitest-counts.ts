import { writeFileSync } from 'node:fs'
import type { Reporter, TestCase, TestModule, TestSuite } from 'vitest/node'

/** Counts for `npm test`: a test that was skipped, or that passed at a second attempt only, has not passed. */
export default class VitestCounts implements Reporter {
  onTestRunEnd(modules: readonly TestModule[], unhandled: readonly unknown[]): void {
    const tests = modules.flatMap((module) => [...module.children.allTests()])
    const complaints = [
      ...tests.flatMap(complaintOf),
      ...modules.flatMap((module) => [module, ...module.children.allSuites()].flatMap(brokenSuite)),
      ...unhandled.map((error) => `An error outside the tests: ${messageOf(error)}`),
    ]
    const passed = tests.filter((test) => complaintOf(test).length === 0).length
    write({ passed, failed: complaints.length, complaints })
  }
}

const nameOf = (test: TestCase) => `${test.module.relativeModuleId} > ${test.fullName}`

function complaintOf(test: TestCase): string[] {
  const { state } = test.result()
  if (state !== 'passed') return [`${state === 'failed' ? 'Failed' : 'Skipped'}: ${nameOf(test)}`]
  return test.diagnostic()?.retryCount ? [`Passed only when tried again: ${nameOf(test)}`] : []
}

/** A file that does not load, or hooks that fail, have no test to blame. */
function brokenSuite(suite: TestModule | TestSuite): string[] {
  const name = suite.type === 'module' ? suite.relativeModuleId : suite.fullName
  return suite.errors().map((error) => `Outside its tests, in ${name}: ${error.message}`)
}

const messageOf = (error: unknown) => (error as { message?: string }).message ?? String(error)

function write(counts: { passed: number; failed: number; complaints: string[] }): void {
  const file = process.env.TEST_COUNTS
  if (file) writeFileSync(file, JSON.stringify(counts))
}
