import type { SeriesOption } from 'echarts'
import { regimeWords } from '#shared/words/regimes.ts'
import { CHART_FONT, faded, type ChartTheme } from './chart-theme.ts'
import { quiet } from './quiet.ts'
import type { DrawnRegime } from './regimes.ts'

/** The bands stand in the room above the plot, where no reading lies. */
const HEIGHT = 14
const ABOVE = 1
const FONT_SIZE = 11
/** Words in a narrower band would be cut to nothing. */
const NARROWEST_TEXT = 24

/** The rectangle in which a plot is drawn, as ECharts hands it over. */
interface Ground {
  x: number
  y: number
  width: number
}

/** Named bands along the upper edge of a plot, one for each span of the diagnosis. */
export function regimeSeries(regimes: readonly DrawnRegime[], theme: ChartTheme): SeriesOption {
  return {
    ...quiet,
    id: 'regimes',
    type: 'custom',
    z: 1,
    clip: false,
    data: regimes.length > 0 ? [[regimes[0]?.from, 0]] : [],
    renderItem: (params, api) => {
      const ground = params.coordSys as unknown as Ground
      const pixel = (x: number) => (api.coord([x, 0]) as [number, number])[0]
      const children = regimes.flatMap(({ regime, from, to }) =>
        band(regimeWords(regime).label, [pixel(from), pixel(to)], ground, theme),
      )
      return { type: 'group', children }
    },
  } as SeriesOption
}

function band(label: string, edges: [number, number], ground: Ground, theme: ChartTheme) {
  const left = Math.max(ground.x, Math.min(...edges))
  const right = Math.min(ground.x + ground.width, Math.max(...edges))
  // It may lie beyond the part of the plot that is looked at.
  if (right <= left) return []
  const y = ground.y - HEIGHT - ABOVE
  const box = {
    type: 'rect',
    shape: { x: left, y, width: Math.max(0, right - left), height: HEIGHT },
    style: { fill: faded(theme.ochre, 0.16), stroke: faded(theme.ochre, 0.7), lineWidth: 1 },
    silent: true,
  }
  if (right - left < NARROWEST_TEXT) return [box]
  const text = {
    type: 'text',
    style: {
      text: label,
      x: (left + right) / 2,
      y: y + HEIGHT / 2,
      align: 'center',
      verticalAlign: 'middle',
      fill: theme.ink,
      font: `${FONT_SIZE}px ${CHART_FONT}`,
      width: right - left - 6,
      overflow: 'truncate',
    },
    silent: true,
  }
  return [box, text]
}
