import { beforeAll, describe, expect, it } from 'vitest'
import type { Analysis } from '#shared/contracts/analyses.ts'
import type { AnalysisInputs, Series } from '#shared/hydraulics/analysis.ts'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import { toSI } from '#shared/quantities/units.ts'
import { toDrawdown } from '#shared/readings/drawdown.ts'
import { readLog } from '#shared/readings/read.ts'
import { createServices } from '../../../server/api/services.ts'
import { seedAccounts } from '../../../server/db/seed/accounts.ts'
import { draws } from '../../../server/db/seed/random.ts'
import { demoRecords } from '../../../server/db/seed/records/index.ts'
import { openPart } from '../../../server/db/seed/records/open-part.ts'
import type { DemoAnalysis, DemoFullTest, DemoSeries } from '../../../server/db/seed/records/types.ts'
import { enterFullTest } from '../../../server/db/seed/write/full-test.ts'
import { writeGeography } from '../../../server/db/seed/write/geography.ts'
import { castOf } from '../../../server/db/seed/write/people.ts'
import { writeWell } from '../../../server/db/seed/write/wells.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion } from '../../support/domain.ts'

const tested = useApp()
/** The demo region is drawn from seed 1; which of its analyses are repeated, from seed 10. */
const records = demoRecords(1)
const HOW_MANY = 10

interface Chosen {
  test: DemoFullTest
  planned: DemoAnalysis
}

/** The first of each method in the order of the lots, then whatever comes next. */
function choose(): Chosen[] {
  const uniform = draws(10, 'recomputed analyses')
  const drawn = records.tests
    .filter((test): test is DemoFullTest => test.kind === 'constant-rate')
    .flatMap((test) => test.analyses.map((planned) => ({ test, planned })))
    .map((one) => ({ one, lot: uniform.uniform() }))
    .sort((a, b) => a.lot - b.lot)
    .map(({ one }) => one)
  const firsts = drawn.filter((one, i) => drawn.findIndex(({ planned }) => planned.method === one.planned.method) === i)
  return [...firsts, ...drawn.filter((one) => !firsts.includes(one))].slice(0, HOW_MANY)
}

const chosen = choose()
const tests = [...new Set(chosen.map(({ test }) => test))]
const wellIds = new Map<string, number>()
let analyst: SignedIn

beforeAll(async () => {
  await makeRegion(tested)
  const { db } = tested.deps.connection
  await seedAccounts(tested.deps, db)
  const cast = await castOf(db)
  const services = createServices(tested.deps)
  const unitIds = await writeGeography(services, cast, db, records)
  const codes = new Set(
    tests.flatMap(({ wellCode, observationWells }) => [wellCode, ...observationWells.map((w) => w.wellCode)]),
  )
  for (const well of records.wells.filter(({ code }) => codes.has(code)))
    wellIds.set(well.code, await writeWell(services, cast, records, well, unitIds))
  for (const test of tests) {
    const analysed = await enterFullTest(services, tested.deps.workers, cast, test, wellIds, unitIds)
    await analysed()
  }
  analyst = await tested.signIn('steward')
}, 120_000)

const wellOf = (code: string) => records.wells.find((well) => well.code === code)!

/** Drawdown of one log, read from its text again, without anything of the server. */
function seriesOf(test: DemoFullTest, { wellCode, text, mapping }: DemoSeries): Series {
  const observation = test.observationWells.find((well) => well.wellCode === wellCode)
  const well = wellOf(wellCode)
  const start = { instant: new Date(`${test.startLocal}:00-01:00`).toISOString(), zone: test.zone }
  const log = readLog(text, mapping, { start, events_s: test.rateSteps.map(({ startS }) => startS) })
  if (!log.ok) throw new Error(log.code)
  const level = { given_m: observation?.staticLevelM ?? test.staticLevelM }
  const found = toDrawdown(log.rows, mapping.value.quantity, level)
  if (!found.ok) throw new Error(found.code)
  const rows = [...found.readings].sort((a, b) => a.elapsed_s - b.elapsed_s)
  return {
    wellId: String(wellIds.get(wellCode)!),
    label: wellCode,
    role: observation ? 'observation' : 'pumped',
    distance_m: observation?.distanceM ?? 0,
    // A taped distance: known to a decimetre (common practice).
    distanceSd_m: observation ? 0.1 : 0,
    wellRadius_m: well.wellRadiusM,
    casingRadius_m: well.casingRadiusM,
    screen: test.unit === 'TG' ? openPart(well, test.thicknessM, test.startLocal) : null,
    elapsed_s: rows.map(({ elapsed_s }) => elapsed_s),
    drawdown_m: rows.map(({ drawdown_m }) => drawdown_m),
    included: rows.map(() => true),
  }
}

function inputsOf(test: DemoFullTest): AnalysisInputs {
  return {
    version: 1,
    rates: test.rateSteps.map(({ startS, rate }) => ({ start_s: startS, rate_m3_s: toSI(rate.value, rate.unit) })),
    rateError: 0.05,
    series: test.series.map((log) => seriesOf(test, log)),
    aquifer: test.aquifer,
    thickness_m: test.thicknessM,
    thicknessBasis: test.thicknessBasis,
    thicknessError: 0.1,
    streamDistance_m: null,
  }
}

async function storedAnalysis({ test, planned }: Chosen): Promise<Analysis> {
  const wellId = wellIds.get(test.wellCode)!
  const list = (await analyst.get(`/api/pumping-tests?wellId=${wellId}&limit=100`).expect(200)).body as {
    items: { id: number; startLocal: string }[]
  }
  const { id } = list.items.find(({ startLocal }) => startLocal.startsWith(test.startLocal))!
  const { items } = (await analyst.get(`/api/pumping-tests/${id}/analyses`).expect(200)).body as { items: Analysis[] }
  return items.find(({ method, label }) => method === planned.method && label === planned.label)!
}

/** Equal to nine digits: the server adds the readings up in another order at most. */
const digits = (value: number | undefined) => (value === undefined ? null : Number(value.toPrecision(9)))

describe('analyses of the demo region', () => {
  it.each(chosen.map((one) => [`${one.test.wellCode}, ${one.test.startLocal}, ${one.planned.label}`, one] as const))(
    'come out again from the raw log: %s',
    async (_name, one) => {
      const stored = await storedAnalysis(one)
      const { method, window, phase, afterDrainage, wellCodes } = one.planned
      const options = { wellIds: wellCodes.map((code) => String(wellIds.get(code)!)), window, phase, afterDrainage }
      const again = analyse(method, inputsOf(one.test), options)
      expect([again.T, again.S].map((p) => digits(p?.value))).toEqual(
        [stored.result.T, stored.result.S].map((p) => digits(p?.value)),
      )
      expect([again.T, again.S].map((p) => digits(p?.low))).toEqual(
        [stored.result.T, stored.result.S].map((p) => digits(p?.low)),
      )
      expect(again.fit.n).toBe(stored.result.fit.n)
      expect(again.storageClass).toBe(stored.result.storageClass)
      expect(stored.inputsChanged).toBe(false)
    },
  )

  it('are ten, of several methods and all units, leakage and delayed drainage among them', () => {
    expect(chosen).toHaveLength(HOW_MANY)
    const used = chosen.map(({ planned }) => planned.method)
    for (const method of ['leaky', 'unconfined', 'recovery']) expect(used).toContain(method)
    expect(new Set(chosen.map(({ test }) => test.unit)).size).toBe(3)
  })
})
