import type { XAXisComponentOption, YAXisComponentOption } from 'echarts'
import { logLabels, textOn, type Axis } from './axis.ts'
import { CHART_FONT_SIZE, faded, type ChartTheme } from './chart-theme.ts'

/** Strength of the grid lines between powers of ten. */
const MINOR = 0.45
/** Ticks of a factor of ten: 1, 2 … 9. */
const MINOR_TICKS = 9

function common({ scale, min, max, title, inverse, step, years }: Axis, theme: ChartTheme) {
  const line = { lineStyle: { color: theme.line, width: 1 } }
  const minor = { show: scale === 'log', splitNumber: MINOR_TICKS }
  return {
    type: scale === 'log' ? ('log' as const) : ('value' as const),
    min,
    max,
    inverse,
    ...(step === undefined ? {} : { interval: step }),
    name: title,
    nameLocation: 'middle' as const,
    // Long tick labels would push the title out of the picture.
    nameMoveOverlap: false,
    nameTextStyle: { color: theme.inkSoft, fontSize: CHART_FONT_SIZE },
    axisLine: { show: true, onZero: false, ...line },
    axisTick: { show: true, ...line },
    axisLabel: { color: theme.inkSoft, fontSize: CHART_FONT_SIZE, formatter: textOn({ years }), hideOverlap: true },
    splitLine: { show: true, ...line },
    ...(scale === 'log' ? { minorTick: minor } : {}),
    minorSplitLine: { show: scale === 'log', lineStyle: { color: faded(theme.line, MINOR), width: 1 } },
  }
}

/** A logarithmic axis is labelled by round numbers, never by its raw ends. */
const labelsOf = (axis: Axis) => (axis.scale === 'log' ? { customValues: logLabels(axis) } : {})

export function xAxisOption(axis: Axis, theme: ChartTheme): XAXisComponentOption {
  const option = common(axis, theme)
  return {
    ...option,
    id: 'x',
    gridIndex: 0,
    position: 'bottom',
    nameGap: 30,
    axisLabel: { ...option.axisLabel, ...labelsOf(axis) },
  } as XAXisComponentOption
}

export function yAxisOption(axis: Axis, theme: ChartTheme, nameGap: number): YAXisComponentOption {
  const option = common(axis, theme)
  return {
    ...option,
    id: 'y',
    gridIndex: 0,
    position: 'left',
    nameGap,
    axisLabel: { ...option.axisLabel, ...labelsOf(axis) },
  } as YAXisComponentOption
}

/** An axis that only places things. */
export const hiddenAxis = ({ scale, min, max, inverse }: Axis, id: string) => ({
  id,
  type: scale === 'log' ? ('log' as const) : ('value' as const),
  gridIndex: 0,
  show: false,
  min,
  max,
  inverse,
})

/** The strip of residuals shares the abscissa of the plot above it. */
export function stripAxes(axis: Axis, theme: ChartTheme, limit: number) {
  const plain = { axisLabel: { show: false }, axisTick: { show: false }, minorTick: { show: false } }
  const x = { ...common({ ...axis, title: '' }, theme), ...plain, id: 'strip-x', gridIndex: 1 }
  const y = {
    ...common({ scale: 'linear', min: -limit, max: limit, title: '', inverse: false }, theme),
    id: 'strip-y',
    gridIndex: 1,
    interval: limit,
    splitLine: { show: false },
    axisTick: { show: false },
    axisLine: { show: false },
  }
  return {
    x: {
      ...x,
      axisLine: { show: false },
      splitLine: { show: false },
      minorSplitLine: { show: false },
    } as XAXisComponentOption,
    y: y as YAXisComponentOption,
  }
}
