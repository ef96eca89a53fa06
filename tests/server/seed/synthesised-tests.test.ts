import { describe, expect, it, vi } from 'vitest'
import type { AnalysisInputs, Series } from '#shared/hydraulics/analysis.ts'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import { readLog } from '#shared/readings/read.ts'
import type { LogReading } from '#shared/readings/model.ts'
import { unitById } from '#shared/quantities/units.ts'
import { alikeFrom, alikeUntil } from '../../../server/db/seed/records/alike.ts'
import {
  drawdownCurve,
  imagesOf,
  pumpingCurve,
  type Image,
  type Observed,
} from '../../../server/db/seed/records/drawdown.ts'
import { groundUnder } from '../../../server/db/seed/records/ground.ts'
import { demoRecords, makePlan } from '../../../server/db/seed/records/index.ts'
import { levelNoise } from '../../../server/db/seed/records/level-noise.ts'
import { openPart } from '../../../server/db/seed/records/open-part.ts'
import type { Design } from '../../../server/db/seed/records/test-design.ts'
import type { DemoFullTest, DemoSeries } from '../../../server/db/seed/records/types.ts'
import { draws } from '../../../server/db/seed/random.ts'
import { toLocal } from '../../../server/db/seed/island/frame.ts'

// Synthesis and fits of delayed drainage: slow on a machine that does other things too.
vi.setConfig({ testTimeout: 120_000 })

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
    screen: test.unit === 'TG' ? openPart(well, test.thicknessM, test.startLocal) : null,
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

  const found = accepted.flatMap((test) =>
    test.analyses.map((analysis, i) => ({ test, analysis, result: run(test, i), truth: truthOf(test) })),
  )
  const by = (method: string) => found.filter(({ analysis }) => analysis.method === method)

  it('gives back the hidden T and storage by the curves of its own unit', () => {
    expect([by('theis').length, by('leaky').length, by('unconfined').length].every((count) => count > 2)).toBe(true)
    const curves = [...by('theis'), ...by('leaky'), ...by('unconfined')]
    for (const { result, truth } of curves) expect(offBy(result.T!.value, truth.T)).toBeLessThan(0.06)
    for (const { result, truth } of curves) expect(offBy(result.S!.value, truth.storage)).toBeLessThan(0.12)
  })

  it('has the kind of storage that its unit gives, which estimates may use', () => {
    for (const { test, result } of [...by('theis'), ...by('leaky'), ...by('unconfined')])
      expect(result.storageClass).toBe(test.unit === 'TG' ? 'specific-yield' : 'elastic')
  })

  it('shows leakage and delayed drainage: a confined curve through all readings is off', () => {
    const all = { window: null, phase: 'pumping', afterDrainage: null } as const
    const misfit = (test: DemoFullTest, method: 'theis' | 'leaky' | 'unconfined', wellIds: string[]) =>
      analyse(method, inputsOf(test), { ...all, wellIds }).fit.rmse_m
    const near = (method: 'leaky' | 'unconfined') =>
      by(method).filter(({ test }) => test.faults.length === 0 && (test.conditions ?? '') === '')
    for (const method of ['leaky', 'unconfined'] as const) {
      const ratios = near(method)
        .slice(0, 5)
        .map(
          ({ test, analysis }) => misfit(test, 'theis', analysis.wellCodes) / misfit(test, method, analysis.wellCodes),
        )
      expect(Math.max(...ratios)).toBeGreaterThan(2)
    }
  })

  it('gives back T by the straight line and by recovery too', () => {
    expect(by('cooper-jacob').length).toBeGreaterThan(20)
    expect(by('recovery').length).toBeGreaterThan(20)
    for (const { result, truth } of [...by('cooper-jacob'), ...by('recovery')])
      expect(offBy(result.T!.value, truth.T)).toBeLessThan(0.1)
  })

  it('is told from a good one when its log drifts', () => {
    const drifting = full.filter(({ faults }) => faults.includes('drift'))
    expect(drifting.length).toBeGreaterThan(0)
    const firsts = found.filter(({ test, analysis }) => analysis === test.analyses[0])
    for (const test of drifting) {
      const clean = firsts.filter(({ test: other }) => other.faults.length === 0 && other.unit === test.unit)
      const worst = Math.max(...clean.map(({ result }) => result.fit.rmse_m))
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
  const makeObserved = (overrides: Partial<Observed> = {}): Observed => ({
    place: [30, 0],
    pumped: false,
    pumpedScreen: null,
    screen: null,
    ...overrides,
  })
  const under = (design: Design) => groundUnder(design, draws(1, 'ground'))
  const curve = (design: Design, images: Image[] = [], where = makeObserved()) =>
    drawdownCurve(design, under(design), images, where)

  it('is zero before the start, grows while pumping and falls afterwards', () => {
    for (const unit of ['TG', 'FL', 'BS'] as const) {
      const at = curve(makeDesign({ unit, storage: unit === 'TG' ? 0.1 : 2e-4 }))
      expect(at(-60)).toBe(0)
      expect(at(3_600)).toBeLessThan(at(86_400))
      expect(at(2 * 86_400)).toBeLessThan(at(86_400))
    }
  })

  it('is nothing on a stream, and twice its own on a barrier', () => {
    const midway = makeObserved({ place: [50, 0] })
    const image = (sign: 1 | -1): Image[] => [{ at: [100, 0], sign, kind: sign === 1 ? 'barrier' : 'stream' }]
    const alone = curve(makeDesign(), [], midway)(86_400)
    expect(curve(makeDesign(), image(-1), midway)(86_400)).toBeCloseTo(0, 12)
    expect(curve(makeDesign(), image(1), midway)(86_400)).toBeCloseTo(2 * alone, 12)
  })

  it('carries the turbulent loss in the pumped well only', () => {
    const lossless = makeDesign({ wellLoss: 0 })
    const pumped = makeObserved({ place: [0, 0], pumped: true })
    const loss = curve(makeDesign(), [], pumped)(86_400) - curve(lossless, [], pumped)(86_400)
    expect(loss).toBeCloseTo(3_000 * 0.01 ** 2, 6)
    expect(curve(makeDesign())(86_400)).toBe(curve(lossless)(86_400))
  })

  it('feels a boundary later the farther it is', () => {
    const design = makeDesign()
    const { real } = under(design)
    const free = pumpingCurve(design, real, [], makeObserved())
    const until = (x: number) =>
      alikeUntil(
        pumpingCurve(design, real, [{ at: [x, 0], sign: -1, kind: 'stream' }], makeObserved()),
        free,
        86_400,
        0.02,
      )
    expect(until(150)).toBeLessThan(until(300))
    expect(alikeUntil(free, free, 86_400, 0.02)).toBe(86_400)
  })

  it('leaves the confined curve of all storage early in the gravels, and late under a leaking clay', () => {
    const curves = (design: Design) => {
      const { real, plain } = under(design)
      return [real, plain].map((one) => pumpingCurve(design, one, [], makeObserved())) as [
        ReturnType<typeof pumpingCurve>,
        ReturnType<typeof pumpingCurve>,
      ]
    }
    const [drained, all] = curves(makeDesign())
    expect(drained(600)).toBeGreaterThan(1.5 * all(600))
    expect(alikeFrom(drained, all, 10 * 86_400, 0.02)).toBeLessThan(10 * 86_400)
    const [leaking, confined] = curves(makeDesign({ unit: 'FL', storage: 2e-4 }))
    expect(leaking(60) / confined(60)).toBeCloseTo(1, 2)
    expect(leaking(5 * 86_400)).toBeLessThan(0.9 * confined(5 * 86_400))
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
