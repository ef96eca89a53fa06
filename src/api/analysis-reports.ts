import type { AnalysisReportQuery } from '#shared/contracts/analysis-reports.ts'
import { address } from './addresses.ts'

/** Address of the report of a test as PDF. */
export const analysisReportPdf = (testId: number, query: AnalysisReportQuery): string =>
  address(`/api/pumping-tests/${testId}/report`, query)
