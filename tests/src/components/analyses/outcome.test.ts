import { describe, expect, it } from 'vitest'
import { unitSystemById } from '#shared/quantities/systems.ts'
import { bySeverity, evidencePreview } from '../../../../src/components/analyses/outcome.ts'
import { outcomeOf, refusalText, resultOf } from '../../../../src/components/workbench/outcome.ts'
import { firstOptions } from '../../../../src/components/analyses/first-options.ts'
import { makeAnalysis } from './make.ts'
import { makeSeries } from '../../../shared/hydraulics/make-inputs.ts'
import { makeFit, makeTestInputs } from '../../../shared/charts/make-plot.ts'

const metric = unitSystemById('metric')

describe('An outcome', () => {
  it('is a result, or the sentence of why there is none', () => {
    const inputs = makeTestInputs()
    expect(resultOf(outcomeOf('theis', inputs, { wellIds: ['o1'], window: null }))?.T?.value).toBeCloseTo(0.005, 6)
    const refused = outcomeOf('theis', inputs, { wellIds: [], window: null })
    expect(resultOf(refused)).toBeNull()
    expect(refusalText(refused, metric)).toBe('Choose at least one well.')
  })

  it('is a sentence and no crash for a level that never fell', () => {
    const inputs = makeTestInputs()
    const flat = { ...inputs, series: inputs.series.map((s) => ({ ...s, drawdown_m: s.drawdown_m.map(() => 0) })) }
    for (const method of ['cooper-jacob', 'theis', 'recovery'] as const)
      for (const line of [null, { slope: 1, intercept: 0 }, { slope: 1e-12, intercept: 5 }]) {
        const outcome = outcomeOf(method, flat, { wellIds: ['o1'], window: { from_s: 60, to_s: 1e9 }, line })
        expect(resultOf(outcome) !== null || refusalText(outcome, metric) !== '').toBe(true)
      }
  })

  it('lists findings worst first', () => {
    const make = (severity: 'good' | 'note' | 'caution' | 'bad') => ({ code: severity, severity, params: {} })
    expect(bySeverity([make('good'), make('bad'), make('note'), make('caution')]).map(({ code }) => code)).toEqual([
      'bad',
      'caution',
      'note',
      'good',
    ])
  })
})

describe('The evidence that is shown before saving', () => {
  const inputs = makeTestInputs()
  const pumpedOnly = {
    ...inputs,
    series: inputs.series.map((series) => ({
      ...series,
      role: 'pumped' as const,
      wellRadius_m: 50,
      casingRadius_m: 0.01,
    })),
  }
  const open = (given = inputs) => {
    const { options, result } = makeFit('cooper-jacob', {}, given)
    return { id: null, method: 'cooper-jacob' as const, options, result }
  }

  it('is firm for an observation well with radial flow', () => {
    expect(evidencePreview(inputs, open(), [])?.evidence).toBe('firm')
  })

  it('counts a kept recovery that agrees, and neither a withdrawn nor a returned one', () => {
    const recovery = makeAnalysis({ method: 'recovery', result: makeFit('recovery', {}, pumpedOnly).result })
    expect(evidencePreview(pumpedOnly, open(pumpedOnly), [])?.reason).toBe('single-well')
    expect(evidencePreview(pumpedOnly, open(pumpedOnly), [recovery])?.reason).toBe('recovery-agrees')
    for (const state of ['withdrawn', 'returned'] as const)
      expect(evidencePreview(pumpedOnly, open(pumpedOnly), [{ ...recovery, state }])?.reason).toBe('single-well')
  })
})

describe('The wells that an analysis begins with', () => {
  const inputs = {
    ...makeTestInputs(),
    series: [
      makeSeries({ wellId: 'p', role: 'pumped', distance_m: 0 }),
      makeSeries({ wellId: 'far', distance_m: 300 }),
      makeSeries({ wellId: 'near', distance_m: 20 }),
    ],
  }

  it('are observation wells, nearest first, as many as the method takes', () => {
    expect(firstOptions('cooper-jacob', inputs).wellIds).toEqual(['near'])
    expect(firstOptions('theis', inputs).wellIds).toEqual(['near', 'far'])
  })

  it('are the pumped well where there is no other', () => {
    const alone = { ...inputs, series: inputs.series.slice(0, 1) }
    expect(firstOptions('recovery', alone).wellIds).toEqual(['p'])
    expect(firstOptions('distance-drawdown', alone).wellIds).toEqual([])
  })
})
