import type { SeriesOption } from 'echarts'
import { CHART_FONT_SIZE, faded, type ChartTheme } from './chart-theme.ts'
import type { FitDrawing } from './fit-drawing.ts'
import type { XY } from './plot-wells.ts'
import { quiet } from './quiet.ts'

/** The two sides of the fall in one factor of ten. */
export const cycle = ({ marks: found }: FitDrawing, theme: ChartTheme): SeriesOption => ({
  ...quiet,
  id: 'cycle',
  type: 'line',
  z: 3,
  showSymbol: false,
  lineStyle: { color: theme.inkSoft, width: 1, type: [3, 3] },
  data: found?.cycle?.corner ?? [],
})

/** Words beside the line: where it meets zero, and its fall in one factor of ten. */
export function marks({ marks: found }: FitDrawing, theme: ChartTheme, inverse: boolean): SeriesOption {
  const label = (formatter: string, position: string, color: string) => ({
    show: true,
    formatter,
    position,
    color,
    fontSize: CHART_FONT_SIZE,
    distance: 7,
    backgroundColor: faded(theme.sheet, 0.8),
    padding: [2, 3],
  })
  const zero = found?.zero && {
    value: found.zero.at,
    symbolSize: 10,
    itemStyle: { color: theme.sheet, borderColor: theme.deepWater, borderWidth: 2, opacity: 1 },
    label: label(found.zero.label, 'right', theme.deepWater),
  }
  const [from, to] = found?.cycle ? horizontal(found.cycle.corner) : [null, null]
  const fall = found?.cycle &&
    from &&
    to && {
      value: [Math.sqrt(from[0] * to[0]), from[1]],
      symbolSize: 0,
      label: label(found.cycle.label, inverse ? 'bottom' : 'top', theme.ink),
    }
  return {
    ...quiet,
    id: 'marks',
    type: 'scatter',
    z: 6,
    clip: false,
    data: [zero, fall].filter(Boolean),
  } as SeriesOption
}

const horizontal = ([a, b, c]: [XY, XY, XY]): [XY, XY] => (a[1] === b[1] ? [a, b] : [b, c])
