import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { analyseKind, kindCurve } from '#shared/hydraulics/kinds.ts'
import { stepIncrements } from '#shared/hydraulics/step/increments.ts'
import { lossOf } from '#shared/hydraulics/step/step-method.ts'
import { laminarShare, predict } from '#shared/hydraulics/step/well-loss.ts'
import reference from '../../reference/test-kinds.json'
import { makeSeries, relative } from './make-inputs.ts'
import { HOUR, makeStepInputs, stepTruth } from './make-steps.ts'

const codes = ({ findings }: { findings: { code: string }[] }) => findings.map(({ code }) => code)
const trueB = stepTruth.start + stepTruth.trend * Math.log10(HOUR)

function referenceInputs() {
  const { t, s, starts, rates } = reference.step
  const steps = starts.map((start_s, i) => ({ start_s, rate_m3_s: rates[i] as number }))
  const well = makeSeries({ wellId: 'p', role: 'pumped', elapsed_s: t, drawdown_m: s, casingRadius_m: 0.1 })
  return { version: 1 as const, rates: [...steps, { start_s: 4 * HOUR, rate_m3_s: 0 }], rateError: 0, well }
}

describe('step drawdown, linear', () => {
  it('gives back B and C of exact steps, and the increments that an observer would read', () => {
    const inputs = makeStepInputs()
    const result = analyseKind('step', 'step-linear', inputs, {})
    expect(relative(result.extras.B as number, trueB)).toBeLessThan(1e-9)
    expect(relative(result.extras.C as number, stepTruth.C)).toBeLessThan(1e-8)
    const { points } = stepIncrements(inputs, {})
    const [first, second] = points
    const atEnd = inputs.well.drawdown_m[19] as number
    expect(first?.drawdown_m).toBeCloseTo(atEnd, 9)
    const added = 0.006 * trueB + stepTruth.C * (0.016 ** 2 - 0.01 ** 2)
    expect(second?.increment_m).toBeCloseTo(added, 9)
    expect(result.T).toBeNull()
  })

  it('equals numpy and linregress on noisy steps of a Theis aquifer, and covers the truth', () => {
    const result = analyseKind('step', 'step-linear', referenceInputs(), {})
    const { step } = reference
    expect(relative(result.extras.trend as number, step.trend)).toBeLessThan(1e-8)
    expect(relative(result.extras.B as number, step.B)).toBeLessThan(1e-9)
    expect(relative(result.extras.C as number, step.C)).toBeLessThan(1e-7)
    const C = result.others?.find(({ id }) => id === 'C')
    expect(C?.low).toBeLessThan(step.truth.C)
    expect(C?.high).toBeGreaterThan(step.truth.C)
    // Scatter of the steps with two degrees of freedom: Student's t is 4.303 (printed tables).
    expect(relative(((C?.high ?? NaN) - (C?.value ?? NaN)) / 4.3027, step.sdC)).toBeLessThan(1e-4)
  })

  it('does not depend on the order of steps, on pauses between them, or on the time of comparison', () => {
    const shuffled = makeStepInputs({ rates: [0.022, 0.01, 0.03, 0.016] })
    const paused = makeStepInputs({ rates: [0.01, 0, 0.016, 0, 0.03] })
    for (const inputs of [
      shuffled,
      paused,
      makeStepInputs({ stop: false }),
      makeStepInputs({ hours: [1, 2, 1.5, 3] }),
    ]) {
      const result = analyseKind('step', 'step-linear', inputs, {})
      expect(relative(result.extras.C as number, stepTruth.C)).toBeLessThan(1e-7)
    }
    const early = analyseKind('step', 'step-linear', makeStepInputs(), { increment_s: 1800 })
    expect(relative(early.extras.C as number, stepTruth.C)).toBeLessThan(1e-8)
    expect(early.extras.B).toBeCloseTo(stepTruth.start + stepTruth.trend * Math.log10(1800), 6)
  })

  it('names a negative well loss with its likely causes, and goes on', () => {
    const result = analyseKind('step', 'step-linear', makeStepInputs({ truth: { ...stepTruth, C: -800 } }), {})
    expect(result.extras.C).toBeCloseTo(-800, 4)
    expect(result.findings).toContainEqual(expect.objectContaining({ code: 'negative-well-loss', severity: 'caution' }))
  })

  it('sorts well loss by size', () => {
    const at = (C: number) =>
      codes(analyseKind('step', 'step-linear', makeStepInputs({ truth: { ...stepTruth, C } }), {}))
    expect(at(1200)).toContain('well-loss-small')
    expect(at(3000)).toContain('well-loss-raised')
    expect(at(9000)).toContain('well-loss-large')
  })

  it('names steps whose trend differs, and steps of unequal length', () => {
    const inputs = makeStepInputs({ hours: [1, 1, 1, 2] })
    inputs.well.drawdown_m = inputs.well.drawdown_m.map((value, i) => (i >= 60 ? value + 0.1 * (i - 60) : value))
    const found = codes(analyseKind('step', 'step-linear', inputs, {}))
    expect(found).toEqual(expect.arrayContaining(['step-trends-differ', 'steps-unequal']))
    expect(codes(analyseKind('step', 'step-linear', makeStepInputs(), {}))).not.toContain('step-trends-differ')
  })

  it('predicts drawdown and specific capacity at a rate, and says when it was not tested', () => {
    const result = analyseKind('step', 'step-linear', makeStepInputs(), { predictedRate_m3_s: 0.04 })
    const expected = 0.04 * trueB + stepTruth.C * 0.04 ** 2
    expect(result.extras.predicted_drawdown_m).toBeCloseTo(expected, 6)
    expect(result.extras.predicted_specific_capacity_m2_s).toBeCloseTo(0.04 / expected, 9)
    expect(codes(result)).toContain('rate-beyond-steps')
    const inside = predict(lossOf(result.extras), 0.02)
    expect(inside.beyond).toBe(false)
    expect(inside.laminarShare).toBeCloseTo((0.02 * trueB) / (0.02 * trueB + stepTruth.C * 0.0004), 9)
    expect(laminarShare({ B: 100, C: 0, P: 2 }, 0.02)).toBe(1)
  })

  it('draws the steps that it was given', () => {
    const inputs = makeStepInputs()
    const result = analyseKind('step', 'step-linear', inputs, {})
    const [curve] = kindCurve('step', 'step-linear', inputs, {}, result, [-1, 0, ...inputs.well.elapsed_s])
    expect(curve?.drawdown_m.slice(0, 2)).toEqual([null, null])
    curve?.drawdown_m.slice(2).forEach((value, i) => {
      if (value !== null) expect(value).toBeCloseTo(inputs.well.drawdown_m[i] as number, 7)
    })
  })

  it('refuses fewer than three steps, steps without readings, and an increment longer than a step', () => {
    const run =
      (inputs = makeStepInputs(), options = {}) =>
      () =>
        analyseKind('step', 'step-linear', inputs, options)
    expect(run(makeStepInputs({ rates: [0.01, 0.02] }))).toThrow('analysis/too-few-steps')
    expect(run(makeStepInputs({ rates: [0.01, 0.02, 0.01] }))).toThrow('analysis/too-few-steps')
    expect(run(makeStepInputs(), { increment_s: 2 * HOUR })).toThrow('analysis/step-increment')
    expect(run(makeStepInputs(), { trendFrom: 1 })).toThrow('analysis/bad-option')
    expect(run(makeStepInputs(), { predictedRate_m3_s: 0 })).toThrow('analysis/bad-option')
    const empty = makeStepInputs()
    empty.well.included = empty.well.included.map((_, i) => i < 20 || i >= 40)
    expect(run(empty)).toThrow(expect.objectContaining({ params: { step: 2, needed: 3, found: 0 } }))
    expect(() => analyseKind('step', 'unheard-of', makeStepInputs(), {})).toThrow('analysis/unknown-method')
  })

  it('scales with units: B as 1/L², C as T²/L⁵ of rate and drawdown', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.1, max: 10, noNaN: true }),
        fc.double({ min: 0.01, max: 100, noNaN: true }),
        (length, time) => {
          const inputs = referenceInputs()
          const scaled = {
            ...inputs,
            rates: inputs.rates.map((step) => ({
              start_s: step.start_s / time,
              rate_m3_s: (step.rate_m3_s * time) / length ** 3,
            })),
            well: {
              ...inputs.well,
              elapsed_s: inputs.well.elapsed_s.map((t) => t / time),
              drawdown_m: inputs.well.drawdown_m.map((s) => s / length),
            },
          }
          const [a, b] = [inputs, scaled].map((one) => analyseKind('step', 'step-linear', one, {}).extras)
          expect(relative((b?.B as number) * (time / length ** 2), a?.B as number)).toBeLessThan(1e-9)
          expect(relative((b?.C as number) * (time ** 2 / length ** 5), a?.C as number)).toBeLessThan(1e-7)
        },
      ),
      { numRuns: 30 },
    )
  })
})

describe('step drawdown, free exponent', () => {
  it('finds the exponent of exact steps', () => {
    for (const P of [1.8, 2, 2.6, 3.2]) {
      const truth = { ...stepTruth, P, C: 1200 * 0.02 ** (2 - P) }
      const { extras } = analyseKind('step', 'step-free-exponent', makeStepInputs({ truth }), {})
      expect(extras.P).toBeCloseTo(P, 5)
      expect(relative(extras.C as number, truth.C)).toBeLessThan(1e-4)
      expect(relative(extras.B as number, trueB)).toBeLessThan(1e-5)
    }
  })

  it('equals scipy on noisy steps, and leaves the exponent open there', () => {
    const result = analyseKind('step', 'step-free-exponent', referenceInputs(), {})
    const { free } = reference.step
    expect(relative(result.extras.P as number, free.P)).toBeLessThan(1e-5)
    expect(relative(result.extras.B as number, free.B)).toBeLessThan(1e-6)
    expect(relative(result.extras.C as number, free.C)).toBeLessThan(1e-4)
    const P = result.others?.find(({ id }) => id === 'P')
    expect(P?.low).toBeLessThan(2)
    expect(P?.high).toBeGreaterThan(2)
  })

  it('never fits worse than the exponent 2 of the linear method', () => {
    const free = analyseKind('step', 'step-free-exponent', referenceInputs(), {})
    const linear = analyseKind('step', 'step-linear', referenceInputs(), {})
    expect(free.fit.objective).toBeLessThanOrEqual(linear.fit.objective)
  })

  it('says that three steps leave nothing to judge it by, and that no loss fits falling drawdown per rate', () => {
    const three = analyseKind('step', 'step-free-exponent', makeStepInputs({ rates: [0.01, 0.02, 0.03] }), {})
    expect(codes(three)).toContain('exponent-exact')
    const negative = makeStepInputs({ truth: { ...stepTruth, C: -800 } })
    expect(codes(analyseKind('step', 'step-free-exponent', negative, {}))).toContain('well-loss-none')
    const steep = makeStepInputs({ truth: { ...stepTruth, P: 4.5, C: 1200 * 0.02 ** -2.5 } })
    expect(codes(analyseKind('step', 'step-free-exponent', steep, {}))).toContain('exponent-at-bound')
  })
})
