import type { SeriesOption } from 'echarts'
import type { Moment } from './casing-moments.ts'
import { CHART_FONT, CHART_FONT_SIZE, faded, type ChartTheme } from './chart-theme.ts'
import { quiet } from './quiet.ts'

/** Words stand above the name of a shaded part of the axis. */
const ABOVE_AXIS = 34

interface Ground {
  y: number
  height: number
}

/** Upright dashed lines with their names. */
export function momentSeries(moments: readonly Moment[], theme: ChartTheme): SeriesOption {
  return {
    ...quiet,
    id: 'moments',
    type: 'custom',
    z: 3,
    clip: false,
    data: moments.length > 0 ? [[moments[0]?.x, 0]] : [],
    renderItem: (params, api) => {
      const ground = params.coordSys as unknown as Ground
      const children = moments.flatMap(({ x, label }) =>
        mark((api.coord([x, 0]) as [number, number])[0], label, ground, theme),
      )
      return { type: 'group', children }
    },
  } as SeriesOption
}

function mark(x: number, label: string, { y, height }: Ground, theme: ChartTheme) {
  const line = {
    type: 'line',
    shape: { x1: x, y1: y, x2: x, y2: y + height },
    style: { stroke: theme.ochre, lineWidth: 1, lineDash: [5, 3] },
    silent: true,
  }
  const text = {
    type: 'text',
    style: {
      text: label,
      x: x + 4,
      y: y + height - ABOVE_AXIS,
      verticalAlign: 'middle',
      fill: theme.ochre,
      font: `${CHART_FONT_SIZE}px ${CHART_FONT}`,
      backgroundColor: faded(theme.sheet, 0.8),
      padding: [1, 2],
    },
    silent: true,
  }
  return [line, text]
}
