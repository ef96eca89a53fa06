import type { AquiferCode } from '../fields/models.ts'
import { draws } from '../random.ts'
import type { PlannedReport, Plan } from './plan.ts'
import { region } from './geography.ts'
import { saturatedThickness } from './test-design.ts'
import type { DemoReportedTest, ReportBasis, StorageClass } from './types.ts'

type Value = DemoReportedTest['values'][number]

/** Evidence and error of log10 T by the kind of report (methods: evidence). */
const KINDS: Record<ReportBasis, { evidence: 'fair' | 'slight'; error: number; source: string }> = {
  'checked-report': { evidence: 'fair', error: 0.22, source: 'Pumping test report, data legible' },
  'specific-capacity': { evidence: 'slight', error: 0.35, source: 'Specific capacity from a driller’s log' },
  'slug-test': { evidence: 'slight', error: 0.4, source: 'Slug test sheet' },
  'bare-number': { evidence: 'slight', error: 0.4, source: 'Value in a table, test not described' },
}

const SETTING = { TG: 'unconfined', FL: 'leaky', BS: 'confined' } as const
export const settingOf = (unit: AquiferCode) => SETTING[unit]

/** Reports carry two figures, seldom more. */
const asReported = (value: number) => Number(value.toPrecision(2))

function storageValue(unit: AquiferCode, storage: number, noise: number): Value {
  const [error, storageClass]: [number, StorageClass] = unit === 'TG' ? [0.25, 'specific-yield'] : [0.35, 'elastic']
  const most = unit === 'TG' ? 0.32 : 0.005
  return {
    quantity: 'S',
    value: asReported(Math.min(most, storage * 10 ** (error * noise))),
    log10Error: error,
    storageClass,
  }
}

function valuesOf(plan: Plan, { site, basis }: PlannedReport, index: number): Value[] {
  const { normal, chance } = draws(plan.seed, `reported/${index}`)
  const { unit, at } = site
  const T = plan.truth.at(unit, 'T', ...at)
  const storage = plan.truth.at(unit, unit === 'TG' ? 'Sy' : 'S', ...at)
  if (T === null || storage === null) throw new RangeError('the unit is absent here')
  const { error } = KINDS[basis]
  const seen = T * 10 ** (error * normal())
  const base = { log10Error: error, storageClass: null }
  if (basis === 'slug-test') {
    return [{ ...base, quantity: 'K', value: asReported(seen / saturatedThickness(unit, at)) }]
  }
  const values: Value[] = [{ ...base, quantity: 'T', value: asReported(seen) }]
  const noise = normal()
  return basis === 'checked-report' && chance(0.55) ? [...values, storageValue(unit, storage, noise)] : values
}

/** A test of which only the values came down to us. */
export function makeReportedTest(plan: Plan, report: PlannedReport, index: number, wellCode: string): DemoReportedTest {
  const stream = draws(plan.seed, `report/${index}`)
  const { unit, at } = report.site
  const { evidence, source } = KINDS[report.basis]
  const day = `-${String(stream.whole(1, 12)).padStart(2, '0')}-${String(stream.whole(1, 28)).padStart(2, '0')}`
  return {
    kind: 'reported',
    wellCode,
    unit,
    aquifer: settingOf(unit),
    startLocal: `${report.year}${stream.chance(0.35) ? day : ''}`,
    zone: region.zone,
    thicknessM: Math.round(saturatedThickness(unit, at) * 10) / 10,
    thicknessBasis: unit === 'TG' ? 'saturated' : 'aquifer',
    conditions: null,
    visibility: stream.chance(0.88) ? 'published' : 'internal',
    embargoUntil: null,
    source: `${source}; water office archive, sheet ${100 + index}`,
    basis: report.basis,
    evidence,
    values: valuesOf(plan, report, index),
  }
}
