import { anyWorkbenchInputs } from '#shared/contracts/analyses.ts'
import type { AnalysisReportQuery } from '#shared/contracts/analysis-reports.ts'
import type { Viewer } from '#shared/contracts/permissions.ts'
import { unitSystemById } from '#shared/quantities/systems.ts'
import type { ReportGiven } from '#shared/words/report/document.ts'
import type { Deps } from '../../deps.ts'
import type { AnalysesService } from '../analyses/analyses.service.ts'
import type { createPumpingTestsService } from '../pumping-tests/pumping-tests.service.ts'
import type { createRegionService } from '../region/region.service.ts'

export interface AnalysisReportsNeeds {
  analyses: Pick<AnalysesService, 'list' | 'workbench'>
  pumpingTests: Pick<ReturnType<typeof createPumpingTestsService>, 'get'>
  region: Pick<ReturnType<typeof createRegionService>, 'get'>
}

/** A name that any system keeps: letters, digits, points and dashes. */
const fileName = (code: string, startLocal: string) =>
  `${`${code}-${startLocal.slice(0, 10)}`
    .normalize('NFC')
    .replace(/[^\p{L}\p{N}.]+/gu, '-')
    .replace(/^[-.]+/, '')}-report.pdf`

export function createAnalysisReportsService(
  { now, workers }: Deps,
  { analyses, pumpingTests, region }: AnalysisReportsNeeds,
) {
  return {
    /** The report of a test as PDF, of what the viewer may see. @throws AppError where they may not see the test */
    async pdf(viewer: Viewer, testId: number, { unitSystem, direction }: AnalysisReportQuery) {
      const test = await pumpingTests.get(viewer, testId)
      const { name, unitSystem: ofRegion } = await region.get()
      const given: ReportGiven = {
        test,
        analyses: (await analyses.list(viewer, testId)).items,
        snapshot: anyWorkbenchInputs.parse(await analyses.workbench(viewer, testId)),
        units: unitSystemById(unitSystem ?? ofRegion),
        region: name,
        madeAt: now().toISOString(),
      }
      const bytes = await workers.run<Uint8Array>('analysis-report', { given, direction })
      return { name: fileName(test.wellCode, test.startLocal), bytes }
    },
  }
}
