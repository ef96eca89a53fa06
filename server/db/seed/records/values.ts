import type { AquiferCode } from '../fields/models.ts'
import type { TruthQuantity } from '../fields/truth.ts'
import type { Point } from '../island/frame.ts'
import { draws } from '../random.ts'
import type { Plan, PlannedTest } from './plan.ts'
import { makeReportedTest } from './reported.ts'
import { saturatedThickness } from './test-design.ts'

/** One value of a test as the regional table would hold it, without readings and analyses behind it. */
export interface DemoValue {
  unit: AquiferCode
  quantity: TruthQuantity
  at: Point
  log10: number
  /** Standard deviation of the error of log10. */
  error: number
  evidence: 'firm' | 'fair' | 'slight'
}

/** Errors of a test with observation wells (methods: evidence, firm). */
const FIRM = { T: 0.1, S: 0.2, Sy: 0.15 } as const

function testValues(seed: number, { site, design }: PlannedTest, index: number): DemoValue[] {
  const { normal } = draws(seed, `values/${index}`)
  const storage = site.unit === 'TG' ? 'Sy' : 'S'
  const base = { unit: site.unit, at: site.at, evidence: 'firm' } as const
  return [
    { ...base, quantity: 'T', log10: Math.log10(design.T) + FIRM.T * normal(), error: FIRM.T },
    { ...base, quantity: storage, log10: Math.log10(design.storage) + FIRM[storage] * normal(), error: FIRM[storage] },
  ]
}

function reportValues(plan: Plan): DemoValue[] {
  return plan.reports.flatMap((report, i) => {
    const { unit, evidence, values } = makeReportedTest(plan, report, i, '')
    return values.map(({ quantity, value, log10Error }): DemoValue => {
      const { at } = report.site
      const base = { unit, at, error: log10Error, evidence }
      if (quantity === 'K') return { ...base, quantity: 'T', log10: Math.log10(value * saturatedThickness(unit, at)) }
      return { ...base, quantity: quantity === 'S' && unit === 'TG' ? 'Sy' : quantity, log10: Math.log10(value) }
    })
  })
}

/**
 * The values of a demo region for a seed: truth plus the error that each kind of evidence has. Quick, so that
 * estimates can be judged over many seeds; tests that were never accepted give none.
 */
export function demoValues(plan: Plan): DemoValue[] {
  const accepted = plan.tests.flatMap((test, i) => (test.outcome === 'adopted' ? testValues(plan.seed, test, i) : []))
  return [...accepted, ...reportValues(plan)]
}
