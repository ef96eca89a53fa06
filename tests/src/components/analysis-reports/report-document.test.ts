import { describe, expect, it } from 'vitest'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import ReportDocument from '../../../../src/components/analysis-reports/ReportDocument.vue'
import { makeTestInputs } from '../../../shared/charts/make-plot.ts'
import { mountWith, settle } from '../../support/mount.ts'
import { makeAnalysis, makeTest } from '../analyses/make.ts'

const whole: Partial<PumpingTest> = {
  ...{ kind: 'constant-rate', wellId: 7, wellCode: 'V-0007', startLocal: '2019-03-14T09:00:00', zone: 'Etc/GMT+1' },
  ...{ startAt: '2019-03-14T10:00:00.000Z', startPrecision: 'instant', aquifer: 'confined', intervalBasis: 'unknown' },
  ...{ intervalTopM: null, intervalBottomM: null, thicknessM: null, thicknessBasis: 'unknown', thicknessError: 0.1 },
  ...{ units: [], rateError: 0.05, rateSteps: [], wells: [], series: [], details: null, checklist: null },
  ...{ conditions: '<b>Storm</b> at noon.', source: null, createdBy: null },
}
const snapshot = { inputs: makeTestInputs(), sha256: 'a'.repeat(64), readings: [], problems: [], surroundings: [] }

describe('The report on the page', () => {
  it('holds the same sections as the PDF, to which it leads in the reader’s units', async () => {
    const props = { test: makeTest(whole), analyses: [makeAnalysis({ state: 'accepted' })], snapshot }
    const page = await mountWith(ReportDocument, { props })
    await settle()
    for (const part of ['Conditions of the test', 'Confined aquifer curve (Theis)', 'Transmissivity', 'Cautions'])
      expect(page.text()).toContain(part)
    expect(page.text()).toContain('<b>Storm</b> at noon.')
    expect(page.find('img').attributes('src')).toMatch(/^data:image\/svg\+xml/)
    expect(page.findAll('figure')).toHaveLength(2)
    expect(page.find('a[download]').attributes('href')).toBe(
      '/api/pumping-tests/1/report?unitSystem=metric&direction=down',
    )
  })
})
