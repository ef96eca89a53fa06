import { beforeAll, describe, expect, it } from 'vitest'
import { fromSI } from '#shared/quantities/units.ts'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeRegion, makeUnit } from '../../support/domain.ts'
import reference from '../../reference/published-cases.json'
import { enterPublished, publishedFile, storedResult, synthetic } from './enter-published.ts'

/**
 * Handbook tests from raw file to stored result, beside least squares of scipy on the same readings
 * (tests/reference/published-cases.py). Readings and published values are from memory; where no table could be recalled,
 * readings are synthetic from published figures, and the test says so.
 */
const tested = useApp()
let analyst: SignedIn
let unitId: number

beforeAll(async () => {
  await makeRegion(tested)
  unitId = await makeUnit(tested)
  analyst = await tested.signIn('analyst')
})

const off = (found: number | null | undefined, expected: number) => Math.abs((found ?? NaN) / expected - 1)
const rate = (value: number, unit = 'm3/d') => [{ startS: 0, rate: { value, unit } }]
const minutes = (name: string) => ({ text: publishedFile(name), unit: 'min' as const })

describe('Oude Korendijk, both piezometers (Kruseman & de Ridder, ILRI Publication 47; from memory)', () => {
  it('gives together what scipy gives, near the 370 to 480 m²/d of the handbook’s methods', async () => {
    const id = await enterPublished(analyst, {
      unitId,
      input: { rateSteps: rate(788) },
      observed: [
        { ...minutes('oude-korendijk.csv'), distanceM: 30 },
        { ...minutes('korendijk-90.csv'), distanceM: 90 },
      ],
    })
    const { T, S } = await storedResult(analyst, id, 'theis')
    const [expectedT = NaN, expectedS = NaN] = reference.twoPiezometers.parameters
    expect(off(T?.value, expectedT)).toBeLessThan(1e-6)
    expect(off(S?.value, expectedS)).toBeLessThan(1e-6)
    expect(fromSI(T!.value, 'm2/d')).toBeGreaterThan(370)
    expect(fromSI(T!.value, 'm2/d')).toBeLessThan(480)
  })
})

describe('Dalem, piezometer at 90 m (Kruseman & de Ridder, ILRI Publication 47; from memory)', () => {
  it('gives as a leaky aquifer what scipy gives, near the published 1,800 m²/d', async () => {
    const id = await enterPublished(analyst, {
      unitId,
      input: { aquifer: 'leaky', rateSteps: rate(761) },
      observed: [{ text: publishedFile('dalem-90.csv'), unit: 'd', distanceM: 90 }],
    })
    const { T, S, others } = await storedResult(analyst, id, 'leaky')
    const [expectedT = NaN, expectedS = NaN, expectedB = NaN] = reference.leaky.parameters
    expect(off(T?.value, expectedT)).toBeLessThan(1e-5)
    expect(off(S?.value, expectedS)).toBeLessThan(1e-5)
    expect(off(others?.find((other) => other.id === 'B')?.value, expectedB)).toBeLessThan(1e-5)
    expect(off(fromSI(T!.value, 'm2/d'), 1800)).toBeLessThan(0.15)
  })
})

describe('Vennebulten, piezometer at 90 m (Kruseman & de Ridder, ILRI Publication 47; from memory)', () => {
  it('gives with delayed drainage what scipy gives, near the published 1,500 m²/d, S 5.2e-4 and Sy 5e-3', async () => {
    const id = await enterPublished(analyst, {
      unitId,
      input: { aquifer: 'unconfined', thicknessM: reference.unconfined.thickness, rateSteps: rate(873) },
      observed: [{ ...minutes('vennebulten-90.csv'), distanceM: 90 }],
    })
    const { T, S, storageClass, others } = await storedResult(analyst, id, 'unconfined')
    const [expectedT = NaN, expectedS = NaN, expectedSy = NaN] = reference.unconfined.parameters
    expect(off(T?.value, expectedT)).toBeLessThan(1e-3)
    expect(off(S?.value, expectedSy)).toBeLessThan(1e-2)
    expect(off(others?.find((other) => other.id === 'S')?.value, expectedS)).toBeLessThan(1e-2)
    expect(storageClass).toBe('specific-yield')
    expect(off(fromSI(T!.value, 'm2/d'), 1500)).toBeLessThan(0.25)
  })
})

describe('Recovery after 240 minutes at 2,500 m³/d (Todd 1980; from memory)', () => {
  it('gives by the line on t/t′ what linregress gives, near the published 1,140 m²/d', async () => {
    const id = await enterPublished(analyst, {
      unitId,
      input: { rateSteps: [...rate(2500), { startS: 14_400, rate: { value: 0, unit: 'm3/d' } }] },
      observed: [{ ...minutes('todd-recovery.csv'), zero_s: 14_400, distanceM: 30 }],
    })
    const { T, fit } = await storedResult(analyst, id, 'recovery', { window: { from_s: 30, to_s: 12_000 } })
    expect(fit.n).toBe(reference.recovery.n)
    expect(off(T?.value, reference.recovery.T)).toBeLessThan(1e-9)
    expect(off(fromSI(T!.value, 'm2/d'), 1140)).toBeLessThan(0.05)
  })
})

describe('Gridley with a barrier (synthetic from the T and S published by Walton 1962)', () => {
  it('gives T, S and the distance of the barrier as scipy does, and covers what they were made from', async () => {
    const { t, s, r, parameters, truth } = reference.barrier
    const id = await enterPublished(analyst, {
      unitId,
      input: { rateSteps: rate(220, 'gpm-us') },
      observed: [{ ...synthetic(t, s), distanceM: r }],
    })
    const boundaries = [{ kind: 'barrier' as const, distance_m: null, bearing_deg: 0 }]
    const { T, S, others } = await storedResult(analyst, id, 'theis', { boundaries })
    const distance = others?.[0]
    const found = [T?.value, S?.value, distance?.value]
    found.forEach((value, k) => expect(off(value, parameters[k] as number)).toBeLessThan(1e-4))
    expect(T!.low).toBeLessThan(truth[0] as number)
    expect(T!.high).toBeGreaterThan(truth[0] as number)
    expect(distance!.low).toBeLessThan(truth[2] as number)
    expect(distance!.high).toBeGreaterThan(truth[2] as number)
  })
})

describe('A dug well (synthetic from the type curve of Papadopulos & Cooper 1967 for α of 1e-3)', () => {
  it('gives T from its own level as scipy does, early readings included', async () => {
    const { t, s, parameters, truth } = reference.storingWell
    const id = await enterPublished(analyst, {
      unitId,
      input: { rateSteps: rate(2, 'L/s') },
      pumped: { ...synthetic(t, s), well: { wellRadiusM: 1, casingRadiusM: 1 } },
    })
    const { T, S, extras } = await storedResult(analyst, id, 'large-diameter')
    expect(off(T?.value, parameters[0] as number)).toBeLessThan(1e-3)
    expect(off(extras.fitted_S, parameters[1] as number)).toBeLessThan(1e-2)
    expect(S).toBeNull()
    expect(T!.low).toBeLessThan(truth[0] as number)
    expect(T!.high).toBeGreaterThan(truth[0] as number)
  })
})
