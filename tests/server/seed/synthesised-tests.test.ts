import { describe, expect, it } from 'vitest'
import type { AnalysisInputs, Series } from '#shared/hydraulics/analysis.ts'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import { readLog } from '#shared/readings/read.ts'
import type { LogReading } from '#shared/readings/model.ts'
import { unitById } from '#shared/quantities/units.ts'
import { drawdownAt, imagesOf, undisturbedUntil } from '../../../server/db/seed/records/drawdown.ts'
import { demoRecords, makePlan } from '../../../server/db/seed/records/index.ts'
import { levelNoise } from '../../../server/db/seed/records/level-noise.ts'
import type { Design } from '../../../server/db/seed/records/test-design.ts'
import type { DemoFullTest, DemoSeries } from '../../../server/db/seed/records/types.ts'
import { draws } from '../../../server/db/seed/random.ts'
import { toLocal } from '../../../server/db/seed/island/frame.ts'

const plan = makePlan(1)
const records = demoRecords(1, plan)
const full = records.tests.filter((test): test is DemoFullTest => test.kind === 'constant-rate')
const wellOf = new Map(records.wells.map((well) => [well.code, well]))

function readBack(test: DemoFullTest, { text, mapping }: DemoSeries): LogReading {
  const instant = new Date(Date.parse(`${test.startLocal}:00Z`) + 3_600_000).toISOString()
  const events_s = test.rateSteps.map(({ startS }) => startS)
  const read = readLog(text, mapping, { start: { instant, zone: test.zone }, events_s })
  if (!read.ok) throw new Error(`${read.code} ${JSON.stringify(read.params)}`)
  return read
}

function seriesOf(test: DemoFullTest, file: DemoSeries): Series {
  const well = wellOf.get(file.wellCode)!
  const observed = test.observationWells.find(({ wellCode }) => wellCode === file.wellCode)
  const level = observed?.staticLevelM ?? test.staticLevelM
  const rows = readBack(test, file).rows.filter(({ taken, flags }) => taken && !flags.includes('readings/spike'))
  const offset = file.mapping.value.quantity === 'depth' ? level : 0
  return {
    wellId: file.wellCode,
    label: file.wellCode,
    role: observed ? 'observation' : 'pumped',
    distance_m: observed?.distanceM ?? well.wellRadiusM,
    distanceSd_m: 0.1,
    wellRadius_m: well.wellRadiusM,
    casingRadius_m: well.casingRadiusM,
    elapsed_s: rows.map(({ elapsed_s }) => elapsed_s!),
    drawdown_m: rows.map(({ value_m }) => value_m! - offset),
    included: rows.map(() => true),
  }
}

const inputsOf = (test: DemoFullTest): AnalysisInputs => ({
  version: 1,
  rates: test.rateSteps.map(({ startS, rate }) => ({
    start_s: startS,
    rate_m3_s: rate.value * unitById(rate.unit).toSI,
  })),
  rateError: 0.05,
  series: test.series.map((file) => seriesOf(test, file)),
  aquifer: test.aquifer,
  thickness_m: test.thicknessM,
  thicknessBasis: test.thicknessBasis,
  thicknessError: 0.1,
  streamDistance_m: null,
})

function truthOf(test: DemoFullTest) {
  const well = wellOf.get(test.wellCode)!
  const found = plan.tests.find(({ site }) => {
    const [x, y] = toLocal([well.lon, well.lat])
    return Math.hypot(site.at[0] - x, site.at[1] - y) < 0.5
  })
  return found!.design
}

const run = (test: DemoFullTest, index: number) => {
  const { method, wellCodes, window, phase, afterDrainage } = test.analyses[index]!
  return analyse(method, inputsOf(test), { wellIds: wellCodes, window, phase, afterDrainage })
}

const offBy = (found: number, truth: number) => Math.abs(Math.log10(found / truth))

describe('a synthesised test', () => {
  const accepted = full.filter(({ outcome }) => outcome === 'adopted')

  it('is read back without a line lost', () => {
    for (const test of full) {
      for (const file of test.series) {
        const { summary, rows } = readBack(test, file)
        const sentinels = summary.counts['readings/sentinel'] ?? 0
        const lines = rows.filter(({ row, raw }) => row >= file.mapping.firstDataRow && raw.trim() !== '').length
        expect(summary.taken + sentinels).toBe(lines)
        if (test.faults.includes('sentinel') && file.wellCode !== test.wellCode) expect(sentinels).toBeGreaterThan(0)
      }
    }
  })

  it('gives back the hidden T and storage by the analysis put forward', () => {
    const offT: number[] = []
    const offS: number[] = []
    for (const test of accepted) {
      const { T, S } = run(test, 0)
      const truth = truthOf(test)
      offT.push(offBy(T!.value, truth.T))
      offS.push(offBy(S!.value, truth.storage))
    }
    expect(Math.max(...offT)).toBeLessThan(0.06)
    expect(Math.max(...offS)).toBeLessThan(0.12)
  })

  it('gives back T by the straight line and by recovery too', () => {
    const lines = accepted.flatMap((test) =>
      test.analyses.map((analysis, i) => ({ test, analysis, i })).filter(({ analysis }) => analysis.method !== 'theis'),
    )
    expect(lines.filter(({ analysis }) => analysis.method === 'cooper-jacob').length).toBeGreaterThan(25)
    expect(lines.filter(({ analysis }) => analysis.method === 'recovery').length).toBeGreaterThan(25)
    for (const { test, i } of lines) expect(offBy(run(test, i).T!.value, truthOf(test).T)).toBeLessThan(0.1)
  })

  it('is told from a good one when its log drifts', () => {
    const drifting = full.filter(({ faults }) => faults.includes('drift'))
    expect(drifting.length).toBeGreaterThan(0)
    for (const test of drifting) {
      const clean = accepted.filter(({ faults, unit }) => faults.length === 0 && unit === test.unit)
      const worst = Math.max(...clean.map((other) => run(other, 0).fit.rmse_m))
      expect(run(test, 0).fit.rmse_m).toBeGreaterThan(worst)
    }
  })
})

describe('synthetic drawdown', () => {
  const makeDesign = (overrides: Partial<Design> = {}): Design => ({
    unit: 'TG',
    at: [0, 0],
    T: 5e-3,
    storage: 0.1,
    thickness: 20,
    wellRadius: 0.1,
    rate: { value: 10, unit: 'L/s', m3s: 0.01 },
    pumping_s: 86_400,
    recovery_s: 86_400,
    observations: [],
    wellLoss: 3_000,
    ...overrides,
  })
  const observer = { place: [30, 0], pumped: false } as const

  it('is zero before the start, grows while pumping and falls afterwards', () => {
    const at = (time: number) => drawdownAt(makeDesign(), [], observer, time)
    expect(at(-60)).toBe(0)
    expect(at(3_600)).toBeLessThan(at(86_400))
    expect(at(2 * 86_400)).toBeLessThan(at(86_400))
  })

  it('is nothing on a stream, and twice its own on a barrier', () => {
    const image = { at: [100, 0], kind: 'stream' } as const
    const midway = { place: [50, 0], pumped: false } as const
    const alone = drawdownAt(makeDesign(), [], midway, 86_400)
    expect(drawdownAt(makeDesign(), [{ ...image, sign: -1 }], midway, 86_400)).toBeCloseTo(0, 12)
    expect(drawdownAt(makeDesign(), [{ ...image, sign: 1, kind: 'barrier' }], midway, 86_400)).toBeCloseTo(
      2 * alone,
      12,
    )
  })

  it('carries the turbulent loss in the pumped well only', () => {
    const lossless = makeDesign({ wellLoss: 0 })
    const pumped = { place: [0, 0], pumped: true } as const
    const loss = drawdownAt(makeDesign(), [], pumped, 86_400) - drawdownAt(lossless, [], pumped, 86_400)
    expect(loss).toBeCloseTo(3_000 * 0.01 ** 2, 6)
    expect(drawdownAt(makeDesign(), [], observer, 86_400)).toBe(drawdownAt(lossless, [], observer, 86_400))
  })

  it('feels a boundary later the farther it is', () => {
    const until = (x: number) =>
      undisturbedUntil(makeDesign(), [{ at: [x, 0], sign: -1, kind: 'stream' }], observer.place)
    expect(until(150)).toBeLessThan(until(300))
    expect(undisturbedUntil(makeDesign(), [], observer.place)).toBe(86_400)
  })

  it('has images only of boundaries that the unit knows', () => {
    const byFault = plan.tests.filter(({ design }) => imagesOf(design).some(({ kind }) => kind === 'barrier'))
    expect(byFault.length).toBeGreaterThan(0)
    expect(byFault.every(({ site }) => site.unit !== 'TG')).toBe(true)
    const byStream = plan.tests.filter(({ design }) => imagesOf(design).some(({ kind }) => kind === 'stream'))
    expect(byStream.length).toBeGreaterThan(0)
    expect(byStream.every(({ site }) => site.unit === 'TG')).toBe(true)
  })
})

describe('noise of levels', () => {
  it('remembers in a logger and forgets between dips', () => {
    const times = Array.from({ length: 20_000 }, (_, i) => i * 600)
    const correlation = (recorder: 'hand' | 'logger') => {
      const noise = levelNoise(draws(1, 'noise'), recorder, times)
      const variance = noise.reduce((sum, value) => sum + value * value, 0)
      return noise.slice(1).reduce((sum, value, i) => sum + value * noise[i]!, 0) / variance
    }
    expect(correlation('logger')).toBeCloseTo(Math.exp(-600 / 1_200), 1)
    expect(correlation('hand')).toBeCloseTo(0, 1)
  })
})
