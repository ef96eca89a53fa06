import type { SeriesOption } from 'echarts'
import { CHART_FONT_SIZE, faded, type ChartTheme } from './chart-theme.ts'
import { dotsPath } from './dots-path.ts'
import type { Band, FitDrawing } from './fit-drawing.ts'
import { cycle, marks } from './mark-series.ts'
import { momentSeries } from './moment-series.ts'
import { symbolOf, type PlotWell, type XY } from './plot-wells.ts'
import { quiet } from './quiet.ts'

/** The part of a chart that follows the mouse: series with fixed ids, whose data alone are replaced. */
export interface SeriesFrame {
  wells: readonly PlotWell[]
  theme: ChartTheme
  withStrip: boolean
  /** Drawdown points down. */
  inverse: boolean
}

const NO_FIT: FitDrawing = {
  inside: [],
  fitted: [],
  bands: [],
  span: null,
  shade: null,
  marks: null,
  moments: [],
  residuals: { inside: [], outside: [], unit: '' },
}

/** Custom series draw one shape from what they close over: its points as data would each become a dimension. */
const ONE_SHAPE = [[0, 0]]

/** Many readings are smaller, so that they stay apart. */
export const dotSize = (count: number) => (count > MANY ? 5 : 7)
const MANY = 120

export function fitSeries({ wells, theme, withStrip, inverse }: SeriesFrame, given: FitDrawing | null): SeriesOption[] {
  const drawing = given ?? NO_FIT
  return [
    areas(drawing, theme),
    ...wells.map((_, i) => band(drawing.bands[i] ?? null, i, theme)),
    ...wells.map(({ points }, i) => inside(drawing.inside[i] ?? [], i, theme, dotSize(points.length))),
    ...wells.map((_, i) => fitted(drawing.fitted[i] ?? [], i, theme)),
    momentSeries(drawing.moments, theme),
    cycle(drawing, theme),
    marks(drawing, theme, inverse),
    ...(withStrip ? strip(drawing, theme) : []),
  ]
}

/** Window and shade as areas behind everything. */
function areas({ span, shade }: FitDrawing, theme: ChartTheme): SeriesOption {
  const data = [
    ...(shade ? [area(shade.from, shade.to, faded(theme.ochre, 0.07), shade.label, theme.ochre)] : []),
    ...(span ? [area(span[0], span[1], faded(theme.deepWater, 0.07), '', theme.deepWater)] : []),
  ]
  return {
    ...quiet,
    id: 'areas',
    type: 'line',
    z: 0,
    data: [],
    markArea: { silent: true, animation: false, data },
  } as SeriesOption
}

const area = (from: number, to: number, color: string, label: string, labelColor: string) => [
  {
    xAxis: from,
    itemStyle: { color },
    label: {
      show: label !== '',
      formatter: label,
      position: 'insideBottomLeft',
      distance: 8,
      color: labelColor,
      fontSize: CHART_FONT_SIZE,
    },
  },
  { xAxis: to },
]

/** The band as one closed outline: along its upper edge and back along the lower one. */
function band(given: Band | null, i: number, theme: ChartTheme): SeriesOption {
  const outline = given ? [...given.high, ...[...given.low].reverse()] : []
  return {
    ...quiet,
    id: `band-${i}`,
    type: 'custom',
    z: 1,
    data: outline.length > 2 ? ONE_SHAPE : [],
    clip: true,
    renderItem: (_params, api) => ({
      type: 'polygon',
      shape: { points: outline.map((point) => api.coord(point) as [number, number]) },
      style: { fill: faded(theme.deepWater, 0.18) },
      silent: true,
    }),
  } as SeriesOption
}

/** All readings of the window in one outline: hundreds of separate symbols would be too slow to follow a mouse. */
function inside(data: XY[], i: number, theme: ChartTheme, size: number): SeriesOption {
  return {
    ...quiet,
    id: `inside-${i}`,
    type: 'custom',
    z: 4,
    clip: false,
    data: data.length > 0 ? ONE_SHAPE : [],
    renderItem: (_params, api) => ({
      type: 'path',
      shape: {
        pathData: dotsPath(
          data.map((point) => api.coord(point) as [number, number]),
          symbolOf(i),
          size,
        ),
      },
      style: { fill: theme.ink },
      silent: true,
    }),
  } as SeriesOption
}

const fitted = (data: XY[], i: number, theme: ChartTheme): SeriesOption => ({
  ...quiet,
  id: `fitted-${i}`,
  type: 'line',
  z: 5,
  showSymbol: false,
  lineStyle: { color: theme.deepWater, width: 1.75 },
  data,
})

/** Residuals as one broken line each: a stroke from zero for every reading. */
function strip(drawing: FitDrawing, theme: ChartTheme): SeriesOption[] {
  const { residuals } = drawing
  const limit = residualLimit(drawing)
  const stroke = (id: string, points: XY[], color: string): SeriesOption => ({
    ...quiet,
    id,
    type: 'line',
    xAxisIndex: 1,
    yAxisIndex: 1,
    showSymbol: false,
    connectNulls: false,
    lineStyle: { color, width: 2, cap: 'butt' },
    data: points.flatMap(([x, y]): (XY | ['-', '-'])[] => [
      [x, 0],
      [x, y],
      ['-', '-'],
    ]),
  })
  return [
    stroke(
      'residuals-outside',
      residuals.outside.filter(([, y]) => Math.abs(y) <= limit),
      faded(theme.inkSoft, 0.35),
    ),
    stroke('residuals-inside', residuals.inside, theme.deepWater),
  ]
}

/** The round number that holds the residuals of the window, for the strip's axis. */
export function residualLimit(drawing: FitDrawing | null): number {
  const most = (drawing?.residuals.inside ?? []).reduce((largest, [, y]) => Math.max(largest, Math.abs(y)), 0)
  if (!(most > 0)) return 1
  const power = 10 ** Math.floor(Math.log10(most))
  return ([1, 2, 5, 10].find((step) => step * power >= most) ?? 10) * power
}
