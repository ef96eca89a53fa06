import { z } from 'zod'
import { unitSystemId } from './account.ts'

/** How the reader wants a report: units, and which way drawdown points. Left out: as the region has it, downwards. */
export const analysisReportQuery = z.object({
  unitSystem: unitSystemId.optional(),
  direction: z.enum(['down', 'up']).default('down'),
})
export type AnalysisReportQuery = z.infer<typeof analysisReportQuery>
