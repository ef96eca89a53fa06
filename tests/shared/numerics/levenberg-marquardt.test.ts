import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { FitUnknown, LeastSquaresProblem } from '#shared/numerics/least-squares-problem.ts'
import { levenbergMarquardt } from '#shared/numerics/levenberg-marquardt.ts'
import { linearRegression } from '#shared/numerics/linear-regression.ts'

type Model = (parameters: ArrayLike<number>, x: number) => number

function makeProblem(model: Model, x: number[], y: number[], unknowns: Partial<FitUnknown>[]): LeastSquaresProblem {
  return {
    count: x.length,
    unknowns: unknowns.map((unknown) => ({ low: -1e9, high: 1e9, scale: 'linear', ...unknown })),
    residuals: (parameters, residuals) =>
      x.forEach((value, i) => (residuals[i] = model(parameters, value) - (y[i] as number))),
  }
}

const at = (values: ArrayLike<number>, index: number) => values[index] as number
const exponential: Model = (b, x) => at(b, 0) * (1 - Math.exp(-at(b, 1) * x))
const straight: Model = (b, x) => at(b, 0) + at(b, 1) * x

/** NIST Statistical Reference Datasets, nonlinear regression, Misra1a with certified values; from memory. */
const misra = {
  x: [77.6, 114.9, 141.1, 190.8, 239.9, 289.0, 332.8, 378.4, 434.8, 477.3, 536.8, 593.1, 689.1, 760.0],
  y: [10.07, 14.73, 17.94, 23.93, 29.61, 35.18, 40.02, 44.82, 50.76, 55.05, 61.01, 66.4, 75.47, 81.78],
  parameters: [2.3894212918e2, 5.5015643181e-4],
  deviations: [2.7070075241, 7.2668688436e-6],
  objective: 1.2455138894e-1,
}

describe('Levenberg–Marquardt', () => {
  it.each([[[500, 1e-4]], [[250, 5e-4]]])('reaches the certified NIST Misra1a values from %j', (start) => {
    const fit = levenbergMarquardt(makeProblem(exponential, misra.x, misra.y, [{}, {}]), { starts: [start] })
    fit.parameters.forEach((value, k) => expect(value / at(misra.parameters, k)).toBeCloseTo(1, 8))
    fit.covariance.forEach((row, k) => expect(Math.sqrt(at(row, k)) / at(misra.deviations, k)).toBeCloseTo(1, 5))
    expect(fit.objective / misra.objective).toBeCloseTo(1, 9)
    expect(fit).toMatchObject({ converged: true, singular: false, warnings: [] })
  })

  it('finds the same minimum on log scale, with relative deviations', () => {
    const unknown: FitUnknown = { low: 1e-9, high: 1e9, scale: 'log' }
    const problem = makeProblem(exponential, misra.x, misra.y, [unknown, unknown])
    const fit = levenbergMarquardt(problem, { starts: [[100, 1e-3]] })
    fit.parameters.forEach((value, k) => {
      expect(value / at(misra.parameters, k)).toBeCloseTo(1, 7)
      const relative = at(misra.deviations, k) / at(misra.parameters, k)
      expect(Math.sqrt(at(fit.covariance[k] as number[], k)) / relative).toBeCloseTo(1, 4)
    })
  })

  it('equals linear regression on a straight line', () => {
    const points = fc.array(fc.tuple(fc.integer({ min: -50, max: 50 }), fc.double({ min: -9, max: 9, noNaN: true })), {
      minLength: 4,
      maxLength: 20,
    })
    fc.assert(
      fc.property(points, (pairs) => {
        const x = pairs.map(([value]) => value)
        fc.pre(new Set(x).size > 2)
        const y = pairs.map(([, value]) => value)
        const line = linearRegression(x, y)
        const fit = levenbergMarquardt(makeProblem(straight, x, y, [{}, {}]), { starts: [[0, 0]] })
        expect(at(fit.parameters, 1)).toBeCloseTo(line.slope, 7)
        expect(fit.objective).toBeCloseTo(line.sumOfSquares, 7)
      }),
    )
  })

  it('keeps to bounds, stops on them and says so', () => {
    const x = [0, 1, 2, 3]
    const problem = makeProblem(
      straight,
      x,
      x.map((value) => 1 + 2 * value),
      [{}, { high: 1.5 }],
    )
    const fit = levenbergMarquardt(problem, { starts: [[0, 0]] })
    expect(fit.parameters[1]).toBe(1.5)
    expect(fit.parameters[0]).toBeCloseTo(1.75, 8)
    expect(fit.atBound).toEqual([1])
    expect(fit.warnings).toContain('at-bound')
    expect(fit.converged).toBe(true)
  })

  it('leaves a bound on which it starts when the minimum lies inside', () => {
    const x = [0, 1, 2, 3]
    const problem = makeProblem(
      straight,
      x,
      x.map((value) => 1 + 2 * value),
      [{ low: 0 }, { low: 0 }],
    )
    const fit = levenbergMarquardt(problem, { starts: [[0, 0]] })
    expect(fit.parameters[1]).toBeCloseTo(2, 8)
    expect(fit.atBound).toEqual([])
  })

  it('says when parameters cannot be told apart', () => {
    const x = [1, 2, 3, 4]
    const product: Model = (b, value) => at(b, 0) * at(b, 1) * value
    const fit = levenbergMarquardt(makeProblem(product, x, [2, 4.1, 5.9, 8], [{}, {}]), { starts: [[1, 1]] })
    expect(fit.singular).toBe(true)
    expect(fit.warnings).toContain('singular')
    expect(at(fit.parameters, 0) * at(fit.parameters, 1)).toBeCloseTo(59.9 / 30, 8)
  })

  it('keeps the best of several starts and says that they ended apart', () => {
    const x = Array.from({ length: 40 }, (_, i) => i / 4)
    const wave: Model = (b, value) => Math.sin(at(b, 0) * value)
    const problem = makeProblem(
      wave,
      x,
      x.map((value) => Math.sin(1.3 * value)),
      [{ low: 0.01, high: 20 }],
    )
    const fit = levenbergMarquardt(problem, { starts: [[6], [1.2], [11]] })
    expect(fit.parameters[0]).toBeCloseTo(1.3, 8)
    expect(fit.warnings).toContain('starts-disagree')
  })

  it('reports a search that was cut short', () => {
    const problem = makeProblem(exponential, misra.x, misra.y, [{}, {}])
    const fit = levenbergMarquardt(problem, { starts: [[500, 1e-4]], mostIterations: 2 })
    expect(fit.converged).toBe(false)
    expect(fit.warnings).toContain('not-converged')
  })

  it('survives a start where the model does not answer, and refuses when no start does', () => {
    const root: Model = (b, x) => Math.sqrt(at(b, 0) - 1) * x
    const problem = makeProblem(root, [1, 2, 3], [1, 2, 3], [{}])
    expect(levenbergMarquardt(problem, { starts: [[-5], [3]] }).parameters[0]).toBeCloseTo(2, 8)
    expect(() => levenbergMarquardt(problem, { starts: [[-5]] })).toThrow(RangeError)
  })

  it('refuses to start from nowhere or with fewer residuals than unknowns', () => {
    expect(() => levenbergMarquardt(makeProblem(straight, [1, 2], [1, 2], [{}, {}]), { starts: [] })).toThrow(
      RangeError,
    )
    expect(() => levenbergMarquardt(makeProblem(straight, [1], [1], [{}, {}]), { starts: [[0, 0]] })).toThrow(
      RangeError,
    )
  })
})
