import type { ReportGiven } from '#shared/words/report/document.ts'
import { analysisReport } from '#shared/words/report/analysis-report.ts'
import { distanceText } from '#shared/words/distances.ts'
import { REPORT_CHART } from '#shared/charts/report-charts.ts'
import { reportChart, reportSketch, type PicturedAnalysis } from '#shared/charts/report-pictures.ts'
import { chartSvg, inOneFont } from '../../reports/draw-charts.ts'
import { reportDefinition, type ReportPictures } from '../../reports/report-pdf.ts'
import { writePdf } from '../../reports/write-pdf.ts'

export interface AnalysisReportInput {
  given: ReportGiven
  direction: 'down' | 'up'
}

function picturesOf({ given, direction }: AnalysisReportInput): ReportPictures {
  const { snapshot, units } = given
  if ('kind' in snapshot) return { sketch: null, plot: () => null }
  const { inputs, surroundings } = snapshot
  const request = { inputs, units, direction }
  const edges = surroundings.map((edge) => ({ ...edge, chosen: false }))
  const svg = reportSketch(inputs, edges, (metres) => distanceText(metres, units))
  return {
    sketch: inOneFont(svg),
    plot(analysisId) {
      const option = reportChart(request, given.analyses as unknown as PicturedAnalysis[], analysisId)
      return option && chartSvg(option, REPORT_CHART)
    },
  }
}

/** Writes the report of a test as PDF, away from the main thread: bands of long logs and the layout take a second. */
export const analysisReportTask = (input: AnalysisReportInput): Promise<Uint8Array> =>
  writePdf(reportDefinition(analysisReport(input.given), picturesOf(input)))
