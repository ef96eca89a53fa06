import { describe, expect, it } from 'vitest'
import { covarianceAt, gaussianField } from '../../../server/db/seed/fields/gaussian-field.ts'
import { headAt } from '../../../server/db/seed/fields/heads.ts'
import { aquiferCodes, fieldModels } from '../../../server/db/seed/fields/models.ts'
import { layersAt } from '../../../server/db/seed/fields/structure.ts'
import { makeTruth } from '../../../server/db/seed/fields/truth.ts'
import type { Point } from '../../../server/db/seed/island/frame.ts'
import { elevation } from '../../../server/db/seed/island/terrain.ts'
import { unitOf } from '../../../server/db/seed/island/units.ts'
import { fault } from '../../../server/db/seed/island/fault.ts'
import { draws } from '../../../server/db/seed/random.ts'

const SEEDS = Array.from({ length: 20 }, (_, i) => i + 1)
const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length

function placesOf(unit: 'TG' | 'FL' | 'BS', count: number): Point[] {
  const { uniform } = draws(7, `places/${unit}`)
  const places: Point[] = []
  while (places.length < count) {
    const at: Point = [uniform(-22_000, 22_000), uniform(-15_000, 15_000)]
    if (unitOf(unit).extent(...at) > 200) places.push(at)
  }
  return places
}

describe('draws', () => {
  it('are the same for a seed and a subject, and others for another', () => {
    const first = (seed: number, subject: string) => draws(seed, subject).uniform()
    expect(first(1, 'a')).toBe(first(1, 'a'))
    expect(new Set([first(1, 'a'), first(2, 'a'), first(1, 'b')]).size).toBe(3)
  })

  it('are normal with the mean and deviation asked for', () => {
    const { normal } = draws(1, 'normal')
    const values = Array.from({ length: 20_000 }, () => normal(3, 2))
    const centre = mean(values)
    expect(centre).toBeCloseTo(3, 1)
    expect(Math.sqrt(mean(values.map((value) => (value - centre) ** 2)))).toBeCloseTo(2, 1)
  })
})

describe('a Gaussian field', () => {
  const model = { mean: -2, sd: 0.4, range: 5_000 }
  // Two thousand pairs per lag, in places far apart on a plane: one realisation alone would scatter too much.
  const pairs = (distance: number) =>
    SEEDS.flatMap((seed) => {
      const field = gaussianField(seed, 'check', model)
      const { uniform } = draws(seed, `pairs/${distance}`)
      return Array.from({ length: 100 }, () => {
        const [x, y, angle] = [uniform(-2e5, 2e5), uniform(-2e5, 2e5), uniform(0, 2 * Math.PI)]
        return [field(x, y), field(x + distance * Math.cos(angle), y + distance * Math.sin(angle))] as const
      })
    })

  it.each([0, 250, 1_000, 2_500, 5_000, 15_000])('has the covariance of its model at %d m', (distance) => {
    const found = mean(pairs(distance).map(([a, b]) => (a - model.mean) * (b - model.mean)))
    // Standard error of a covariance from 2,000 independent pairs: sd²·√(1 + ρ²)/√2000, at most 0.032 sd².
    expect(Math.abs(found - covarianceAt(model, distance))).toBeLessThan(4 * 0.032 * model.sd ** 2)
  })

  it('has its mean, and the tails of a normal distribution', () => {
    const scores = pairs(0).map(([a]) => (a - model.mean) / model.sd)
    expect(Math.abs(mean(scores))).toBeLessThan(0.1)
    expect(Math.abs(mean(scores.map((score) => score ** 4)) - 3)).toBeLessThan(0.5)
  })

  it('is a plain function of place', () => {
    const once = gaussianField(1, 'check', model)
    once(5, 5)
    expect(once(1_234, -987)).toBe(gaussianField(1, 'check', model)(1_234, -987))
  })
})

describe('the layers', () => {
  const places = aquiferCodes.flatMap((unit) => placesOf(unit, 120))

  it('lie one under the other, below the ground, without overlapping', () => {
    for (const at of places) {
      let ceiling = elevation(...at)
      for (const { top, bottom } of layersAt(...at)) {
        expect(top).toBeLessThanOrEqual(ceiling + 1e-9)
        expect(top - bottom).toBeGreaterThan(1)
        ceiling = bottom
      }
    }
  })

  it('are exactly the units whose extent holds the place, shallow first', () => {
    for (const at of places) {
      const expected = (['TG', 'PC', 'FL', 'BS'] as const).filter((code) => unitOf(code).extent(...at) > 0)
      expect(layersAt(...at).map(({ unit }) => unit)).toEqual(expected)
    }
  })

  it('hold water: the gravels are partly full, confined heads stand above the top of the unit or at the ground', () => {
    for (const unit of aquiferCodes) {
      for (const at of placesOf(unit, 120)) {
        const layer = layersAt(...at).find((candidate) => candidate.unit === unit)!
        const head = headAt[unit](...at)
        expect(head).toBeLessThan(elevation(...at))
        expect(head).toBeGreaterThan(unit === 'TG' ? layer.bottom + 2 : layer.top)
      }
    }
  })
})

describe('the hidden truth', () => {
  const truth = makeTruth(1)

  it('is the same for the same seed and another for another', () => {
    const at: Point = [1_400, -1_820]
    expect(makeTruth(1).at('TG', 'T', ...at)).toBe(truth.at('TG', 'T', ...at))
    expect(makeTruth(2).at('TG', 'T', ...at)).not.toBe(truth.at('TG', 'T', ...at))
  })

  it('is null where the unit is absent, and for storage of the other class', () => {
    expect(truth.at('TG', 'T', -15_000, -5_000)).toBeNull()
    expect(truth.at('TG', 'S', 1_400, -1_820)).toBeNull()
    expect(truth.at('FL', 'Sy', 1_400, -1_820)).toBeNull()
    expect(truth.at('FL', 'S', 1_400, -1_820)).toBeGreaterThan(0)
  })

  it('gives K as T over the thickness of the unit', () => {
    const at: Point = [1_400, -1_820]
    const layer = layersAt(...at).find(({ unit }) => unit === 'FL')!
    const ratio = truth.at('FL', 'T', ...at)! / truth.at('FL', 'K', ...at)!
    expect(ratio).toBeCloseTo(layer.top - layer.bottom, 9)
  })

  it.each(aquiferCodes)('of %s has the mean and spread of its model, over seeds', (unit) => {
    const places = placesOf(unit, 40)
    const model = fieldModels[unit].T
    const values = SEEDS.flatMap((seed) => {
      const { at } = makeTruth(seed)
      return places.map((place) => Math.log10(at(unit, 'T', ...place)!))
    })
    // The unit is only a few ranges wide: the means of 20 realisations scatter by about sd/√20 at most.
    expect(Math.abs(mean(values) - model.mean)).toBeLessThan(0.9 * model.sd * (4 / Math.sqrt(20)))
    const spread = Math.sqrt(mean(values.map((value) => (value - model.mean) ** 2)))
    expect(spread / model.sd).toBeGreaterThan(0.85)
    expect(spread / model.sd).toBeLessThan(1.15)
  })

  it('jumps across the fault in the confined units and runs on in the gravels', () => {
    // Where the fault passes under the gravels; the two places are 60 m apart.
    const [x, y] = fault.line.find((point) => unitOf('TG').extent(...point) > 300)!
    const jump = (unit: 'FL' | 'TG') =>
      mean(
        SEEDS.map((seed) => {
          const { at } = makeTruth(seed)
          return Math.abs(Math.log10(at(unit, 'T', x - 30, y)! / at(unit, 'T', x + 30, y)!))
        }),
      )
    expect(jump('TG')).toBeLessThan(0.2)
    expect(jump('FL')).toBeGreaterThan(0.3)
  })
})
