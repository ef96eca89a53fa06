import { init, use } from 'echarts/core'
import { CustomChart, LineChart, ScatterChart } from 'echarts/charts'
import { GridComponent, MarkAreaComponent, TooltipComponent } from 'echarts/components'
import { SVGRenderer } from 'echarts/renderers'
import type { EChartsOption } from 'echarts'
import { describe, expect, it } from 'vitest'
import type { ChartTheme } from '#shared/charts/chart-theme.ts'
import { fitDrawing } from '#shared/charts/fit-drawing.ts'
import { plotFrame, xPixel, yPixel } from '#shared/charts/plot-frame.ts'
import { movedChart, movingChart, standingChart, testChart } from '#shared/charts/test-chart.ts'
import { makeFit, makePlot, makeTestInputs } from './make-plot.ts'

use([CustomChart, LineChart, ScatterChart, GridComponent, MarkAreaComponent, TooltipComponent, SVGRenderer])

const theme: ChartTheme = {
  sheet: '#FFFFFF',
  line: '#D9D5CB',
  ink: '#1C2B33',
  inkSoft: '#5B6770',
  deepWater: '#0B4F6C',
  ochre: '#9A6412',
}
const frame = plotFrame({ width: 900, height: 640 }, { withStrip: true })

function drawn(...options: EChartsOption[]): string {
  const chart = init(null, null, { renderer: 'svg', ssr: true, ...frame.size })
  for (const option of options) chart.setOption(option)
  const svg = chart.renderToSVGString()
  chart.dispose()
  return svg
}

const plot = makePlot({ inputs: makeTestInputs({ noise: 0.004 }) })
const fit = makeFit('cooper-jacob', {}, makeTestInputs({ noise: 0.004 }))

describe('The chart of a test', () => {
  const svg = drawn(testChart(plot, fitDrawing(plot, fit), frame, theme))

  it('names both axes with their units and writes powers of ten on a logarithmic one', () => {
    for (const words of ['drawdown, m', 'time since pumping began, min', '>10<', '>100<', '>1\u202f000<'])
      expect(svg).toContain(words)
  })

  it('writes even steps on a linear axis', () => {
    for (const step of ['>0.2<', '>0.4<', '>0.6<', '>0.8<']) expect(svg).toContain(step)
  })

  it('says the fall in one log cycle, the zero, and where the line does not hold', () => {
    expect(svg).toMatch(/Δs 0\.3\d\d m in one log cycle/)
    expect(svg).toMatch(/t₀ [\d.]+ min/)
    expect(svg).toContain('u &gt; 0.05')
  })

  it('draws the derivative in ochre, the line in deep water and readings in ink', () => {
    expect(svg).toContain(`stroke="${theme.ochre}"`)
    expect(svg).toContain(`stroke="${theme.deepWater}"`)
    expect(svg).toContain(`fill="${theme.ink}"`)
  })

  it('draws every reading paler than ink, under the one outline of those in the window', () => {
    const pale = /fill="rgb\(28,43,51\)" fill-opacity="0\.38"/g
    expect([...svg.matchAll(pale)]).toHaveLength(plot.wells[0]!.points.length)
  })
})

describe('The two layers of the page', () => {
  it('together say what the one picture says', () => {
    const drawing = fitDrawing(plot, fit)
    const [under, over] = [drawn(standingChart(plot, frame, theme)), drawn(movingChart(plot, drawing, frame, theme))]
    expect(under).toContain('drawdown, m')
    expect(under).not.toContain('log cycle')
    expect(over).toContain('log cycle')
    expect(over).not.toContain('drawdown, m')
  })

  it('come to the same picture by moving the window as by drawing it there', () => {
    const moved = makeFit('cooper-jacob', { window: { from_s: 6_000, to_s: 40_000 } }, fit.inputs)
    const there = fitDrawing(plot, moved)
    const byMoving = drawn(
      movingChart(plot, fitDrawing(plot, fit), frame, theme),
      movedChart(plot, there, frame, theme),
    )
    const shapes = (svg: string) => [...svg.matchAll(/ d="([^"]+)"/g)].map(([, path]) => path).sort()
    expect(shapes(byMoving)).toEqual(shapes(drawn(movingChart(plot, there, frame, theme))))
  })

  it('lose the analysis when there is none', () => {
    const gone = drawn(movingChart(plot, fitDrawing(plot, fit), frame, theme), movedChart(plot, null, frame, theme))
    expect(gone).not.toContain('log cycle')
  })
})

describe('Everything on a chart', () => {
  it('stands where its frame says, however long the labels of the axes are', () => {
    const small = makeTestInputs()
    small.series[0]!.drawdown_m = small.series[0]!.drawdown_m.map((drawdown) => drawdown * 1e-4)
    for (const kind of ['semi-log', 'log-log'] as const) {
      const chart = makePlot({ kind, inputs: small })
      const svg = drawn(standingChart(chart, frame, theme))
      const dots = [...svg.matchAll(/matrix\(3\.5,0,0,3\.5,([\d.]+),([\d.]+)\)/g)].map(([, x, y]) => [
        Number(x),
        Number(y),
      ])
      expect(dots).toHaveLength(chart.wells[0]!.points.length)
      chart.wells[0]!.points.forEach(({ x, y }, i) => {
        expect(Math.abs(dots[i]![0]! - xPixel(frame, chart.x, x))).toBeLessThan(0.01)
        expect(Math.abs(dots[i]![1]! - yPixel(frame, chart.y, y))).toBeLessThan(0.01)
      })
    }
  })
})

describe('The log–log chart', () => {
  it('writes whole powers of ten on both axes', () => {
    const loglog = makePlot({ kind: 'log-log', inputs: fit.inputs })
    const svg = drawn(testChart(loglog, fitDrawing(loglog, makeFit('theis', {}, fit.inputs)), frame, theme))
    expect(svg).toContain('>0.1<')
    expect(svg).toContain('>100<')
  })
})
