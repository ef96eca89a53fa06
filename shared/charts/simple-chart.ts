import type { EChartsOption, SeriesOption } from 'echarts'
import { formatNumber } from '#shared/quantities/format.ts'
import { xAxisOption, yAxisOption } from './axis-option.ts'
import type { Axis } from './axis.ts'
import { CHART_FONT, CHART_FONT_SIZE, faded, type ChartTheme } from './chart-theme.ts'
import { dotSize } from './fit-series.ts'
import type { PlotFrame } from './plot-frame.ts'
import { symbolOf } from './plot-wells.ts'
import { quiet } from './quiet.ts'
import type { SimpleDots, SimplePlot, SimplePoint, SimpleShade } from './simple-plot.ts'

/** Paler outside what was used. */
const PALE = 0.38
const LINE_WIDTH = 1.5

/** A plot of dots and lines as a chart, in the dress of all charts of tests. */
export function simpleChart(plot: SimplePlot, { plot: margins }: PlotFrame, theme: ChartTheme): EChartsOption {
  return {
    animation: false,
    textStyle: { fontFamily: CHART_FONT, fontSize: CHART_FONT_SIZE, color: theme.ink },
    grid: [{ ...margins, containLabel: false, outerBoundsMode: 'none' as const }],
    xAxis: [xAxisOption(plot.x, theme)],
    yAxis: [yAxisOption(plot.y, theme, margins.left - 18)],
    tooltip: tooltip(plot, theme),
    series: [
      shades(plot.shades, theme),
      moments(plot, theme),
      ...plot.dots.flatMap((dots, i) => dotsSeries(dots, i, theme)),
      ...plot.lines.map(({ label, points }, i) => fitted(label, points, i, theme)),
    ],
  } as EChartsOption
}

function shades(given: SimpleShade[], theme: ChartTheme): SeriesOption {
  const data = given.map(({ axis, from, to, label }) => [
    {
      [`${axis}Axis`]: from,
      itemStyle: { color: faded(theme.deepWater, 0.07) },
      label: {
        show: label !== '',
        formatter: label,
        position: 'insideTopRight',
        color: theme.deepWater,
        fontSize: CHART_FONT_SIZE,
      },
    },
    { [`${axis}Axis`]: to },
  ])
  return {
    ...quiet,
    id: 'shades',
    type: 'line',
    z: 0,
    data: [],
    markArea: { silent: true, animation: false, data },
  } as SeriesOption
}

/** Each moment as a line of its own, broken from the next by a gap. */
function moments({ moments: given, y }: SimplePlot, theme: ChartTheme): SeriesOption {
  const data = given.flatMap((x) => [
    [x, y.min],
    [x, y.max],
    [x, null],
  ])
  const lineStyle = { color: theme.inkSoft, width: 1, type: 'dashed' as const }
  return { ...quiet, id: 'moments', type: 'line', z: 1, showSymbol: false, data, lineStyle } as SeriesOption
}

const dress = (state: SimplePoint['state'], theme: ChartTheme) =>
  ({
    used: { color: theme.ink },
    outside: { color: theme.ink, opacity: PALE },
    'left-out': { color: theme.sheet, borderColor: theme.ink, borderWidth: 1 },
  })[state]

/** A point with a name of its own is called by it. */
const datum = ({ x, y, name }: SimplePoint) => (name === undefined ? [x, y] : { name, value: [x, y] })

function dotsSeries({ label, points }: SimpleDots, index: number, theme: ChartTheme): SeriesOption[] {
  return (['outside', 'left-out', 'used'] as const).map(
    (state) =>
      ({
        id: `dots-${index}-${state}`,
        name: label,
        type: 'scatter',
        z: 2,
        animation: false,
        symbol: symbolOf(index),
        symbolSize: dotSize(points.length),
        itemStyle: dress(state, theme),
        data: points.filter((point) => point.state === state).map(datum),
      }) as SeriesOption,
  )
}

const fitted = (label: string, points: SimplePlot['lines'][number]['points'], index: number, theme: ChartTheme) =>
  ({
    ...quiet,
    id: `fitted-${index}`,
    name: label,
    type: 'line',
    z: 3,
    showSymbol: false,
    data: points,
    lineStyle: { color: theme.deepWater, width: LINE_WIDTH },
  }) as SeriesOption

const figures = ({ years }: Axis, value: number) =>
  years ? String(value) : formatNumber(value, { figures: 4, trim: true })

function tooltip({ x, y }: SimplePlot, theme: ChartTheme) {
  return {
    renderMode: 'richText' as const,
    backgroundColor: theme.sheet,
    borderColor: theme.line,
    textStyle: { color: theme.ink, fontSize: CHART_FONT_SIZE },
    formatter: (shown: unknown) => {
      const { name, seriesName, value } = shown as { name: string; seriesName: string; value: [number, number] }
      const whose = [name, seriesName].filter(Boolean).join(', ')
      return `${whose}\n${x.title}: ${figures(x, value[0])}\n${y.title}: ${figures(y, value[1])}`
    },
  }
}
