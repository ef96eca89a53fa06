import { beforeAll, describe, expect, it } from 'vitest'
import { distributionOf } from '#shared/estimates/estimate-at.ts'
import { fitUnitModel } from '#shared/estimates/fit-unit-model.ts'
import { forecast, spreadBy } from '#shared/estimates/forecast.ts'
import { prepareValues } from '#shared/estimates/prepared-values.ts'
import { idealWidth, makeKnownWorld } from './known-world.ts'

interface Judged {
  covered80: number
  covered95: number
  width: number
  ideal: number
}

/** One invented region, fitted from its values alone and judged at 200 places where the truth is known. */
function judge(seed: number): Judged {
  const world = makeKnownWorld(seed)
  const model = fitUnitModel(world.values, { quantity: 'T' })
  const values = prepareValues(world.values, 'T')
  const shown = world.places.map((place) =>
    distributionOf(spreadBy(forecast(values, model, place)!.components, model.spreadFactor)),
  )
  const share = (inside: (d: (typeof shown)[number], truth: number) => boolean): number =>
    shown.filter((d, i) => inside(d, world.truth[i]!)).length / shown.length
  return {
    covered80: share((d, truth) => truth >= d.low80 && truth <= d.high80),
    covered95: share((d, truth) => truth >= d.low95 && truth <= d.high95),
    width: shown.reduce((sum, d) => sum + d.high95 - d.low95, 0) / shown.length,
    ideal: idealWidth(world),
  }
}

const mean = (values: number[]): number => values.reduce((a, b) => a + b, 0) / values.length

describe('intervals in regions whose truth is known, seeds 1 to 20', () => {
  let judged: Judged[] = []

  beforeAll(() => {
    judged = Array.from({ length: 20 }, (_, i) => judge(i + 1))
  }, 120_000)

  it('cover the true field at 95 % about as often as they say', () => {
    const covered = mean(judged.map((j) => j.covered95))
    expect(covered).toBeGreaterThanOrEqual(0.88)
    expect(covered).toBeLessThanOrEqual(0.98)
  })

  it('cover the true field at 80 % about as often as they say', () => {
    const covered = mean(judged.map((j) => j.covered80))
    expect(covered).toBeGreaterThanOrEqual(0.73)
    expect(covered).toBeLessThanOrEqual(0.87)
  })

  it('fail badly in no region', () => {
    expect(Math.min(...judged.map((j) => j.covered95))).toBeGreaterThan(0.8)
  })

  it('are at most a quarter wider than kriging that knows the true variogram', () => {
    expect(mean(judged.map((j) => j.width)) / mean(judged.map((j) => j.ideal))).toBeLessThanOrEqual(1.25)
  })
})
