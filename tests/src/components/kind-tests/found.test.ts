import { describe, expect, it } from 'vitest'
import { perRatePlot } from '#shared/charts/step-plot.ts'
import { analyseKind } from '#shared/hydraulics/kinds.ts'
import KindFound from '../../../../src/components/kind-tests/KindFound.vue'
import { simpleCsv, simpleRows } from '../../../../src/components/charts/simple-rows.ts'
import { makeRepeat, makeSlugInputs } from '../../../shared/hydraulics/make-slug.ts'
import { makeStepInputs } from '../../../shared/hydraulics/make-steps.ts'
import { mountWith } from '../../support/mount.ts'

const rest = { sha256: 'a'.repeat(64), readings: [], problems: [] }

describe('What a test of a kind of its own found', () => {
  it('is conductivity first, and each repeat beside its displacement', async () => {
    const inputs = makeSlugInputs({
      repeats: [makeRepeat(), makeRepeat({ id: 'r2', label: 'Large slug', initial_m: 1 })],
    })
    const options = { repeatIds: null }
    const result = analyseKind('slug', 'hvorslev', inputs, options)
    const page = await mountWith(KindFound, { props: { inputs: { kind: 'slug', inputs, ...rest }, options, result } })
    const terms = page.findAll('dt').map((term) => term.text())
    expect(terms).toEqual(['K', 'T', 'Repeat 1', 'Large slug'])
    expect(page.text()).toContain('from 1.00 m')
  })

  it('is the losses of the well with their units, and the drawdown at the rate asked for', async () => {
    const inputs = makeStepInputs()
    const options = { predictedRate_m3_s: 0.02 }
    const result = analyseKind('step', 'step-linear', inputs, options)
    const page = await mountWith(KindFound, { props: { inputs: { kind: 'step', inputs, ...rest }, options, result } })
    expect(page.text()).toMatch(/B.*s\/m²/)
    expect(page.text()).toMatch(/C.*1\D?200 s²\/m⁵/)
    // 0.02·(150 + 40·log10 3600) + 1200·0.02² m, exactly.
    expect(page.text()).toContain(`${(0.02 * (150 + 40 * Math.log10(3600)) + 1200 * 0.0004).toFixed(2)} m`)
  })
})

describe('A plot of dots and lines as numbers', () => {
  const inputs = makeStepInputs()
  const plot = perRatePlot(analyseKind('step', 'step-linear', inputs, {}), {
    time: 'min',
    length: 'm',
    discharge: 'L/s',
  })

  it('has a row for every point with what was fitted there', () => {
    const rows = simpleRows(plot)
    expect(rows.map(({ x }) => x)).toEqual([10, 16, 22, 30])
    for (const { y, fitted } of rows) expect(fitted).toBeCloseTo(y, 9)
  })

  it('is written with units in its header, and with names that stay text', () => {
    const named = { ...plot, dots: plot.dots.map((dots) => ({ ...dots, label: '=1+1' })) }
    const [head, first] = simpleCsv(named).split('\r\n')
    expect(head).toBe('of,"rate, L/s","drawdown over rate, m per L/s",fitted,state')
    expect(first).toContain("'=1+1")
  })
})
