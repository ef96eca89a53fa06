import type { EChartsOption } from 'echarts'
import type { AnalysisOptions, AnalysisInputs, AnalysisResult } from '#shared/hydraulics/analysis.ts'
import { paperTheme } from './paper-theme.ts'
import type { Size } from './plot-frame.ts'
import type { KindFit } from './kind-plot.ts'
import {
  analysisChart,
  kindChart,
  readingsChart,
  type KindChartRequest,
  type ReportChartRequest,
} from './report-charts.ts'
import { sketchSvg } from './sketch-svg.ts'
import { testSketch, type SketchEdge } from './test-sketch.ts'

/** Size of the sketch of a report, px. */
const SKETCH: Size = { width: 480, height: 300 }

/** A fitted analysis, as far as its plot needs it. */
export interface PicturedAnalysis {
  id: number
  options: AnalysisOptions
  result: AnalysisResult
}

/** The chart of an analysis, or of all readings for null; null where there is none to draw. */
export function reportChart(
  request: ReportChartRequest,
  analyses: readonly PicturedAnalysis[],
  analysisId: number | null,
): EChartsOption | null {
  if (analysisId === null) return readingsChart(request)
  const analysis = analyses.find(({ id }) => id === analysisId)
  return analysis ? analysisChart(request, { inputs: request.inputs, ...analysis }) : null
}

/** The chart of an analysis of a step, slug or specific-capacity test; null where there is none to draw. */
export function kindReportChart(
  request: KindChartRequest,
  analyses: readonly ({ id: number } & KindFit)[],
  analysisId: number | null,
): EChartsOption | null {
  const analysis = analyses.find(({ id }) => id === analysisId)
  return analysis ? kindChart(request, analysis) : null
}

/** The test from above as SVG; `distance` writes a distance in the reader's unit. */
export const reportSketch = (
  inputs: Pick<AnalysisInputs, 'series'>,
  edges: readonly SketchEdge[],
  distance: (metres: number) => string,
): string => sketchSvg(testSketch(inputs, edges, SKETCH, distance), paperTheme)
