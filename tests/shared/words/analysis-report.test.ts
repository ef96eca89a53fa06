import { describe, expect, it } from 'vitest'
import type { Analysis, WorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { PumpingTest } from '#shared/contracts/pumping-tests.ts'
import type { AnalysisOptions, AnalysisResult } from '#shared/hydraulics/analysis.ts'
import { analyse, methodIds, type MethodId } from '#shared/hydraulics/catalogue.ts'
import { kindOfMethod, methodsOf, ownKindIds } from '#shared/hydraulics/any-kind.ts'
import { unitSystemById } from '#shared/quantities/systems.ts'
import { analysisReport } from '#shared/words/report/analysis-report.ts'
import type { ReportGiven } from '#shared/words/report/document.ts'
import { makeInputs, makeOptions, makeTheisSeries } from '../hydraulics/make-inputs.ts'
import { makeNoise } from '../numerics/make-noise.ts'

const inputs = makeInputs({
  series: [
    makeTheisSeries(
      { T: 4e-3, S: 2e-4 },
      { wellId: '9', label: 'V-0009', bearing_deg: 45, noise: makeNoise(1, 40).map((value) => 0.01 * value) },
    ),
  ],
})
const options = makeOptions({ wellIds: ['9'] })

const makeTest = (overrides: Partial<PumpingTest> = {}): PumpingTest => ({
  id: 4,
  kind: 'constant-rate',
  wellId: 7,
  wellCode: 'V-0007',
  startAt: '2019-03-14T10:00:00.000Z',
  startLocal: '2019-03-14T09:00:00',
  startPrecision: 'instant',
  zone: 'Etc/GMT+1',
  aquifer: 'confined',
  intervalBasis: 'screens',
  intervalTopM: 30,
  intervalBottomM: 55,
  units: [{ unitId: 2, share: 1, basis: 'single-unit', name: 'Fennick Limestone' }],
  thicknessM: 20,
  thicknessBasis: 'aquifer',
  thicknessError: 0.1,
  rateError: 0.05,
  rateSteps: [{ startS: 0, rateM3S: 0.01, enteredValue: 10, enteredUnit: 'L/s' }],
  wells: [
    {
      ...{ id: 21, wellId: 9, code: 'V-0009', role: 'observation', lon: -21.2, lat: -38.4, distanceM: 50 },
      ...{ distanceSdM: 0.1, distanceBasis: 'measured', distanceReason: null, staticLevelM: 5.2, staticBasis: 'given' },
    },
  ],
  series: [],
  details: null,
  checklist: null,
  conditions: 'Windy.',
  source: null,
  visibility: 'internal',
  embargoUntil: null,
  createdBy: { id: 1, name: 'A. Analyst' },
  rowVersion: 3,
  mayEdit: false,
  ...overrides,
})

function makeAnalysis(method: MethodId = 'theis', overrides: Partial<Analysis> = {}): Analysis {
  return {
    id: 11,
    pumpingTestId: 4,
    method,
    methodVersion: 1,
    state: 'accepted',
    options: options satisfies AnalysisOptions,
    result: analyse(method, inputs, options) satisfies AnalysisResult,
    label: null,
    rationale: 'It fits.',
    adoption: null,
    inputsChanged: false,
    questions: [],
    refusals: [],
    createdBy: { id: 1, name: 'A. Analyst' },
    createdAt: '2020-02-01T10:00:00.000Z',
    submittedAt: null,
    reviews: [
      { decision: 'accepted', comment: 'Repeated.', reviewer: 'B. Reviewer', createdAt: '2020-02-03T10:00:00.000Z' },
    ],
    rowVersion: 1,
    mayEdit: false,
    mayTakeBack: false,
    mayReview: false,
    ...overrides,
  }
}

const snapshot: WorkbenchInputs = { inputs, sha256: 'a'.repeat(64), readings: [], problems: [], surroundings: [] }
const reportOf = (overrides: Partial<ReportGiven> = {}) =>
  analysisReport({
    test: makeTest(),
    analyses: [makeAnalysis()],
    snapshot,
    units: unitSystemById('metric'),
    region: 'Isle of Veldray',
    madeAt: '2026-12-01T12:00:00.000Z',
    ...overrides,
  })
const textOf = (report: ReturnType<typeof reportOf>) => JSON.stringify(report)
const section = (report: ReturnType<typeof reportOf>, id: string) => report.sections.find((one) => one.id === id)

describe('the report of a test', () => {
  it('goes from identity to cautions', () => {
    expect(reportOf().sections.map(({ id }) => id)).toEqual([
      ...['identity', 'wells', 'conditions', 'data', 'analysis-11', 'cautions'],
    ])
  })

  it('names the method with its source, the window, results with intervals, the reviewer and the date', () => {
    const text = JSON.stringify(section(reportOf(), 'analysis-11'))
    for (const part of [
      ...['Confined aquifer curve (Theis), version 1', 'Theis 1935; ASTM D4106', 'from 60 s to 1\u202f440 min'],
      ...['Transmissivity', 'm²/d', 'Storativity, elastic', 'B. Reviewer', '3 February 2020', 'Repeated.', 'It fits.'],
    ])
      expect(text).toContain(part)
  })

  it('says of each condition of the method what was found against it', () => {
    const table = section(reportOf(), 'analysis-11')?.blocks.find(
      (block) => block.kind === 'table' && block.caption === 'Conditions of the method',
    )
    expect(table).toMatchObject({ head: ['Condition', 'Source', 'Found'] })
    expect(JSON.stringify(table)).toContain('Nothing against it')
  })

  it('follows the reader’s units', () => {
    expect(textOf(reportOf({ units: unitSystemById('us') }))).toContain('ft²/d')
    expect(textOf(reportOf({ units: unitSystemById('us') }))).not.toContain('m²/d')
  })

  it('compares what stands, and not what was returned or withdrawn', () => {
    const other = makeAnalysis('cooper-jacob', { id: 12 })
    const both = reportOf({ analyses: [makeAnalysis(), other] })
    const agreement = section(both, 'agreement')!
    expect(agreement.blocks.map(({ kind }) => kind)).toEqual(['table', 'forest', 'marked'])
    const [table, forest] = agreement.blocks
    if (table?.kind !== 'table' || forest?.kind !== 'forest') throw new Error('other blocks')
    expect(table.rows.map(([name]) => name)).toEqual(forest.rows.map(({ label }) => label))
    // In the reader's unit: m²/d.
    expect(forest.rows[1]!.value / (other.result.T!.value * 86_400)).toBeCloseTo(1, 12)
    expect(Number(table.rows[1]![4])).toBeCloseTo(other.result.T!.value / makeAnalysis().result.T!.value, 2)
    expect(JSON.stringify(agreement)).toContain('agree')
    const returned = { ...other, state: 'returned' as const }
    expect(section(reportOf({ analyses: [makeAnalysis(), returned] }), 'agreement')).toBeUndefined()
  })

  it('says that the data changed since, and that there is no analysis', () => {
    const changed = reportOf({ analyses: [makeAnalysis('theis', { inputsChanged: true })] })
    expect(textOf(changed)).toContain('were changed after this analysis')
    expect(textOf(reportOf({ analyses: [] }))).toContain('no analysis yet')
  })

  it('names a source and conditions for every method of every kind', () => {
    for (const method of [...methodIds, ...ownKindIds.flatMap((kind) => Object.keys(methodsOf(kind)))]) {
      const stripped = { ...makeAnalysis(), method: method as Analysis['method'] }
      const found = { ...stripped, options: null, result: { ...stripped.result, others: [] } }
      const text = JSON.stringify(section(reportOf({ analyses: [found] }), 'analysis-11'))
      expect([method, kindOfMethod(method), text.includes('"Source"')]).toEqual([method, kindOfMethod(method), true])
    }
  })

  it('lists the conditions of the test with what nobody recorded, and the notes', () => {
    const text = JSON.stringify(section(reportOf(), 'conditions'))
    expect(text).toContain('Not recorded')
    expect(text).toContain('Windy.')
  })

  it('keeps its day whatever the zone it is made in', () => {
    expect(reportOf().title).toBe('V-0007, 14 March 2019')
    expect(reportOf({ test: makeTest({ startPrecision: 'year', startLocal: '1987' }) }).title).toBe('V-0007, 1987')
    expect(reportOf().made).toContain('1 December 2026')
  })
})
