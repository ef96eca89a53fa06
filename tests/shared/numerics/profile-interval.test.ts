import { describe, expect, it } from 'vitest'
import type { LeastSquaresProblem } from '#shared/numerics/least-squares-problem.ts'
import { levenbergMarquardt } from '#shared/numerics/levenberg-marquardt.ts'
import { profileInterval } from '#shared/numerics/profile-interval.ts'
import { makeNoise } from './make-noise.ts'

const count = 30
const x = Array.from({ length: count }, (_, i) => i / 10)
const noise = makeNoise(4, count)
const y = x.map((value, i) => 1 + 2.25 * value + 0.3 * (noise[i] as number))

/** Level and slope of a line, the slope being some function of the second unknown. */
const line = (slope: (unknown: number) => number, low = -100): LeastSquaresProblem => ({
  count,
  unknowns: [
    { low: -100, high: 100, scale: 'linear' },
    { low, high: 100, scale: 'linear' },
  ],
  residuals: ([level = NaN, unknown = NaN]: number[], out) =>
    x.forEach((value, i) => (out[i] = level + slope(unknown) * value - (y[i] as number))),
})

function profiled(problem: LeastSquaresProblem, halfWidth: number, rise: number) {
  const { parameters, objective, normalInverse } = levenbergMarquardt(problem, { starts: [[0, 1]] })
  const unit = normalInverse[1]?.[1] as number
  const along = normalInverse.map((row) => (row[1] as number) / unit)
  return { parameters, unit, ...profileInterval(problem, { parameters, objective, index: 1, rise, halfWidth, along }) }
}

describe('The interval of a profile', () => {
  const { parameters, normalInverse } = levenbergMarquardt(line(Number), { starts: [[0, 1]] })
  const [slope, unit] = [parameters[1] as number, normalInverse[1]?.[1] as number]
  const half = 0.5
  const rise = half ** 2 / unit

  it('is that of the covariance where the model is straight', () => {
    const { low, high } = profiled(line(Number), half, rise)
    expect(low).toBeCloseTo(slope - half, 2)
    expect(high).toBeCloseTo(slope + half, 2)
  })

  it('is that of the straight model, transformed, where the unknown enters by its square', () => {
    const { low, high } = profiled(
      line((unknown) => unknown ** 2),
      0.05,
      rise,
    )
    expect(low).toBeCloseTo(Math.sqrt(slope - half), 2)
    expect(high).toBeCloseTo(Math.sqrt(slope + half), 2)
  })

  it('ends at the bound of the search where the sum of squares has not risen by then', () => {
    expect(profiled(line(Number, slope - 0.2), half, rise).low).toBe(slope - 0.2)
  })
})
