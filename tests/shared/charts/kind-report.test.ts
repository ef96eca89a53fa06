import { describe, expect, it } from 'vitest'
import { firstKindPlot, headsOf, kindPlot, kindPlots, type KindFit } from '#shared/charts/kind-plot.ts'
import { kindReportChart } from '#shared/charts/report-pictures.ts'
import type { KindChartRequest } from '#shared/charts/report-charts.ts'
import { analyseOwn, ownKindIds, type OwnInputs, type OwnKindId, type OwnOptions } from '#shared/hydraulics/any-kind.ts'
import { makeSlugInputs } from '../hydraulics/make-slug.ts'
import { makeStepInputs } from '../hydraulics/make-steps.ts'

const units = { time: 'min', length: 'm', discharge: 'L/s', transmissivity: 'm²/d' }
const common = { units, direction: 'down' as const }

const fitOf = (kind: OwnKindId, method: string, inputs: OwnInputs, options: OwnOptions): KindFit => ({
  method,
  options,
  result: analyseOwn(kind, method, inputs, options),
})
const slugOptions = { repeatIds: null }
const cases: [OwnKindId, OwnInputs, KindFit][] = [
  ['step', makeStepInputs(), fitOf('step', 'step-linear', makeStepInputs(), {})],
  ['slug', makeSlugInputs(), fitOf('slug', 'hvorslev', makeSlugInputs(), slugOptions)],
]

describe('The chart of a report', () => {
  it.each(cases)(
    'of a %s test is the plot that its workbench opens with, what was fitted included',
    (kind, inputs, fit) => {
      const request: KindChartRequest = { ...common, kind, inputs }
      const option = kindReportChart(request, [{ id: 4, ...fit }], 4)
      const plot = kindPlot(kind, firstKindPlot(kind, fit.method), { ...common, inputs, fit })
      expect(plot.lines[0]!.points.length).toBeGreaterThan(10)
      const series = option!.series as { data: unknown[] }[]
      expect(series.some(({ data }) => data.length === plot.lines[0]!.points.length)).toBe(true)
      expect(kindReportChart(request, [{ id: 4, ...fit }], 5)).toBeNull()
    },
  )

  it('tells the readings that a line stands on apart by the heads of its method, and by those that somebody gave', () => {
    const given = { from: 0.3, to: 0.6 }
    expect(headsOf({ method: 'hvorslev', options: slugOptions })).toEqual({ from: 0.15, to: 0.25 })
    expect(headsOf({ method: 'hvorslev', options: { ...slugOptions, heads: given } })).toEqual(given)
    expect(headsOf({ method: 'slug-oscillating', options: slugOptions })).toBeNull()
  })

  it('has a plot for every kind, linear for levels that swing, and refuses one of another kind', () => {
    for (const kind of ownKindIds) expect(kindPlots[kind].map(({ id }) => id)).toContain(firstKindPlot(kind, null))
    expect(firstKindPlot('slug', 'slug-oscillating')).toBe('head-linear')
    const [, inputs, fit] = cases[0]!
    expect(() => kindPlot('step', 'storage', { ...common, inputs, fit })).toThrow(RangeError)
  })
})
