import { describe, expect, it } from 'vitest'
import type { LeastSquaresProblem } from '#shared/numerics/least-squares-problem.ts'
import { levenbergMarquardt } from '#shared/numerics/levenberg-marquardt.ts'

/** A parabola through 2 and −1 beside a pull towards 2: two minima, the lower one at 2, and a rest that no value takes away. */
function makeProblem() {
  let evaluations = 0
  const problem: LeastSquaresProblem = {
    count: 3,
    unknowns: [{ low: -10, high: 10, scale: 'linear' }],
    residuals: (parameters, out) => {
      evaluations++
      const x = parameters[0] as number
      out[0] = (x - 2) * (x + 1) * 0.8
      out[1] = 0.3 * (x - 2)
      out[2] = 0.5
    },
  }
  return { problem, spent: () => evaluations }
}

function evaluationsFor(starts: number[][]): number {
  const { problem, spent } = makeProblem()
  levenbergMarquardt(problem, { starts })
  return spent()
}

describe('least squares from several starts', () => {
  it('end in the lowest minimum, whichever start comes first', () => {
    for (const starts of [
      [[-1.2], [3]],
      [[3], [-1.2]],
      [[3], [2.5], [-1.2]],
    ]) {
      const { problem } = makeProblem()
      const fit = levenbergMarquardt(problem, { starts })
      expect(fit.parameters[0]).toBeCloseTo(2, 9)
      expect(fit.warnings).toContain('starts-disagree')
    }
  })

  it('are not followed twice into one minimum', () => {
    const [one, other] = [evaluationsFor([[3]]), evaluationsFor([[5]])]
    expect(evaluationsFor([[3], [5]])).toBeLessThan(one + other)
    const { problem } = makeProblem()
    const alone = levenbergMarquardt(problem, { starts: [[3]] })
    const both = levenbergMarquardt(problem, { starts: [[3], [5]] })
    expect(both.parameters).toEqual(alone.parameters)
    expect(both.warnings).toEqual(alone.warnings)
  })
})
