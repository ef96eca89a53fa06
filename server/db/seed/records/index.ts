import { makeFullTest } from './full-test.ts'
import { makeBoundaries, makeStreams, makeUnits, region } from './geography.ts'
import type { Plan } from './plan.ts'
import { makePlan } from './plan.ts'
import { makeReportedTest } from './reported.ts'
import type { DemoRecords, DemoReportedTest, DemoTest, DemoWell } from './types.ts'
import { buildWells } from './wells.ts'

export { demoValues } from './values.ts'
export { makePlan } from './plan.ts'

/** A test is never more visible than its well. */
const noMoreVisible = (test: DemoReportedTest, { visibility, embargoUntil }: DemoWell): DemoReportedTest => {
  if (visibility === 'internal') return { ...test, visibility }
  return test.visibility === 'internal' ? test : { ...test, embargoUntil }
}

/**
 * Everything the demo region is filled with, for a seed: plain data, the same at every call. Wells are in order of
 * their codes, tests in order of their start.
 */
export function demoRecords(seed: number, plan: Plan = makePlan(seed)): DemoRecords {
  const { wells, participants, wellAt } = buildWells(plan)
  const full = plan.tests.map((test, i) => makeFullTest(seed, test, i, participants[i]!))
  const reported = plan.reports.map((report, i) => {
    const well = wellAt(report.site)
    return noMoreVisible(makeReportedTest(plan, report, i, well.code), well)
  })
  const tests: DemoTest[] = [...full, ...reported].sort((a, b) => a.startLocal.localeCompare(b.startLocal))
  return {
    region,
    units: makeUnits(),
    streams: makeStreams(),
    boundaries: makeBoundaries(),
    wells,
    tests,
  }
}
