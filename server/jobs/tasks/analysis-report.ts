import type { EChartsOption } from 'echarts'
import type { ReportGiven } from '#shared/words/report/document.ts'
import { analysisReport } from '#shared/words/report/analysis-report.ts'
import { distanceText } from '#shared/words/distances.ts'
import type { KindFit } from '#shared/charts/kind-plot.ts'
import { REPORT_CHART } from '#shared/charts/report-charts.ts'
import { kindReportChart, reportChart, reportSketch, type PicturedAnalysis } from '#shared/charts/report-pictures.ts'
import { chartSvg, inOneFont } from '../../reports/draw-charts.ts'
import { reportDefinition, type ReportPictures } from '../../reports/report-pdf.ts'
import { writePdf } from '../../reports/write-pdf.ts'

export interface AnalysisReportInput {
  given: ReportGiven
  direction: 'down' | 'up'
}

const drawn = (option: EChartsOption | null) => option && chartSvg(option, REPORT_CHART)

function picturesOf({ given, direction }: AnalysisReportInput): ReportPictures {
  const { snapshot, units } = given
  if ('kind' in snapshot) {
    const request = { ...snapshot, units, direction }
    const analyses = given.analyses as unknown as ({ id: number } & KindFit)[]
    return { sketch: null, plot: (analysisId) => drawn(kindReportChart(request, analyses, analysisId)) }
  }
  const { inputs, surroundings } = snapshot
  const request = { inputs, units, direction }
  const edges = surroundings.map((edge) => ({ ...edge, chosen: false }))
  const svg = reportSketch(inputs, edges, (metres) => distanceText(metres, units))
  return {
    sketch: inOneFont(svg),
    plot(analysisId) {
      return drawn(reportChart(request, given.analyses as unknown as PicturedAnalysis[], analysisId))
    },
  }
}

/** Writes the report of a test as PDF, away from the main thread: bands of long logs and the layout take a second. */
export const analysisReportTask = (input: AnalysisReportInput): Promise<Uint8Array> =>
  writePdf(reportDefinition(analysisReport(input.given), picturesOf(input)))
