import { Matrix, inverse, determinant } from 'ml-matrix'
import { describe, expect, it } from 'vitest'
import { lagOneAutocorrelation } from '#shared/numerics/autocorrelation.ts'
import { correlatedCovariance } from '#shared/numerics/correlated-residuals.ts'
import { noiseSums, WHITE, type ResidualSeries } from '#shared/numerics/fading-noise.ts'
import { invertSymmetric } from '#shared/numerics/small-matrix.ts'
import { makeNoise } from './make-noise.ts'

function makeSeries(seed: number, { count = 40, phi = 0 } = {}): ResidualSeries {
  const time = Array.from({ length: count }, (_, i) => 60 * 1.2 ** i)
  return {
    residuals: makeNoise(seed, count, { phi }),
    jacobian: time.flatMap((value) => [1, Math.log(value)]),
    axes: [time, time.map(Math.log)],
  }
}

function normalInverseOf(series: ResidualSeries[]): number[][] {
  const rows = series.flatMap((one) =>
    Array.from({ length: one.residuals.length }, (_, i) => [
      one.jacobian[2 * i] as number,
      one.jacobian[2 * i + 1] as number,
    ]),
  )
  const J = new Matrix(rows)
  return invertSymmetric(J.transpose().mmul(J).to2DArray()).inverse
}

describe('covariance with correlated residuals', () => {
  it.each([
    [0, 500, 0.7],
    [1, 0.8, 1],
    [1, 0.1, 0.4],
  ])('sums by the filter as dense matrices do (axis %d, reach %d, share %d)', (axis, reach, share) => {
    const series = makeSeries(1, { count: 25, phi: 0.5 })
    const position = series.axes[axis] as number[]
    const R = Matrix.zeros(25, 25)
    for (let i = 0; i < 25; i++) {
      for (let j = 0; j < 25; j++) {
        const gap = Math.abs((position[i] as number) - (position[j] as number))
        R.set(i, j, i === j ? 1 : share * Math.exp(-gap / reach))
      }
    }
    const J = new Matrix(
      Array.from({ length: 25 }, (_, i) => [series.jacobian[2 * i] as number, series.jacobian[2 * i + 1] as number]),
    )
    const r = Matrix.columnVector(Array.from(series.residuals))
    const weight = inverse(R)
    const sums = noiseSums([series], 2, { axis, reach, share })
    expect(sums.squares).toBeCloseTo(r.transpose().mmul(weight).mmul(r).get(0, 0), 8)
    expect(sums.logDeterminant).toBeCloseTo(Math.log(determinant(R)), 8)
    const dense = (inner: Matrix) => J.transpose().mmul(inner).mmul(J).to2DArray()
    sums.whitened.forEach((row, i) =>
      row.forEach((value, j) => expect(value / (dense(weight)[i] as number[])[j]!).toBeCloseTo(1, 8)),
    )
    sums.spread.forEach((row, i) =>
      row.forEach((value, j) => expect(value / (dense(R)[i] as number[])[j]!).toBeCloseTo(1, 8)),
    )
    const projected = J.transpose().mmul(weight).mmul(r).to1DArray()
    sums.projected.forEach((value, i) => expect(value).toBeCloseTo(projected[i] as number, 7))
  })

  it('is the ordinary covariance when residuals have no order', () => {
    const series = { ...makeSeries(3), axes: [] }
    const N = normalInverseOf([series])
    const { squares, projected } = noiseSums([series], 2, WHITE)
    const explained = projected.reduce(
      (sum, a, i) => sum + projected.reduce((part, b, j) => part + a * b * (N[i] as number[])[j]!, 0),
      0,
    )
    const { covariance, effectiveNumber } = correlatedCovariance([series], N)
    covariance.forEach((row, i) =>
      row.forEach((value, j) =>
        expect(value / ((N[i] as number[])[j]! * ((squares - explained) / 38))).toBeCloseTo(1, 10),
      ),
    )
    expect(effectiveNumber).toBe(40)
  })

  it('widens for correlated residuals and hardly for independent ones (seeds 1 to 20)', () => {
    const effective = (phi: number) =>
      Array.from({ length: 20 }, (_, k) => {
        const series = makeSeries(k + 1, { count: 60, phi })
        return correlatedCovariance([series], normalInverseOf([series])).effectiveNumber
      }).sort((a, b) => a - b)
    expect(effective(0)[10]).toBeGreaterThan(30)
    expect(effective(0.85)[10]).toBeLessThan(10)
  })

  it('scales with the square of the residuals and does not care for the unit of time', () => {
    const series = makeSeries(5, { phi: 0.6 })
    const N = normalInverseOf([series])
    const { covariance } = correlatedCovariance([series], N)
    const minutes = (series.axes[0] as number[]).map((value) => value / 60)
    const other = {
      ...series,
      residuals: Array.from(series.residuals, (value) => 3 * value),
      axes: [minutes, minutes.map(Math.log)],
    }
    const scaled = correlatedCovariance([other], N).covariance
    scaled.forEach((row, i) =>
      row.forEach((value, j) => expect(value / (9 * (covariance[i] as number[])[j]!)).toBeCloseTo(1, 8)),
    )
  })

  it('stays finite for residuals that are all zero and readings at one moment', () => {
    const series = { ...makeSeries(1), residuals: new Array<number>(40).fill(0) }
    const N = normalInverseOf([series])
    expect(
      correlatedCovariance([series], N)
        .covariance.flat()
        .every((value) => value === 0),
    ).toBe(true)
    const crowded = makeSeries(2, { count: 10 })
    const twice = {
      ...crowded,
      axes: crowded.axes.map((axis) => Array.from(axis, (value, i) => (i === 5 ? (axis[4] as number) : value))),
    }
    const { covariance } = correlatedCovariance([twice], normalInverseOf([crowded]))
    expect(covariance.flat().every(Number.isFinite)).toBe(true)
  })
})

describe('lag-1 autocorrelation', () => {
  it('is near the one that made the residuals, and zero for none', () => {
    expect(lagOneAutocorrelation([makeNoise(1, 5000, { phi: 0.7 })])).toBeCloseTo(0.7, 1)
    expect(lagOneAutocorrelation([[], [0, 0]])).toBe(0)
  })

  it('does not tie the end of one series to the start of the next', () => {
    expect(lagOneAutocorrelation([[1], [1]])).toBe(0)
    expect(lagOneAutocorrelation([[1, 1]])).toBe(0.5)
  })
})
