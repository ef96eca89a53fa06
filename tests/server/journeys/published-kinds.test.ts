import { beforeAll, describe, expect, it } from 'vitest'
import { useApp, type SignedIn } from '../../support/app.ts'
import { makeMapping, makeRegion, makeUnit, upload } from '../../support/domain.ts'
import reference from '../../reference/published-cases.json'
import { enterKind, logOf, makeSlugDetails, saveKind } from '../other-tests/support.ts'
import { publishedFile } from './enter-published.ts'

/** Steps and slugs from raw file to stored result, beside scipy (tests/reference/published-cases.py). */
const tested = useApp()
let analyst: SignedIn
let unitId: number

beforeAll(async () => {
  await makeRegion(tested)
  unitId = await makeUnit(tested, { kind: 'unconfined' })
  analyst = await tested.signIn('analyst')
})

const off = (found: number | null | undefined, expected: number) => Math.abs((found ?? NaN) / expected - 1)
const rows = ({ t, h }: { t: number[]; h: number[] }) => t.map((time, i) => [time, h[i] as number] as const)

describe('Six steps of Clark 1977 (synthetic from B and C of Kruseman & de Ridder, ILRI Publication 47; from memory)', () => {
  it('give B and C as numpy and linregress do, and cover C', async () => {
    const { t, s, starts, rates, stop, B, C, truth } = reference.steps
    const rateSteps = [
      ...starts.map((startS, i) => ({ startS, rate: { value: rates[i] as number, unit: 'm3/s' } })),
      { startS: stop, rate: { value: 0, unit: 'm3/s' } },
    ]
    const { id } = await enterKind(analyst, {
      unitId,
      details: { version: 1, kind: 'step' },
      input: { rateSteps },
      logs: [logOf(t.map((time, i) => [time, s[i] as number] as const))],
    })
    const { result } = await saveKind(analyst, id, 'step-linear', {})
    expect(off(result.extras.B, B)).toBeLessThan(1e-6)
    expect(off(result.extras.C, C)).toBeLessThan(1e-6)
    const loss = result.others?.find((other) => other.id === 'C')
    expect(loss!.low).toBeLessThan(truth.C)
    expect(loss!.high).toBeGreaterThan(truth.C)
  })
})

describe('The slug test near Dawsonville (Cooper, Bredehoeft & Papadopulos 1967, table 3; from memory)', () => {
  it('gives by the curve with storage what scipy gives, near the published 5.3 cm²/s', async () => {
    const radius = { casingRadiusM: 0.076, wellRadiusM: 0.076, screenRadiusM: 0.076 }
    const { id, test } = await enterKind(analyst, {
      unitId,
      details: makeSlugDetails({ ...radius, screenLengthM: 98, screenTopM: 15, radiusError: 0 }),
      input: { thicknessM: 98, thicknessError: 0 },
    })
    const mapping = makeMapping({ firstDataRow: 4, time: { kind: 'elapsed', column: 0, unit: 's', zero_s: 0 } })
    await upload(analyst, id, test.wells[0]!.id, publishedFile('dawsonville.csv'), mapping).expect(201)
    const options = { repeatIds: null, readingsPerCycle: null }
    const { result } = await saveKind(analyst, id, 'cooper-bredehoeft-papadopulos', options)
    expect(off(result.T?.value, reference.slugCurve.T)).toBeLessThan(1e-4)
    expect(off(result.S?.value, reference.slugCurve.S)).toBeLessThan(1e-2)
    expect(off(result.T?.value, 5.3e-4)).toBeLessThan(0.2)
  })
})

describe('The well of Bouwer & Rice 1976 (synthetic from its geometry and fall; from memory)', () => {
  it('gives K by their method as numpy does', async () => {
    const { rc, rw, L, depth, thickness } = reference.bouwerRice.well
    const { id } = await enterKind(analyst, {
      unitId,
      details: makeSlugDetails({
        casingRadiusM: rc,
        wellRadiusM: rw,
        screenRadiusM: rw,
        screenLengthM: L,
        screenTopM: depth - L,
      }),
      input: { aquifer: 'unconfined', thicknessM: thickness },
      logs: [logOf(rows(reference.bouwerRice))],
    })
    const { result } = await saveKind(analyst, id, 'bouwer-rice', { repeatIds: null })
    expect(result.fit.n).toBe(reference.bouwerRice.n)
    expect(off(result.K?.value, reference.bouwerRice.K)).toBeLessThan(1e-6)
  })
})

describe('A screen inside the aquifer (synthetic; case 8 of Hvorslev 1951)', () => {
  it('gives K by Hvorslev’s shape factor as numpy does', async () => {
    const { rc, R, L } = reference.hvorslev.well
    const { id } = await enterKind(analyst, {
      unitId,
      details: makeSlugDetails({
        casingRadiusM: rc,
        wellRadiusM: R,
        screenRadiusM: R,
        screenLengthM: L,
        screenTopM: 4,
      }),
      input: { thicknessM: 40 },
      logs: [logOf(rows(reference.hvorslev))],
    })
    const { result } = await saveKind(analyst, id, 'hvorslev', { repeatIds: null, shape: 'screen-in-aquifer' })
    expect(result.fit.n).toBe(reference.hvorslev.n)
    expect(off(result.K?.value, reference.hvorslev.K)).toBeLessThan(1e-6)
  })
})
