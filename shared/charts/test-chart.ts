import type { EChartsOption, SeriesOption } from 'echarts'
import { formatNumber } from '#shared/quantities/format.ts'
import { unitById } from '#shared/quantities/units.ts'
import { hiddenAxis, stripAxes, xAxisOption, yAxisOption } from './axis-option.ts'
import { CHART_FONT, CHART_FONT_SIZE, faded, type ChartTheme } from './chart-theme.ts'
import { compositeUnit, type CompositePlot } from './composite-plot.ts'
import type { DistancePlot } from './distance-plot.ts'
import type { FitDrawing } from './fit-drawing.ts'
import { dotSize, fitSeries, residualLimit } from './fit-series.ts'
import type { Margins, PlotFrame } from './plot-frame.ts'
import { symbolOf, type PlotPoint, type PlotWell } from './plot-wells.ts'
import { regimeSeries } from './regime-series.ts'
import type { TimePlot } from './time-plot.ts'

export type TestPlot = TimePlot | DistancePlot | CompositePlot

/** Paler outside the window, and before there is one. */
const PALE = 0.38

/** Everything of a chart, the analysis on it included: for a PDF and saved pictures. */
export function testChart(
  plot: TestPlot,
  drawing: FitDrawing | null,
  frame: PlotFrame,
  theme: ChartTheme,
): EChartsOption {
  const strip = stripOf(plot, drawing, frame, theme)
  const alone = standingChart(plot, frame, theme)
  return {
    ...alone,
    grid: gridsOf(frame),
    xAxis: [xAxisOption(plot.x, theme), ...strip.x],
    yAxis: [yOption(plot, frame, theme), ...strip.y],
    series: [...standingSeries(plot, theme), ...movingSeries(plot, drawing, frame, theme)],
  }
}

/** The plot before any analysis: on the page it is drawn once, under the layer that moves. */
export function standingChart(plot: TestPlot, frame: PlotFrame, theme: ChartTheme): EChartsOption {
  return {
    ...common(theme),
    grid: [exactly(frame.plot)],
    xAxis: [xAxisOption(plot.x, theme)],
    yAxis: [yOption(plot, frame, theme)],
    tooltip: tooltip(plot, theme),
    series: standingSeries(plot, theme),
  }
}

/**
 * The layer that follows the mouse: a few lines and outlines over the same frame, with no axes of its own but those of
 * the strip, so that a move draws ten shapes and not every reading.
 */
export function movingChart(
  plot: TestPlot,
  drawing: FitDrawing | null,
  frame: PlotFrame,
  theme: ChartTheme,
): EChartsOption {
  const strip = stripOf(plot, drawing, frame, theme)
  return {
    ...common(theme),
    grid: gridsOf(frame),
    xAxis: [hiddenAxis(plot.x, 'x'), ...strip.x],
    yAxis: [hiddenAxis(plot.y, 'y'), ...strip.y],
    series: movingSeries(plot, drawing, frame, theme),
  } as EChartsOption
}

/** What changes in the moving layer from one position to the next, to be merged into it. */
export function movedChart(plot: TestPlot, drawing: FitDrawing | null, frame: PlotFrame, theme: ChartTheme) {
  const limit = residualLimit(drawing)
  return {
    ...(frame.strip ? { yAxis: [{ id: 'strip-y', min: -limit, max: limit, interval: limit }] } : {}),
    series: movingSeries(plot, drawing, frame, theme),
  } as EChartsOption
}

const common = (theme: ChartTheme) => ({
  animation: false,
  textStyle: { fontFamily: CHART_FONT, fontSize: CHART_FONT_SIZE, color: theme.ink },
})

/** Long labels must not push the plot aside: layers and handles stand in the same frame. */
const exactly = (margins: Margins) => ({ ...margins, containLabel: false, outerBoundsMode: 'none' as const })

const gridsOf = ({ plot, strip }: PlotFrame) => [exactly(plot), ...(strip ? [exactly(strip)] : [])]

const yOption = ({ y }: TestPlot, frame: PlotFrame, theme: ChartTheme) => yAxisOption(y, theme, frame.plot.left - 18)

function stripOf({ x }: TestPlot, drawing: FitDrawing | null, frame: PlotFrame, theme: ChartTheme) {
  if (!frame.strip) return { x: [], y: [] }
  const axes = stripAxes(x, theme, residualLimit(drawing))
  return { x: [axes.x], y: [axes.y] }
}

function standingSeries(plot: TestPlot, theme: ChartTheme): SeriesOption[] {
  const wells = plot.wells.flatMap((well, i) => standing(well, i, theme, plot.kind === 'distance'))
  return 'regimes' in plot ? [...wells, regimeSeries(plot.regimes, theme)] : wells
}

const movingSeries = ({ wells, y }: TestPlot, drawing: FitDrawing | null, frame: PlotFrame, theme: ChartTheme) =>
  fitSeries({ wells, theme, withStrip: frame.strip !== null, inverse: y.inverse }, drawing)

function standing(
  { points, leftOut, derivative, label }: PlotWell,
  i: number,
  theme: ChartTheme,
  named: boolean,
): SeriesOption[] {
  const dots = {
    type: 'scatter',
    symbol: symbolOf(i),
    symbolSize: dotSize(points.length),
    emphasis: { disabled: true },
    // Noise about zero lies a little outside the axis and is drawn all the same.
    clip: false,
  } as const
  return [
    {
      ...dots,
      id: `points-${i}`,
      name: label,
      z: 2,
      itemStyle: { color: faded(theme.ink, PALE), opacity: 1 },
      data: points.map(({ x, y }) => [x, y]),
      label: { show: named, formatter: label, position: 'right', color: theme.ink, fontSize: CHART_FONT_SIZE },
    },
    {
      ...dots,
      // A sentinel value lies far off.
      clip: true,
      id: `left-out-${i}`,
      name: `${label}, left out`,
      z: 2,
      itemStyle: { color: 'transparent', borderColor: theme.inkSoft, borderWidth: 1, opacity: 1 },
      data: leftOut.map(({ x, y }: PlotPoint) => [x, y]),
    },
    {
      id: `derivative-${i}`,
      type: 'line',
      z: 3,
      silent: true,
      showSymbol: false,
      lineStyle: { color: theme.ochre, width: 1.5 },
      data: derivative,
    },
  ]
}

/** Unit of a plot's abscissa; none for t/t'. */
export function abscissaUnit({ kind, units }: TestPlot): string {
  if (kind === 'recovery') return ''
  if (kind === 'composite') return compositeUnit(units)
  return unitById(kind === 'distance' ? units.length : units.time).label
}

function tooltip(plot: TestPlot, theme: ChartTheme): EChartsOption['tooltip'] {
  const length = unitById(plot.units.length).label
  const abscissa = abscissaUnit(plot)
  return {
    trigger: 'item',
    renderMode: 'richText',
    backgroundColor: theme.sheet,
    borderColor: theme.line,
    textStyle: { color: theme.ink, fontSize: CHART_FONT_SIZE },
    formatter: (given) => {
      const { seriesName, value } = given as unknown as { seriesName: string; value: [number, number] }
      const [x, y] = value.map((part) => formatNumber(part, { figures: 4, trim: true }))
      return `${seriesName}\n${plot.kind === 'recovery' ? "t/t' " : ''}${x} ${abscissa}\n${y} ${length}`
    },
  }
}
