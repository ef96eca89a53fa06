import { Matrix, solve } from 'ml-matrix'
import { beforeAll, describe, expect, it } from 'vitest'
import { distributionOf } from '#shared/estimates/estimate-at.ts'
import { fitUnitModel } from '#shared/estimates/fit-unit-model.ts'
import { forecast, spreadBy } from '#shared/estimates/forecast.ts'
import { prepareValues } from '#shared/estimates/prepared-values.ts'
import type { SiteValue } from '#shared/estimates/types.ts'
import { covarianceAt } from '../../../server/db/seed/fields/gaussian-field.ts'
import type { AquiferCode } from '../../../server/db/seed/fields/models.ts'
import { aquiferCodes, fieldModels } from '../../../server/db/seed/fields/models.ts'
import { fault, faultBlock } from '../../../server/db/seed/island/fault.ts'
import type { Point } from '../../../server/db/seed/island/frame.ts'
import { HALF } from '../../../server/db/seed/island/frame.ts'
import { unitOf } from '../../../server/db/seed/island/units.ts'
import type { DemoValue } from '../../../server/db/seed/records/values.ts'
import { demoValues, makePlan } from '../../../server/db/seed/records/index.ts'
import { draws } from '../../../server/db/seed/random.ts'

const SEEDS = Array.from({ length: 20 }, (_, i) => i + 1)
const PLACES = 200
/** Every seed judges one aquifer in turn, seed 1 all three: sixty fits would take a minute and say no more. */
const unitsOf = (seed: number) => (seed === 1 ? aquiferCodes : [aquiferCodes[seed % 3]!])
const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length

function placesIn(unit: AquiferCode, seed: number): Point[] {
  const { uniform } = draws(seed, `asked/${unit}`)
  const places: Point[] = []
  while (places.length < PLACES) {
    const at: Point = [uniform(-HALF.x, HALF.x), uniform(-HALF.y, HALF.y)]
    if (unitOf(unit).extent(...at) > 0) places.push(at)
  }
  return places
}

const siteValue = ({ at, log10, error, evidence }: DemoValue, i: number): SiteValue => ({
  id: `v${i}`,
  testId: `t${i}`,
  wellId: `w${at.join('/')}`,
  label: `V ${i}`,
  x: at[0],
  y: at[1],
  log10,
  error,
  evidence,
  method: 'theis',
  origin: 'observation-well',
  year: 2010,
  storageClass: null,
  composite: false,
  apportioned: false,
  positionAccuracy_m: 1,
})

/** Covariance of the hidden field; the blocks of a faulted unit have nothing to do with each other. */
function trueCovariance(unit: AquiferCode, a: Point, b: Point): number {
  const apart = unit !== 'TG' && faultBlock(...a) !== faultBlock(...b)
  return apart ? 0 : covarianceAt(fieldModels[unit].T, Math.hypot(a[0] - b[0], a[1] - b[1]))
}

/** Width of the 95 % interval of log10 T by ordinary kriging with the true covariance and the values' known errors. */
function idealWidths(unit: AquiferCode, values: readonly DemoValue[], places: readonly Point[]): number[] {
  const n = values.length
  const system = Matrix.ones(n + 1, n + 1)
  values.forEach((a, i) =>
    values.forEach((b, j) => system.set(i, j, trueCovariance(unit, a.at, b.at) + (i === j ? a.error ** 2 : 0))),
  )
  system.set(n, n, 0)
  const right = Matrix.ones(n + 1, places.length)
  places.forEach((place, k) => values.forEach(({ at }, i) => right.set(i, k, trueCovariance(unit, at, place))))
  const weights = solve(system, right)
  const sill = fieldModels[unit].T.sd ** 2
  return places.map((_, k) => {
    const explained = weights.getColumnVector(k).dot(right.getColumnVector(k))
    return 2 * 1.959964 * Math.sqrt(sill - explained)
  })
}

interface Judged {
  covered80: boolean
  covered95: boolean
  width: number
  ideal: number
}

function judge(seed: number, unit: AquiferCode): Judged[] {
  const plan = makePlan(seed)
  const known = demoValues(plan).filter((value) => value.unit === unit && value.quantity === 'T')
  const places = placesIn(unit, seed)
  const barriers = unit === 'TG' ? [] : [fault.line]
  const sites = known.map(siteValue)
  const model = fitUnitModel(sites, { quantity: 'T', barriers })
  const prepared = prepareValues(sites, 'T')
  const ideal = idealWidths(unit, known, places)
  return places.flatMap((place, k) => {
    // Beyond the fault there may be too few values for any estimate.
    const made = forecast(prepared, model, { x: place[0], y: place[1] }, { barriers })
    if (!made) return []
    const shown = distributionOf(spreadBy(made.components, model.spreadFactor))
    const truth = Math.log10(plan.truth.at(unit, 'T', ...place)!)
    return {
      covered80: truth >= shown.low80 && truth <= shown.high80,
      covered95: truth >= shown.low95 && truth <= shown.high95,
      width: shown.high95 - shown.low95,
      ideal: ideal[k]!,
    }
  })
}

describe('estimates of the demo region, seeds 1 to 20, beside its hidden truth', () => {
  let judged: { seed: number; unit: AquiferCode; at: Judged[] }[] = []
  const all = () => judged.flatMap(({ at }) => at)
  const share = (test: (one: Judged) => boolean, among: Judged[]) => among.filter(test).length / among.length

  beforeAll(() => {
    judged = SEEDS.flatMap((seed) => unitsOf(seed).map((unit) => ({ seed, unit, at: judge(seed, unit) })))
    const first = judged.filter(({ seed }) => seed === 1)
    for (const { unit, at } of first) {
      const percent = (share(({ covered95 }) => covered95, at) * 100).toFixed(0)
      const wider = (mean(at.map(({ width }) => width)) / mean(at.map(({ ideal }) => ideal))).toFixed(2)
      process.stdout.write(
        `seed 1, ${unit}: 95 % intervals cover ${percent} %, ${wider} × as wide as with the true model\n`,
      )
    }
  }, 240_000)

  it('are given at nearly all places', () => {
    expect(all().length / (judged.length * PLACES)).toBeGreaterThan(0.95)
  })

  it('cover the truth in 88 to 98 % of the places by their 95 % intervals', () => {
    const covered = share(({ covered95 }) => covered95, all())
    expect(covered).toBeGreaterThanOrEqual(0.88)
    expect(covered).toBeLessThanOrEqual(0.98)
  })

  it('cover the truth about as often as they say by their 80 % intervals', () => {
    const covered = share(({ covered80 }) => covered80, all())
    expect(covered).toBeGreaterThanOrEqual(0.73)
    expect(covered).toBeLessThanOrEqual(0.87)
  })

  it.each(aquiferCodes)('are not far from honest in %s alone', (unit) => {
    const own = judged.filter((one) => one.unit === unit).flatMap(({ at }) => at)
    expect(share(({ covered95 }) => covered95, own)).toBeGreaterThan(0.85)
  })

  it('are at most a quarter wider than kriging with the true model', () => {
    const wider = mean(all().map(({ width }) => width)) / mean(all().map(({ ideal }) => ideal))
    expect(wider).toBeLessThanOrEqual(1.25)
  })
})
