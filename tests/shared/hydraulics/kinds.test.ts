import { describe, expect, it } from 'vitest'
import { analysisResult } from '#shared/contracts/analysis-result.ts'
import { analyseKind, kindLabels, methodIdsOf, ownKinds, type KindId } from '#shared/hydraulics/kinds.ts'
import { recoveryEquivalentTime } from '#shared/hydraulics/recovery-equivalent-time.ts'
import { steadyState } from '#shared/hydraulics/steady-state.ts'
import { unitSystemById } from '#shared/quantities/systems.ts'
import { analysisErrorText, findingCodes, findingText } from '#shared/words/findings.ts'
import { methodLabel } from '#shared/words/methods.ts'
import { optionValueText } from '#shared/words/options.ts'
import { kindRefusals } from '#shared/words/kind-findings.ts'
import { makeSlugInputs, makeSlugOptions } from './make-slug.ts'
import { makeStepInputs } from './make-steps.ts'

const units = ['metric', 'us'].map(unitSystemById)
const methods = Object.values(ownKinds).flatMap((kind) => Object.values(kind.methods))

const results = () => [
  analyseKind('step', 'step-linear', makeStepInputs(), { predictedRate_m3_s: 0.05 }),
  analyseKind('step', 'step-free-exponent', makeStepInputs(), {}),
  ...['hvorslev', 'bouwer-rice', 'cooper-bredehoeft-papadopulos'].map((id) =>
    analyseKind('slug', id, makeSlugInputs(), makeSlugOptions()),
  ),
]

describe('kinds of test', () => {
  it('have a name and methods, each under its own id, with a source', () => {
    expect(Object.keys(kindLabels)).toEqual(['constant-rate', 'step', 'slug', 'specific-capacity'])
    for (const kind of Object.keys(kindLabels) as KindId[]) expect(methodIdsOf(kind).length).toBeGreaterThan(0)
    for (const kind of Object.values(ownKinds))
      for (const [id, method] of Object.entries(kind.methods)) {
        expect(method.id).toBe(id)
        expect(method.source).not.toBe('')
      }
    const ids = (Object.keys(kindLabels) as KindId[]).flatMap(methodIdsOf)
    expect(new Set(ids).size).toBe(ids.length)
  })

  it('say in a sentence what each condition is when it fails', () => {
    const rules = [...methods, recoveryEquivalentTime, steadyState].flatMap(({ validity }) => [...validity])
    expect(rules.length).toBeGreaterThan(15)
    expect(rules.map(({ code }) => code).filter((code) => !findingCodes.includes(code))).toEqual([])
  })

  it('give results that can be stored as they are', () => {
    for (const result of results()) expect(analysisResult.safeParse(result).error).toBeUndefined()
  })

  it('fill in every number of their findings, in the units of the reader', () => {
    for (const result of results())
      for (const finding of result.findings)
        for (const system of units) expect(findingText(finding, system)).not.toMatch(/undefined|NaN|–/)
  })

  it('have words for their choices, their names and what they find', () => {
    for (const method of methods) {
      expect(methodLabel(method.id)).toBe(method.label)
      for (const option of method.options)
        if (option.kind === 'choice') for (const value of option.values) expect(optionValueText(value)).not.toBe('')
    }
    const open = { code: 'not-determined', params: { parameter: 'K', factor: 20 } }
    expect(findingText(open, unitSystemById('metric'))).toMatch(/^Hydraulic conductivity is not determined/)
  })

  it('explain every refusal', () => {
    for (const code of Object.keys(kindRefusals) as (keyof typeof kindRefusals)[])
      expect(analysisErrorText(code, { dimension: 'screenLength_m', needed: 3, found: 1 })).toMatch(/^[A-Z].*\.$/)
  })
})
