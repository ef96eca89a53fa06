import type { PumpingTest, PumpingTestSummary, SeriesSummary, TestWell } from '#shared/contracts/pumping-tests.ts'
import { testChecklist } from '#shared/contracts/test-checklist.ts'
import { testDetails } from '#shared/contracts/test-details.ts'
import { atLeast, type Viewer } from '#shared/contracts/permissions.ts'
import type { countPumpingTests, listPumpingTests } from './list.repository.ts'
import type {
  findPumpingTest,
  listRateSteps,
  listSeries,
  listTestUnits,
  listTestWells,
  PumpingTestRow,
} from './pumping-tests.repository.ts'
import { localStart } from './start-time.ts'

type Rows<F extends (...args: never[]) => unknown> = Awaited<ReturnType<F>>
export type { PumpingTestRow }
export type FoundTest = NonNullable<Rows<typeof findPumpingTest>>
export type TestWellRow = Rows<typeof listTestWells>[number]
export type Total = Rows<typeof countPumpingTests>

export interface TestParts {
  wells: TestWellRow[]
  units: Rows<typeof listTestUnits>
  steps: Rows<typeof listRateSteps>
  series: Rows<typeof listSeries>
}

/** The person who entered a test changes it; stewards change any. */
export const mayEdit = (viewer: Viewer, test: Pick<PumpingTestRow, 'createdBy'>): boolean =>
  atLeast(viewer, 'steward') || (atLeast(viewer, 'analyst') && test.createdBy === viewer.id)

const start = ({ startAt, zone, startPrecision }: PumpingTestRow) => ({
  startAt: startAt.toISOString(),
  startLocal: localStart(startAt, zone, startPrecision),
  startPrecision,
})

export function testWellView({ row, code, position: [lon, lat] }: TestWellRow): TestWell {
  const { pumpingTestId: _test, ...rest } = row
  return { ...rest, code, lon, lat }
}

export const seriesView = (row: TestParts['series'][number]): SeriesSummary => ({
  id: row.id,
  testWellId: row.testWellId,
  quantity: row.quantity,
  fileName: row.fileName,
  rowCount: row.rowCount,
  takenCount: row.takenCount,
  createdAt: row.createdAt.toISOString(),
  rowVersion: row.rowVersion,
})

export function pumpingTestView(viewer: Viewer, found: FoundTest, parts: TestParts): PumpingTest {
  const { test, wellCode, createdByName } = found
  const seen = new Set(parts.wells.map(({ row }) => row.id))
  return {
    ...test,
    ...start(test),
    wellCode,
    embargoUntil: test.embargoUntil?.toISOString() ?? null,
    createdBy: test.createdBy && createdByName ? { id: test.createdBy, name: createdByName } : null,
    units: parts.units,
    rateSteps: parts.steps,
    details: test.details === null ? null : testDetails.parse(test.details),
    checklist: test.checklist === null ? null : testChecklist.parse(test.checklist),
    wells: parts.wells.map(testWellView),
    series: parts.series.filter(({ testWellId }) => seen.has(testWellId)).map(seriesView),
    mayEdit: mayEdit(viewer, test),
  }
}

export function summaryView(
  row: Rows<typeof listPumpingTests>[number],
  names: Map<number, string[]>,
): PumpingTestSummary {
  const { test, wellCode, state, wellCount, analysisCount } = row
  const { id, kind, wellId, visibility } = test
  return {
    id,
    kind,
    wellId,
    visibility,
    wellCode,
    state,
    wellCount,
    analysisCount,
    ...start(test),
    unitNames: names.get(id) ?? [],
  }
}
