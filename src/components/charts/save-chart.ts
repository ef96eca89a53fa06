import type { EChartsOption } from 'echarts'
import type { Size } from '#shared/charts/plot-frame.ts'

/** Size of a saved picture, px; a PNG has twice as many dots. */
export const PICTURE: Size = { width: 1120, height: 720 }
const DOTS = 2

export function saveFile(name: string, content: Blob | string) {
  const blob = typeof content === 'string' ? new Blob([content]) : content
  const address = URL.createObjectURL(blob)
  const link = document.createElement('a')
  link.href = address
  link.download = name
  link.click()
  // The download has begun by then; some browsers read the address a moment later.
  setTimeout(() => URL.revokeObjectURL(address), 10_000)
}

/** Draws a chart that is not on the page, and lets go of it. */
async function drawn<Result>(
  option: EChartsOption,
  renderer: 'svg' | 'canvas',
  take: (chart: { getDataURL: (o: object) => string }) => Result,
): Promise<Result> {
  const [{ init, use }, { CanvasRenderer }] = await Promise.all([import('echarts/core'), import('echarts/renderers')])
  use([CanvasRenderer])
  const chart = init(document.createElement('div'), null, { renderer, ...PICTURE, devicePixelRatio: DOTS })
  chart.setOption(option)
  try {
    return take(chart)
  } finally {
    chart.dispose()
  }
}

function bytesOf(dataUrl: string): Uint8Array<ArrayBuffer> {
  const text = atob(dataUrl.slice(dataUrl.indexOf(',') + 1))
  return Uint8Array.from(text, (letter) => letter.charCodeAt(0))
}

export const pngOf = (option: EChartsOption, backgroundColor: string): Promise<Blob> =>
  drawn(
    option,
    'canvas',
    (chart) =>
      new Blob([bytesOf(chart.getDataURL({ type: 'png', pixelRatio: DOTS, backgroundColor }))], { type: 'image/png' }),
  )

export const svgOf = (option: EChartsOption, backgroundColor: string): Promise<Blob> =>
  drawn(option, 'svg', (chart) => {
    const url = chart.getDataURL({ type: 'svg', backgroundColor })
    return new Blob([decodeURIComponent(url.slice(url.indexOf(',') + 1))], { type: 'image/svg+xml' })
  })
