import type { OverviewValue, UnitFigures, UnitStatistics } from '#shared/contracts/unit-statistics.ts'

export const makeOverviewValue = (overrides: Partial<OverviewValue> = {}): OverviewValue => ({
  valueId: 5,
  wellId: 21,
  wellCode: 'V-0021',
  log10: -3,
  evidence: 'fair',
  group: 'curve',
  year: 1996,
  depthM: 30,
  robustZ: 0,
  normalScore: 0,
  tests: 1,
  ...overrides,
})

/** Seven wells about T of 1e-3 m²/s, which is 86.4 m²/d. */
export const makeFigures = (overrides: Partial<UnitFigures> = {}): UnitFigures => {
  const summary = { n: 7, mean: -3, median: -3, deviation: 0.5, p10: -3.6, p90: -2.4 }
  return {
    ...summary,
    sites: 6,
    least: -4,
    most: -2,
    declustered: { ...summary, mean: -3.2, cellSize: 4000 },
    meanIfIndependent: { low: -3.4, high: -2.6 },
    meanBySites: { low: -3.5, high: -2.5 },
    meanByKriging: null,
    evidence: { firm: 2, fair: 4, slight: 1 },
    ...overrides,
  }
}

export const makeStatistics = (overrides: Partial<UnitStatistics> = {}): UnitStatistics => ({
  unit: { id: 1, code: 'FL', name: 'Fennick Limestone', kind: 'confined' },
  quantity: 'T',
  figures: makeFigures(),
  values: [-4, -3.5, -3, -3, -3, -2.5, -2].map((log10, i) =>
    makeOverviewValue({
      valueId: i + 1,
      wellCode: `V-${i + 1}`,
      log10,
      normalScore: (i - 3) / 2,
      depthM: 10 * i,
      year: 1990 + i,
    }),
  ),
  outlierIds: [],
  methods: [{ group: 'curve', n: 7, mean: -3, fromCurves: null }],
  depth: null,
  year: null,
  excluded: 0,
  capacity: { pairs: [], regression: null },
  variogram: null,
  modelOutdated: false,
  ...overrides,
})
