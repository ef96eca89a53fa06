import type { WorkbenchInputs } from '#shared/contracts/analyses.ts'
import { Buffer } from 'node:buffer'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import type { AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import type { Services } from '../../../api/services.ts'
import type { DemoAnalysis, DemoFullTest } from '../records/types.ts'
import type { UnitIds } from './geography.ts'
import { publishTest } from './publish-test.ts'
import type { Cast } from './people.ts'

type WellIds = Map<string, number>

async function createTest(
  { pumpingTests }: Services,
  { analyst }: Cast,
  test: DemoFullTest,
  wellIds: WellIds,
  unitIds: UnitIds,
) {
  const { startLocal, zone, aquifer, thicknessM, thicknessBasis, conditions, checklist, rateSteps, staticLevelM } = test
  const { id } = await pumpingTests.create(analyst, {
    ...{ startLocal, zone, aquifer, thicknessM, thicknessBasis, conditions, checklist, rateSteps, staticLevelM },
    visibility: 'internal',
    wellId: wellIds.get(test.wellCode)!,
    intervalBasis: 'screens',
    intervalTopM: null,
    intervalBottomM: null,
    units: [{ unitId: unitIds.get(test.unit)!, share: 1, basis: 'single-unit' }],
    thicknessError: 0.1,
    rateError: 0.05,
    observationWells: test.observationWells.map((well) => ({
      wellId: wellIds.get(well.wellCode)!,
      distanceBasis: 'measured',
      distanceM: well.distanceM,
      reason: null,
      staticLevelM: well.staticLevelM,
    })),
  })
  return pumpingTests.get(analyst, id)
}

async function uploadLogs(
  { readingSeries }: Services,
  { analyst }: Cast,
  created: Awaited<ReturnType<typeof createTest>>,
  { series }: DemoFullTest,
) {
  for (const { wellCode, fileName, text, mapping } of series) {
    const well = created.wells.find(({ code }) => code === wellCode)!
    const file = { name: fileName, bytes: Buffer.from(text) }
    await readingSeries.create(analyst, created.id, file, { testWellId: well.id, mapping })
  }
}

const optionsOf = (planned: DemoAnalysis, wellIds: WellIds): AnalysisOptions => ({
  wellIds: planned.wellCodes.map((code) => String(wellIds.get(code)!)),
  window: planned.window,
  phase: planned.phase,
  afterDrainage: planned.afterDrainage,
})

/** Calculates and saves as the workbench does; null where the method refuses these readings, as it may a poor log. */
async function saveAnalysis(
  { analyses }: Services,
  { analyst }: Cast,
  testId: number,
  planned: DemoAnalysis,
  wellIds: WellIds,
) {
  const { inputs, sha256 } = (await analyses.workbench(analyst, testId)) as WorkbenchInputs
  const options = optionsOf(planned, wellIds)
  try {
    const result = analyse(planned.method, inputs, options)
    const expected = { methodVersion: result.methodVersion, T: result.T?.value ?? null, S: result.S?.value ?? null }
    return await analyses.create(analyst, testId, {
      method: planned.method,
      options,
      label: planned.label,
      expected,
      inputsSha256: sha256,
    })
  } catch (error) {
    if (error instanceof AnalysisError) return null
    throw error
  }
}

type Saved = NonNullable<Awaited<ReturnType<typeof saveAnalysis>>>

/** Takes the analysis that is put forward as far as the record says. */
async function bringForward(
  { analyses, reviews }: Services,
  { analyst, reviewer }: Cast,
  chosen: Saved,
  { outcome, rationale }: DemoFullTest,
) {
  if (outcome === 'draft' || chosen.refusals.length > 0) return
  const confirmed = chosen.questions.map(({ code }) => code)
  const submitted = await analyses.submit(analyst, chosen.id, { rowVersion: chosen.rowVersion, rationale, confirmed })
  if (outcome === 'submitted') return
  const accepted = outcome === 'adopted'
  await reviews.decide(reviewer, chosen.id, {
    rowVersion: submitted.rowVersion,
    decision: accepted ? 'accepted' : 'returned',
    comment: accepted
      ? null
      : 'The readings do not carry this value. Leave out what the logger got wrong and choose the window again.',
  })
}

/** A test with readings, from its creation to where its analyses have come. */
export async function writeFullTest(
  services: Services,
  cast: Cast,
  test: DemoFullTest,
  wellIds: WellIds,
  unitIds: UnitIds,
) {
  const created = await createTest(services, cast, test, wellIds, unitIds)
  await publishTest(services, cast, created, test)
  await uploadLogs(services, cast, created, test)
  const saved: (Saved | null)[] = []
  for (const planned of test.analyses) saved.push(await saveAnalysis(services, cast, created.id, planned, wellIds))
  const chosen = saved.find((analysis) => analysis?.result.T)
  if (chosen) await bringForward(services, cast, chosen, test)
}
