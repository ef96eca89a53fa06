import { describe, expect, it, vi } from 'vitest'
import { headAt } from '../../../server/db/seed/fields/heads.ts'
import { toLocal } from '../../../server/db/seed/island/frame.ts'
import { inland } from '../../../server/db/seed/island/shape.ts'
import { unitOf } from '../../../server/db/seed/island/units.ts'
import { demoRecords, demoValues, makePlan } from '../../../server/db/seed/records/index.ts'
import type { DemoFullTest, DemoReportedTest } from '../../../server/db/seed/records/types.ts'
import { pumpingTestInput } from '#shared/contracts/pumping-tests.ts'
import { testChecklist } from '#shared/contracts/test-checklist.ts'
import { logMapping } from '#shared/contracts/reading-series.ts'

// A region takes seconds to make: slow on a machine that does other things too.
vi.setConfig({ testTimeout: 120_000 })

const plan = makePlan(1)
const records = demoRecords(1, plan)
const full = records.tests.filter((test): test is DemoFullTest => test.kind === 'constant-rate')
const reported = records.tests.filter((test): test is DemoReportedTest => test.kind === 'reported')
const wellOf = new Map(records.wells.map((well) => [well.code, well]))
const yearOf = (startLocal: string) => Number(startLocal.slice(0, 4))

describe('the demo records', () => {
  it('are the same for the same seed and others for another', () => {
    expect(demoRecords(1)).toEqual(records)
    expect(demoRecords(2).wells.map(({ lon }) => lon)).not.toEqual(records.wells.map(({ lon }) => lon))
  })

  it('hold at least 320 wells, 9 streams and 170 tests, 60 of them with readings', () => {
    expect(records.wells.length).toBeGreaterThanOrEqual(320)
    expect(records.streams.length).toBeGreaterThanOrEqual(9)
    expect(records.tests.length).toBeGreaterThanOrEqual(170)
    expect(full.length).toBeGreaterThanOrEqual(60)
    expect(records.units.map(({ name }) => name)).toEqual([
      'Tarrow Gravels',
      'Pellow Clay',
      'Fennick Limestone',
      'Brannet Sandstone',
    ])
    expect(records.boundaries.map(({ units }) => units)).toEqual([['FL', 'BS']])
  })

  it('say of every test with readings how it was run, older ones less, and nothing that the levels do not hold', () => {
    const checklists = full.map(({ checklist, startLocal }) => ({ ...testChecklist.parse(checklist), startLocal }))
    for (const list of checklists) {
      expect(list.dischargeMeasured).not.toBe('not-recorded')
      expect(list.disposalDistanceM).toBeGreaterThanOrEqual(50)
      expect(['none', 'not-recorded']).toContain(list.nearbyPumping)
      expect(['falling', 'rising']).not.toContain(list.staticTrend)
      expect(list.trendWatchedS === null).toBe(list.staticTrend !== 'steady')
    }
    const silent = checklists.filter(({ nearbyPumping }) => nearbyPumping === 'not-recorded')
    expect(silent.length).toBeGreaterThan(0)
    expect(Math.max(...silent.map(({ startLocal }) => yearOf(startLocal)))).toBeLessThan(2000)
  })

  it('span forty years', () => {
    const years = records.tests.map(({ startLocal }) => yearOf(startLocal))
    expect(Math.min(...years)).toBe(1985)
    expect(Math.max(...years)).toBeGreaterThanOrEqual(2024)
    expect(Math.max(...years)).toBeLessThanOrEqual(2025)
  })

  it('close every unit outline and keep streams and boundary inside the region', () => {
    const [west, south, east, north] = records.region.extent
    for (const { outline } of records.units) expect(outline[0]).toEqual(outline[outline.length - 1])
    const lines = [...records.units.map(({ outline }) => outline), ...records.streams.map(({ path }) => path)]
    for (const [lon, lat] of lines.flat()) {
      expect(lon > west && lon < east && lat > south && lat < north).toBe(true)
    }
  })
})

describe('the wells', () => {
  it('have codes without gaps, older ones first', () => {
    records.wells.forEach((well, i) => {
      expect(well.code).toBe(`V-${String(i + 1).padStart(4, '0')}`)
      expect(well.drilledYear).toBeGreaterThanOrEqual(records.wells[i - 1]?.drilledYear ?? 0)
    })
  })

  it('stand on the island, inside their unit', () => {
    for (const { lon, lat, unit } of records.wells) {
      const at = toLocal([lon, lat])
      expect(inland(...at)).toBeGreaterThan(0)
      expect(unitOf(unit).extent(...at)).toBeGreaterThan(0)
    }
  })

  it('are screened inside their unit, above their own depth, and show the unit’s water level', () => {
    for (const well of records.wells) {
      const at = toLocal([well.lon, well.lat])
      const pick = well.picks.find(({ unit }) => unit === well.unit)
      expect(well.screens.length).toBeGreaterThan(0)
      for (const { topM, bottomM } of well.screens) {
        expect(bottomM).toBeGreaterThan(topM)
        expect(bottomM).toBeLessThanOrEqual(well.depthM)
        if (pick) expect(topM).toBeGreaterThanOrEqual(pick.topM)
      }
      expect(well.groundElevationM + well.measuringPointM - well.staticDepthM).toBeCloseTo(headAt[well.unit](...at), 1)
      expect(well.staticDepthM).toBeLessThan(well.depthM)
    }
  })

  it('have picks in all three aquifers', () => {
    const picked = (unit: string) => records.wells.filter(({ picks }) => picks.some((pick) => pick.unit === unit))
    for (const unit of ['TG', 'FL', 'BS']) expect(picked(unit).length).toBeGreaterThan(60)
  })

  it('crowd round settlements and are nested in places', () => {
    const positions = records.wells.map(({ original }) => original)
    const near = (metres: number) =>
      positions.filter((a) => positions.some((b) => b !== a && Math.hypot(a.x - b.x, a.y - b.y) < metres))
    expect(near(2).length).toBeGreaterThanOrEqual(16)
  })

  it('are mostly published, some internal, a few under embargo, some relined', () => {
    const share = (test: (well: (typeof records.wells)[number]) => boolean) =>
      records.wells.filter(test).length / records.wells.length
    expect(share(({ visibility }) => visibility === 'published')).toBeGreaterThan(0.8)
    expect(share(({ visibility }) => visibility === 'internal')).toBeGreaterThan(0.05)
    expect(share(({ embargoUntil }) => embargoUntil !== null)).toBeGreaterThan(0)
    expect(share(({ screens }) => screens.length > 1)).toBeGreaterThan(0)
  })
})

describe('the tests', () => {
  it('are made at wells that exist by then, and are no more visible than these', () => {
    for (const test of records.tests) {
      const well = wellOf.get(test.wellCode)!
      expect(well.unit).toBe(test.unit)
      expect(well.drilledYear).toBeLessThanOrEqual(yearOf(test.startLocal))
      if (well.visibility === 'internal') expect(test.visibility).toBe('internal')
    }
  })

  it('have one to three observation wells in the same unit, at the distance that the positions show', () => {
    for (const test of full) {
      expect(test.observationWells.length).toBeGreaterThanOrEqual(1)
      expect(test.observationWells.length).toBeLessThanOrEqual(3)
      const { original: pumped } = wellOf.get(test.wellCode)!
      for (const { wellCode, distanceM } of test.observationWells) {
        const { original, unit } = wellOf.get(wellCode)!
        expect(unit).toBe(test.unit)
        expect(Math.abs(Math.hypot(original.x - pumped.x, original.y - pumped.y) - distanceM)).toBeLessThan(0.3)
      }
    }
  })

  it('can be entered as they are: the contract of a pumping test takes them', () => {
    for (const test of full) {
      const input = {
        wellId: 1,
        startLocal: test.startLocal,
        zone: test.zone,
        aquifer: test.aquifer,
        intervalBasis: 'screens',
        intervalTopM: null,
        intervalBottomM: null,
        units: [{ unitId: 1, share: 1, basis: 'single-unit' }],
        thicknessM: test.thicknessM,
        thicknessBasis: test.thicknessBasis,
        rateSteps: test.rateSteps,
        observationWells: test.observationWells.map(({ distanceM, staticLevelM }, i) => ({
          wellId: i + 2,
          distanceBasis: 'measured',
          distanceM,
          reason: null,
          staticLevelM,
        })),
        staticLevelM: test.staticLevelM,
        conditions: test.conditions,
        visibility: test.visibility,
      }
      expect(pumpingTestInput.safeParse(input).error?.issues ?? []).toEqual([])
      for (const { mapping } of test.series) expect(logMapping.safeParse(mapping).success).toBe(true)
    }
  })

  it('hold logs of every kind of trouble, and of every state of work', () => {
    const faults = new Set(full.flatMap((test) => test.faults))
    expect([...faults].sort()).toEqual(['drift', 'gap', 'sentinel', 'short', 'spikes'])
    expect(new Set(full.map(({ outcome }) => outcome))).toEqual(new Set(['adopted', 'submitted', 'returned', 'draft']))
    expect(full.filter(({ outcome }) => outcome === 'adopted').length).toBeGreaterThanOrEqual(50)
  })

  it('report values of four kinds, with the evidence and error that the rules give them', () => {
    expect(new Set(reported.map(({ basis }) => basis)).size).toBe(4)
    for (const { basis, evidence, values } of reported) {
      expect(evidence).toBe(basis === 'checked-report' ? 'fair' : 'slight')
      expect(values.map(({ quantity }) => quantity)).toContain(basis === 'slug-test' ? 'K' : 'T')
      for (const { value } of values) expect(value).toBeGreaterThan(0)
    }
  })
})

describe('the values of many seeds', () => {
  it('scatter about the truth as their errors say', () => {
    const scores = [1, 2, 3, 4, 5].flatMap((seed) => {
      const drawn = makePlan(seed)
      return demoValues(drawn).map(({ unit, quantity, at, log10, error }) => {
        const truth = drawn.truth.at(unit, quantity, ...at)
        return (log10 - Math.log10(truth!)) / error
      })
    })
    const centre = scores.reduce((sum, score) => sum + score, 0) / scores.length
    const spread = Math.sqrt(scores.reduce((sum, score) => sum + (score - centre) ** 2, 0) / scores.length)
    // About 1,400 independent scores: standard errors 0.027 and 0.019; reports are rounded to two figures.
    expect(Math.abs(centre)).toBeLessThan(0.11)
    expect(Math.abs(spread - 1)).toBeLessThan(0.08)
  })

  it('give every aquifer at least thirty values of T, from all three grades of evidence', () => {
    const values = demoValues(plan)
    for (const unit of ['TG', 'FL', 'BS']) {
      const own = values.filter((value) => value.unit === unit && value.quantity === 'T')
      expect(own.length).toBeGreaterThanOrEqual(30)
      expect(new Set(own.map(({ evidence }) => evidence)).size).toBe(3)
    }
  })
})
