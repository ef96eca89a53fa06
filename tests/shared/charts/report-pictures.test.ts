import { describe, expect, it } from 'vitest'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import { reportChart, reportSketch } from '#shared/charts/report-pictures.ts'
import { makeInputs, makeOptions, makeSeries, makeTheisSeries } from '../hydraulics/make-inputs.ts'

const inputs = makeInputs({ series: [makeTheisSeries({ T: 4e-3, S: 2e-4 })] })
const options = makeOptions()
const analysis = { id: 3, options, result: analyse('theis', inputs, options) }
const request = { inputs, units: { time: 'min', length: 'm' }, direction: 'down' as const }

describe('charts of a report', () => {
  it('are the readings, or an analysis on the plot of its method', () => {
    const readings = reportChart(request, [analysis], null)
    const fitted = reportChart(request, [analysis], 3)
    const count = (option: typeof readings) => (option?.series as unknown[]).length
    expect(count(readings)).toBeGreaterThan(0)
    expect(count(fitted)).toBeGreaterThan(count(readings))
  })

  it('are none for an analysis that is not there, for no pumping, and none fails where wells have gone', () => {
    expect(reportChart(request, [analysis], 9)).toBeNull()
    expect(reportChart({ ...request, inputs: makeInputs({ rates: [] }) }, [], null)).toBeNull()
    const others = makeInputs({ series: [makeSeries({ wellId: 'other' })] })
    expect(() => reportChart({ ...request, inputs: others }, [analysis], 3)).not.toThrow()
  })
})

describe('the sketch of a report', () => {
  it('holds names as text, whatever they are', () => {
    const label = '"><script>alert(1)</script>&\u0000'
    const svg = reportSketch({ series: [makeSeries({ label, bearing_deg: 90 })] }, [], (metres) => `${metres} m`)
    expect(svg).toContain('&quot;&gt;&lt;script&gt;alert(1)&lt;/script&gt;&amp;')
    expect(svg).not.toContain('<script')
    expect(svg).not.toContain('\u0000')
    expect(svg).toContain('50 m')
  })
})
