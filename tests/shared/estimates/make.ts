import type { EstimateContext, SiteValue, UnitModel } from '#shared/estimates/types.ts'
import type { CrossValidation } from '#shared/geostatistics/coverage.ts'
import { binomialTest } from '#shared/geostatistics/distributions.ts'
import type { Variogram } from '#shared/geostatistics/variogram.ts'

export function makeSiteValue(overrides: Partial<SiteValue> = {}): SiteValue {
  const id = overrides.id ?? 'v1'
  return {
    id,
    testId: `test of ${id}`,
    wellId: `well of ${id}`,
    label: `V-${id}`,
    x: 0,
    y: 0,
    log10: -2.5,
    error: 0.2,
    evidence: 'fair',
    method: 'theis',
    origin: 'observation-well',
    year: 2018,
    storageClass: null,
    composite: false,
    apportioned: false,
    positionAccuracy_m: 5,
    ...overrides,
  }
}

/** A square unit, 40 km wide, centred on the origin, with nothing near. */
export function makeContext(overrides: Partial<EstimateContext> = {}): EstimateContext {
  return {
    unit: { name: 'Tarrow Gravels', kind: 'unconfined', outline: [square(20_000)], byOutlineOnly: false },
    quantity: 'T',
    barriers: [],
    streams: [],
    yearNow: 2026,
    ...overrides,
  }
}

export const square = (half: number): [number, number][] => [
  [-half, -half],
  [half, -half],
  [half, half],
  [-half, half],
]

/** `n` values on a circle, all alike unless told otherwise. */
export function makeRing(n: number, radius: number, overrides: Partial<SiteValue> = {}): SiteValue[] {
  return Array.from({ length: n }, (_, i) => {
    const angle = (2 * Math.PI * i) / n
    const at = { x: radius * Math.cos(angle), y: radius * Math.sin(angle) }
    return makeSiteValue({ id: `r${radius}-${i}`, ...at, ...overrides })
  })
}

export function makeModel(overrides: Partial<UnitModel> = {}): UnitModel {
  const variogram: Variogram = overrides.variogram ?? { model: 'spherical', nugget: 0.01, sill: 0.1, range: 6000 }
  return {
    version: 1,
    quantity: 'T',
    rule: 'isotropic',
    n: 40,
    sites: 40,
    variogram,
    nodes: [{ weight: 1, variogram }],
    leastSquares: null,
    experimental: [],
    robust: [],
    errorsExceedScatter: false,
    assumedFrom: null,
    spreadFactor: 1,
    crossValidation: null,
    ...overrides,
  }
}

/** Cross-validation of `n` values of which `inside` fell into their 95 % interval. */
export function makeCrossValidation(n: number, inside: number): CrossValidation {
  const coverage = { inside, n, share: inside / n, p: binomialTest(inside, n, 0.95), meanWidth: 1 }
  const none = { meanError: 0, rmse: 0.3, standardisedMean: 0, standardisedDeviation: 1, residuals: [] }
  return { n, ...none, coverage80: coverage, coverage95: coverage }
}
