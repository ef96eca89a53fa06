import type { EChartsOption, SeriesOption } from 'echarts'
import { formatNumber } from '#shared/quantities/format.ts'
import { unitById } from '#shared/quantities/units.ts'
import { stripAxes, xAxisOption, yAxisOption } from './axis-option.ts'
import { CHART_FONT, CHART_FONT_SIZE, faded, type ChartTheme } from './chart-theme.ts'
import type { DistancePlot } from './distance-plot.ts'
import type { FitDrawing } from './fit-drawing.ts'
import { dotSize, fitSeries, residualLimit } from './fit-series.ts'
import type { PlotFrame } from './plot-frame.ts'
import { symbolOf, type PlotPoint, type PlotWell } from './plot-wells.ts'
import type { TimePlot } from './time-plot.ts'

export type TestPlot = TimePlot | DistancePlot

/** Paler outside the window, and before there is one. */
const PALE = 0.38

/** Everything of a chart: what stands, and the analysis on it. For the page, a PDF and saved pictures alike. */
export function testChart(
  plot: TestPlot,
  drawing: FitDrawing | null,
  frame: PlotFrame,
  theme: ChartTheme,
): EChartsOption {
  const { wells, x, y } = plot
  const withStrip = frame.strip !== null
  const strip = stripAxes(x, theme, residualLimit(drawing))
  return {
    animation: false,
    textStyle: { fontFamily: CHART_FONT, fontSize: CHART_FONT_SIZE, color: theme.ink },
    grid: [{ ...frame.plot, containLabel: false }, ...(frame.strip ? [{ ...frame.strip, containLabel: false }] : [])],
    xAxis: [xAxisOption(x, theme), ...(withStrip ? [strip.x] : [])],
    yAxis: [yAxisOption(y, theme, frame.plot.left - 18), ...(withStrip ? [strip.y] : [])],
    tooltip: tooltip(plot, theme),
    series: [
      ...wells.flatMap((well, i) => standing(well, i, theme, plot.kind === 'distance')),
      ...fitSeries({ wells, theme, withStrip, inverse: y.inverse }, drawing),
    ],
  }
}

/** What changes while a window or line is dragged, to be merged into a chart that stands. */
export function liveChart(plot: TestPlot, drawing: FitDrawing | null, frame: PlotFrame, theme: ChartTheme) {
  const withStrip = frame.strip !== null
  const limit = residualLimit(drawing)
  return {
    ...(withStrip ? { yAxis: [{ id: 'strip-y', min: -limit, max: limit, interval: limit }] } : {}),
    series: fitSeries({ wells: plot.wells, theme, withStrip, inverse: plot.y.inverse }, drawing),
  } as EChartsOption
}

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
      itemStyle: { color: faded(theme.ink, PALE) },
      data: points.map(({ x, y }) => [x, y]),
      label: { show: named, formatter: label, position: 'right', color: theme.ink, fontSize: CHART_FONT_SIZE },
    },
    {
      ...dots,
      id: `left-out-${i}`,
      name: `${label}, left out`,
      z: 2,
      itemStyle: { color: 'transparent', borderColor: theme.inkSoft, borderWidth: 1 },
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

function tooltip(plot: TestPlot, theme: ChartTheme): EChartsOption['tooltip'] {
  const length = unitById(plot.units.length).label
  const abscissa = plot.kind === 'distance' ? length : plot.kind === 'recovery' ? '' : unitById(plot.units.time).label
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
