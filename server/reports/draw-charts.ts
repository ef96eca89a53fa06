import { init, type EChartsOption } from 'echarts'
import type { Size } from '#shared/charts/plot-frame.ts'
import { withoutUnprintable } from './printed.ts'

/** The one font that the PDF carries; a list of families would be taken for one unknown name. */
const FONT = 'Roboto'

/** A chart as SVG, drawn without a page. Text of anybody in it is escaped by the renderer. */
export function chartSvg(option: EChartsOption, size: Size): string {
  const chart = init(null, null, { renderer: 'svg', ssr: true, ...size })
  try {
    chart.setOption({ ...option, animation: false })
    return inOneFont(chart.renderToSVGString())
  } finally {
    chart.dispose()
  }
}

/** Replaces the families of a picture by the font of the document. */
export const inOneFont = (svg: string): string =>
  withoutUnprintable(svg)
    .replace(/font-family:[^;"<]*/g, `font-family:${FONT}`)
    .replace(/font-family="[^"<]*"/g, `font-family="${FONT}"`)
