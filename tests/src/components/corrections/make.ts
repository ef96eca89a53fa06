import type { CorrectionRecord } from '#shared/contracts/corrections.ts'
import type { OutsideSummary } from '#shared/contracts/outside-series.ts'
import type { WellWithCorrections } from '../../../../src/components/corrections/corrected-wells.ts'

const at = '2026-01-01T00:00:00.000Z'

export const makeOutside = (overrides: Partial<OutsideSummary> = {}): OutsideSummary => ({
  id: 2,
  quantity: 'air-pressure',
  label: 'Roof',
  fileName: 'baro.csv',
  rowCount: 49,
  takenCount: 48,
  firstS: -86_400,
  lastS: 86_400,
  lowest: 99e3,
  highest: 101e3,
  findings: [],
  by: 'Analyst',
  createdAt: at,
  rowVersion: 1,
  ...overrides,
})

export const makeRecord = (overrides: Partial<CorrectionRecord> = {}): CorrectionRecord => ({
  id: 5,
  settings: {
    version: 1,
    kind: 'barometric',
    seriesId: 2,
    efficiency: { from: 'readings', longestLagS: 0, lagStepS: 3600 },
  },
  wellIds: null,
  active: true,
  by: 'Analyst',
  changedAt: at,
  rowVersion: 3,
  ...overrides,
})

/** A well whose corrected readings lie a tenth of a metre under the measured ones. */
export const makeWell = (overrides: Partial<WellWithCorrections> = {}): WellWithCorrections => ({
  wellId: '7',
  label: 'OB-1',
  elapsed_s: [-3600, 0, 3600],
  drawdown_m: [0, 0, 1],
  included: [true, true, true],
  uncorrected_m: [0.1, 0.1, 1.1],
  corrections: [
    {
      kind: 'barometric',
      given: false,
      outside: 'Roof',
      record: {
        efficiency: 0.4,
        efficiencySd: 0.012,
        lag_s: 7200,
        explained: 0.96,
        antecedent_s: 172_800,
        readings: 96,
      },
      findings: [{ code: 'antecedent-short', severity: 'caution', params: { antecedent_s: 172_800, test_s: 345_600 } }],
    },
  ],
  ...overrides,
})
