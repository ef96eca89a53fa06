import type { Estimate } from '#shared/contracts/estimates.ts'

export const makeContribution = (
  overrides: Partial<Estimate['contributions'][number]> = {},
): Estimate['contributions'][number] => ({
  valueId: 1,
  pumpingTestId: 11,
  wellId: 21,
  wellCode: 'V-0001',
  lon: -21.2,
  lat: -38.4,
  distanceM: 1_250,
  bearingDeg: 45,
  weight: 0.6,
  value: 1e-3,
  evidence: 'firm',
  year: 2011,
  ...overrides,
})

const unit = { id: 1, code: 'TG', name: 'Tarrow Gravels', kind: 'unconfined' as const }

/** T of 1e-2 m²/s, which is 864 m²/d, give or take a factor of ten in all. */
export const makeEstimate = (overrides: Partial<Estimate> = {}): Estimate => ({
  lon: -21.184,
  lat: -38.4172,
  x: 483_937,
  y: 5_747_878,
  epsg: 32727,
  units: [unit],
  unit,
  quantity: 'T',
  rule: 'isotropic',
  valueCount: 61,
  siteCount: 45,
  truth: { median: -2, low80: -2.3, high80: -1.7, low95: -2.5, high95: -1.5 },
  newTest: { median: -2, low80: -2.5, high80: -1.5, low95: -2.8, high95: -1.2 },
  contributions: [makeContribution(), makeContribution({ valueId: 2, wellCode: 'V-0002', weight: 0.4, value: 1e-2 })],
  secondOpinion: { value: 8e-3, ratio: 1.25 },
  excludedCount: 0,
  notes: [{ code: 'surrounded', severity: 'good', params: { n: 2 } }],
  support: 'well',
  supportBecause: [],
  crossValidation: {
    n: 61,
    meanError: 0.1,
    rmse: 0.3,
    coverage80: { inside: 50, n: 61, share: 50 / 61, meanWidth: 0.5 },
    coverage95: { inside: 57, n: 61, share: 57 / 61, meanWidth: Math.log10(5.2) },
  },
  variogram: { model: 'spherical', nugget: 0.01, partialSill: 0.05, rangeM: 4_100 },
  stream: { name: 'Tarrow', distanceM: 410 },
  dataVersion: 3,
  modelOutdated: false,
  ...overrides,
})
