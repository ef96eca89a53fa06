import type { EChartsOption } from 'echarts'
import { AnalysisError } from '#shared/hydraulics/analysis-error.ts'
import type { AnalysisInputs } from '#shared/hydraulics/analysis.ts'
import type { OwnInputs, OwnKindId } from '#shared/hydraulics/any-kind.ts'
import { rateHistory } from '#shared/hydraulics/rates.ts'
import { distanceDrawing, distancePlot } from './distance-plot.ts'
import type { Fit } from './fit-band.ts'
import { fitDrawing, type FitDrawing } from './fit-drawing.ts'
import { firstKindPlot, kindPlot, type KindFit, type KindPlotUnits } from './kind-plot.ts'
import { paperTheme } from './paper-theme.ts'
import { plotFrame, type Size } from './plot-frame.ts'
import { plotOfMethod } from './plot-kinds.ts'
import { simpleChart } from './simple-chart.ts'
import { testChart, type TestPlot } from './test-chart.ts'
import { timePlot, type PlotUnits, type TimePlotRequest } from './time-plot.ts'

/** Size of a chart of a report, px. */
export const REPORT_CHART: Size = { width: 760, height: 440 }

export interface ReportChartRequest {
  inputs: AnalysisInputs
  units: PlotUnits
  direction: 'down' | 'up'
}

export interface KindChartRequest {
  kind: OwnKindId
  inputs: OwnInputs
  units: KindPlotUnits
  direction: 'down' | 'up'
}

/** An analysis of a test of a kind of its own in the plot that it is judged by. */
export function kindChart({ kind, ...request }: KindChartRequest, fit: KindFit): EChartsOption {
  const plot = kindPlot(kind, firstKindPlot(kind, fit.method), { ...request, fit })
  return simpleChart(plot, plotFrame(REPORT_CHART, { withStrip: false }), paperTheme)
}

/** All readings of a test; null where nothing was pumped, so that there is no clock. */
export function readingsChart({ inputs, units, direction }: ReportChartRequest): EChartsOption | null {
  return guarded(() => {
    rateHistory(inputs.rates)
    const wellIds = inputs.series.map(({ wellId }) => wellId)
    const plot = timePlot({ kind: 'linear', inputs, wellIds, options: {}, units, direction })
    return option(plot, null)
  })
}

/** An analysis in the plot of its method, as the workbench draws it; null where the present readings give none. */
export function analysisChart(request: ReportChartRequest, fit: Fit): EChartsOption | null {
  return guarded(() => {
    const kind = plotOfMethod[fit.result.method]
    const { wellIds, time_s = null } = fit.options
    if (kind === 'distance') {
      const plot = distancePlot({ ...request, wellIds, time_s })
      return option(
        plot,
        guarded(() => distanceDrawing(plot, fit)),
      )
    }
    // A method is judged against time, or by distance; no method has another plot as its own.
    const plot = timePlot({ ...request, kind: kind as TimePlotRequest['kind'], wellIds, options: fit.options })
    return option(
      plot,
      guarded(() => fitDrawing(plot, fit)),
    )
  })
}

function option(plot: TestPlot, drawing: FitDrawing | null): EChartsOption {
  const withStrip = drawing !== null && plot.kind !== 'distance'
  return testChart(plot, drawing, plotFrame(REPORT_CHART, { withStrip }), paperTheme)
}

/** A kept analysis of inputs that have changed since may have no curve on the present ones; its numbers stand. */
function guarded<Made>(make: () => Made): Made | null {
  try {
    return make()
  } catch (error) {
    if (error instanceof AnalysisError || error instanceof RangeError) return null
    throw error
  }
}
