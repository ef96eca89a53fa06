import type { EChartsOption, SeriesOption } from 'echarts'
import { unitById } from '#shared/quantities/units.ts'
import type { ChartTheme } from './chart-theme.ts'
import { modelled, type Fit } from './fit-band.ts'
import { curveLine } from './fit-drawing.ts'
import type { PlotFrame } from './plot-frame.ts'
import type { XY } from './plot-wells.ts'
import { quiet } from './quiet.ts'
import { standingChart } from './test-chart.ts'
import { timePlot, type TimePlot, type TimePlotRequest } from './time-plot.ts'

/** Colour and dashes of a curve, so that either alone tells it apart. */
export interface CurveStyle {
  colour: 'deepWater' | 'ochre' | 'ink'
  /** Lengths of strokes and gaps, px; empty for a whole line. */
  dash: number[]
}

export const curveStyles: readonly CurveStyle[] = [
  { colour: 'deepWater', dash: [] },
  { colour: 'ochre', dash: [9, 4] },
  { colour: 'ink', dash: [2, 3] },
  { colour: 'deepWater', dash: [12, 4, 2, 4] },
  { colour: 'ochre', dash: [4, 3] },
  { colour: 'ink', dash: [14, 5] },
]
export const styleOf = (index: number) => curveStyles[index % curveStyles.length] as CurveStyle

/** An analysis among others: one curve for each of its wells. */
export interface ComparedCurve {
  label: string
  wells: { wellId: string; points: XY[] }[]
}

/** The readings alone: derivatives of several wells under several curves could not be told apart. */
export function comparisonPlot(request: TimePlotRequest): TimePlot {
  const plot = timePlot(request)
  const wells = plot.wells.map((well) => ({ ...well, derivative: [] }))
  const title = plot.kind === 'log-log' ? `drawdown, ${unitById(plot.units.length).label}` : plot.y.title
  return { ...plot, wells, y: { ...plot.y, title } }
}

/** Curves of one analysis, in the wells it was made of. @throws AnalysisError where the present inputs have none */
export function comparedCurve(plot: TimePlot, label: string, fit: Fit): ComparedCurve {
  const wells = plot.wells.filter(({ wellId }) => fit.options.wellIds.includes(wellId))
  return {
    label,
    wells: wells.map(({ wellId }) => ({
      wellId,
      points: curveLine(plot, plot.curve_s, modelled(fit, wellId, plot.curve_s)),
    })),
  }
}

/** Curves of several analyses over the same readings. */
export function comparisonChart(
  plot: TimePlot,
  curves: readonly ComparedCurve[],
  frame: PlotFrame,
  theme: ChartTheme,
): EChartsOption {
  const standing = standingChart(plot, frame, theme)
  const lines = curves.flatMap((curve, i) => curve.wells.map((well) => line(curve.label, well, i, theme)))
  return { ...standing, series: [...(standing.series as SeriesOption[]), ...lines] }
}

function line(name: string, { wellId, points }: ComparedCurve['wells'][number], i: number, theme: ChartTheme) {
  const { colour, dash } = styleOf(i)
  const type = dash.length > 0 ? dash : ('solid' as const)
  return {
    ...quiet,
    id: `curve-${i}-${wellId}`,
    name,
    type: 'line',
    z: 5,
    showSymbol: false,
    lineStyle: { color: theme[colour], width: 1.75, type },
    data: points,
  } as SeriesOption
}

/** The curves as a table: one row for each time, one column for each curve. */
export function comparisonTable(plot: TimePlot, curves: readonly ComparedCurve[]) {
  const named = curves.flatMap(({ label, wells }) =>
    wells.map(({ wellId, points }) => ({
      head: `${label}, ${plot.wells.find((well) => well.wellId === wellId)?.label ?? wellId}`,
      at: new Map(points),
    })),
  )
  const xs = [...new Set(named.flatMap(({ at }) => [...at.keys()]))].sort((a, b) => a - b)
  return {
    heads: [plot.x.title, ...named.map(({ head }) => head)],
    rows: xs.map((x) => [x, ...named.map(({ at }) => at.get(x) ?? null)]),
  }
}
