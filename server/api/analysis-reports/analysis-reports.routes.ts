import { Buffer } from 'node:buffer'
import { z } from 'zod'
import { analysisReportQuery } from '#shared/contracts/analysis-reports.ts'
import { idInPath } from '#shared/contracts/common.ts'
import { route, type Route } from '../registry.ts'
import type { Services } from '../services.ts'

export function analysisReportsRoutes({ analysisReports }: Services): Route[] {
  return [
    route(
      {
        method: 'get',
        path: '/api/pumping-tests/:id/report',
        action: 'analyses/read',
        summary: 'The report of a test and its analyses, as PDF',
        params: z.object({ id: idInPath }),
        query: analysisReportQuery,
        response: 'sent',
        limit: 'heavy',
      },
      async ({ viewer, params: { id }, query, res }) => {
        const { name, bytes } = await analysisReports.pdf(viewer, id, query)
        res.attachment(name).type('application/pdf').send(Buffer.from(bytes))
      },
    ),
  ]
}
