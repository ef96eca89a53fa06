import { readdirSync, readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { analyse } from '#shared/hydraulics/catalogue.ts'
import { unitSystemById } from '#shared/quantities/systems.ts'
import { analysisErrorText, findingCodes, findingText } from '#shared/words/findings.ts'
import { makeInputs, makeOptions, makeSeries, makeTheisSeries } from '../hydraulics/make-inputs.ts'

const metric = unitSystemById('metric')
const us = unitSystemById('us')
const folder = new URL('../../../shared/hydraulics/', import.meta.url)

/** Every code of a finding that the methods can make, read from their source. */
function codesInSource(): string[] {
  const text = readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .filter((name) => name.endsWith('.ts'))
    .map((name) => readFileSync(new URL(name, folder), 'utf8'))
    .join('\n')
  const direct = [...text.matchAll(/code: '([a-z-]+)', severity/g)].map((match) => match[1] as string)
  const chosen = [...text.matchAll(/code: [^\n]*\? '([a-z-]+)' : '([a-z-]+)'/g)].flatMap((match) => [
    match[1] as string,
    match[2] as string,
  ])
  const limits = [...text.matchAll(/rule\('[TS]', '(?:refuse|ask)', '([a-z-]+)'/g)].map((match) => match[1] as string)
  return [...new Set([...direct, ...chosen, ...limits])].filter((code) => !code.includes('agree'))
}

describe('sentences of findings', () => {
  it('exist for every code in the methods', () => {
    const inSource = codesInSource()
    expect(inSource.length).toBeGreaterThan(20)
    expect(inSource.filter((code) => !findingCodes.includes(code))).toEqual([])
  })

  it('fill in every number of a real result, in the units of the reader', () => {
    const series = makeTheisSeries({ T: 20, S: 2e-4 }, { distanceSd_m: 20 })
    const inputs = makeInputs({ series: [series], thickness_m: 10, rates: [{ start_s: 0, rate_m3_s: 0.01 }] })
    const result = analyse('cooper-jacob', inputs, makeOptions({ window: { from_s: 60, to_s: 120 } }))
    for (const finding of result.findings) {
      for (const units of [metric, us]) expect(findingText(finding, units)).not.toMatch(/undefined|NaN|–/)
    }
    const limit = result.findings.find(({ code }) => code === 'limit-transmissivity')
    expect(limit && findingText(limit, metric)).toContain('m²/d')
    expect(limit && findingText(limit, us)).toContain('ft²/d')
  })

  it('count independent readings down to one, and no parts of one', () => {
    const told = [12.3, 0.38].map((effectiveN) =>
      findingText({ code: 'residuals-correlated', params: { n: 27, effectiveN } }, metric),
    )
    expect(told[0]).toContain('they tell as much as 12 independent readings,')
    expect(told[1]).toContain('they tell less than one independent reading would,')
  })

  it('say what is not determined, and by how much', () => {
    const finding = { code: 'not-determined', params: { parameter: 'S', factor: 40.2 } }
    expect(findingText(finding, metric)).toBe(
      'Storativity is not determined by these data: its interval spans a factor of 40.',
    )
  })

  it('are refused for an unknown code', () => {
    expect(() => findingText({ code: 'unheard-of', params: {} }, metric)).toThrow(RangeError)
  })
})

describe('sentences of refusals', () => {
  it('name the well and the figures', () => {
    expect(analysisErrorText('analysis/zero-distance', { wellId: '7', well: 'OB-7' })).toContain('OB-7')
    expect(analysisErrorText('analysis/too-few-readings', { needed: 3, found: 1 }, us)).toMatch(/needs 3 readings; 1 /)
    expect(analysisErrorText('analysis/negative-rate', { rate_m3_s: -0.01 }, metric)).toContain('−10 L/s')
    expect(analysisErrorText('analysis/bad-option', { option: 'window' })).toContain('window')
  })

  it('are thrown with code and params by the methods', () => {
    const run = () => analyse('theis', makeInputs({ series: [makeSeries({ elapsed_s: [60] })] }), makeOptions())
    expect(run).toThrow(expect.objectContaining({ code: 'analysis/too-few-readings', params: { needed: 3, found: 1 } }))
  })
})
