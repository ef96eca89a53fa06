import type { WorkbenchInputs } from '#shared/contracts/analyses.ts'
import { Buffer } from 'node:buffer'
import type { AnalysisOptions } from '#shared/hydraulics/analysis.ts'
import type { Services } from '../../../api/services.ts'
import type { Analysed, AnalyseInput } from '../../../jobs/tasks/analyse.ts'
import type { Workers } from '../../../jobs/workers.ts'
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

interface Planned {
  method: DemoAnalysis['method']
  label: string
  options: AnalysisOptions
  inputsSha256: string
  outcome: Promise<Analysed>
}

/** Begins to calculate as the workbench does; other tests are entered meanwhile. */
async function beginAnalyses(
  { analyses }: Services,
  workers: Workers,
  { analyst }: Cast,
  testId: number,
  planned: DemoAnalysis[],
  wellIds: WellIds,
): Promise<Planned[]> {
  const { inputs, sha256: inputsSha256 } = (await analyses.workbench(analyst, testId)) as WorkbenchInputs
  return planned.map((analysis) => {
    const { method, label } = analysis
    const options = optionsOf(analysis, wellIds)
    const outcome = workers.run<Analysed>('analyse', { inputs, method, options } satisfies AnalyseInput)
    // Whoever waits for it is told; until then nobody has to.
    outcome.catch(() => undefined)
    return { method, label, options, inputsSha256, outcome }
  })
}

/** Saves as the workbench does; null where the method refuses these readings, as it may a poor log. */
async function saveAnalysis(
  { analyses }: Services,
  { analyst }: Cast,
  testId: number,
  { outcome, ...analysis }: Planned,
) {
  const calculated = await outcome
  if (!calculated.ok) return null
  const { methodVersion, T, S } = calculated.result
  const expected = { methodVersion, T: T?.value ?? null, S: S?.value ?? null }
  return analyses.create(analyst, testId, { ...analysis, expected })
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

/**
 * Enters a test with readings, whose analyses begin to be calculated.
 * @returns what takes them as far as they have come
 */
export async function enterFullTest(
  services: Services,
  workers: Workers,
  cast: Cast,
  test: DemoFullTest,
  wellIds: WellIds,
  unitIds: UnitIds,
): Promise<() => Promise<void>> {
  const created = await createTest(services, cast, test, wellIds, unitIds)
  await publishTest(services, cast, created, test)
  await uploadLogs(services, cast, created, test)
  const planned = await beginAnalyses(services, workers, cast, created.id, test.analyses, wellIds)
  return async () => {
    const saved: (Saved | null)[] = []
    for (const analysis of planned) saved.push(await saveAnalysis(services, cast, created.id, analysis))
    const chosen = saved.find((analysis) => analysis?.result.T)
    if (chosen) await bringForward(services, cast, chosen, test)
  }
}
