import type { EChartsOption, SeriesOption } from 'echarts'
import { xAxisOption, yAxisOption } from './axis-option.ts'
import { extentOf, linearAxis, logAxis, tickText, type Axis } from './axis.ts'
import { CHART_FONT, CHART_FONT_SIZE, faded, type ChartTheme } from './chart-theme.ts'
import type { PlotFrame } from './plot-frame.ts'
import { quiet } from './quiet.ts'

/** Values in the reader's unit at least `from` and less than `to`. */
export interface HistogramClass {
  from: number
  to: number
  count: number
}

export interface Histogram {
  x: Axis
  y: Axis
  classes: HistogramClass[]
}

/** Digits of every power of ten that begin a class, coarse first: classes of one kind are nearly alike on a log axis. */
const DIGITS = [[1], [1, 3], [1, 2, 5]] as const

/** As many classes as a sample of n asks for (Sturges 1926). */
const wantedClasses = (n: number) => 1 + Math.log2(n)

function breaksBy(digits: readonly number[], least: number, most: number): number[] {
  const first = Math.floor(Math.log10(least)) - 1
  const last = Math.ceil(Math.log10(most)) + 1
  const all = Array.from({ length: last - first + 1 }, (_, i) => first + i).flatMap((power) =>
    digits.map((digit) => Number(`${digit}e${power}`)),
  )
  const below = all.findIndex((value) => value > least) - 1
  const above = all.findIndex((value) => value > most)
  return all.slice(below, above + 1)
}

/** Round class breaks about positive values: the coarsest that part them into as many classes as their number asks for. */
export function roundBreaks(values: readonly number[]): number[] {
  const [least, most] = extentOf(values) ?? [1, 1]
  const choices = DIGITS.map((digits) => breaksBy(digits, least, most))
  return choices.find((breaks) => breaks.length - 1 >= wantedClasses(values.length)) ?? choices.at(-1)!
}

/** Histogram of the logarithms of positive values, with breaks that are round numbers in the values' own unit. */
export function histogramOf(values: readonly number[], title: string): Histogram {
  const breaks = roundBreaks(values)
  const classes = breaks.slice(1).map((to, i) => {
    const from = breaks[i]!
    return { from, to, count: values.filter((value) => value >= from && value < to).length }
  })
  const counts = classes.map(({ count }) => count)
  return {
    x: logAxis(breaks, title),
    // Wells are counted in whole numbers.
    y: linearAxis(counts, 'wells in the class', { parts: Math.min(5, Math.max(...counts)) }),
    classes,
  }
}

export function histogramChart({ x, y, classes }: Histogram, { plot }: PlotFrame, theme: ChartTheme): EChartsOption {
  return {
    animation: false,
    textStyle: { fontFamily: CHART_FONT, fontSize: CHART_FONT_SIZE, color: theme.ink },
    grid: [{ ...plot, containLabel: false, outerBoundsMode: 'none' as const }],
    xAxis: [xAxisOption(x, theme)],
    yAxis: [yAxisOption(y, theme, plot.left - 18)],
    series: [
      {
        ...quiet,
        id: 'classes',
        type: 'line',
        showSymbol: false,
        data: classes.flatMap(({ from, to, count }) => [[from, 0], [from, count], [to, count], [to, 0]]), // prettier-ignore
        lineStyle: { color: theme.deepWater, width: 1.5 },
        areaStyle: { color: faded(theme.deepWater, 0.16) },
      } as SeriesOption,
    ],
  } as EChartsOption
}

export const classText = ({ from, to }: HistogramClass): string => `${tickText(from)} to ${tickText(to)}`
