import { levenbergMarquardt } from '#shared/numerics/levenberg-marquardt.ts'
import { linearRegression } from '#shared/numerics/linear-regression.ts'
import { invertSymmetric } from '#shared/numerics/small-matrix.ts'
import type { StepIncrements, StepPoint } from './increments.ts'
import type { WellLoss } from './well-loss.ts'

/** Bounds of the free exponent. Source: Rorabaugh 1953 found 2.4 to 2.8; wider by common practice. */
export const EXPONENT = { low: 1.5, high: 3.5 }
const LARGEST_SCALED = 1e3

export interface LossFit {
  loss: WellLoss
  /** Measured − calculated drawdown per unit of rate. */
  residuals: number[]
  objective: number
  iterations: number
  converged: boolean
  singular: boolean
  /** The exponent ended on a bound of its search, or C on zero. */
  exponentAtBound: boolean
  lossAtZero: boolean
}

/** s/Q = B + C·Q by linear regression. Source: Jacob 1947; Hantush 1964; Bierschenk 1963. */
export function linearLoss(increments: StepIncrements, rateError: number): LossFit {
  const { points } = increments
  const rates = points.map(({ rate_m3_s }) => rate_m3_s)
  const line = linearRegression(rates, perRates(points))
  const { inverse } = invertSymmetric([
    [rates.length, sum(rates)],
    [sum(rates), sum(rates.map((rate) => rate * rate))],
  ])
  const { variance, freedom } = scatter(increments, line.sumOfSquares, 2)
  const covariance = [...inverse.map((row) => [...row.map((value) => value * variance), 0]), [0, 0, 0]]
  return {
    loss: { B: line.intercept, C: line.slope, P: 2, covariance, freedom, ...conditions(increments, rateError) },
    residuals: line.residuals,
    objective: line.sumOfSquares,
    iterations: 1,
    converged: true,
    singular: false,
    exponentAtBound: false,
    lossAtZero: false,
  }
}

/**
 * s/Q = B + C·Q^(P − 1) by bounded least squares, in rates and drawdowns scaled to their means so that units do not
 * decide how it goes; C is kept from falling below zero, where P would mean nothing. Source: Rorabaugh 1953.
 */
export function freeExponentLoss(increments: StepIncrements, rateError: number): LossFit {
  const { points } = increments
  const y = perRates(points)
  const rate = sum(points.map(({ rate_m3_s }) => rate_m3_s)) / points.length
  const mean = sum(y) / y.length
  const q = points.map(({ rate_m3_s }) => rate_m3_s / rate)
  const fit = levenbergMarquardt(
    {
      count: y.length,
      unknowns: [
        { low: -LARGEST_SCALED, high: LARGEST_SCALED, scale: 'linear' },
        { low: 0, high: LARGEST_SCALED, scale: 'linear' },
        { ...EXPONENT, scale: 'linear' },
      ],
      residuals: (p, out) => fill(q, y, mean, p, out, null),
      jacobian: (p, out, jacobian) => fill(q, y, mean, p, out, jacobian),
    },
    { starts: [1.7, 2, 2.5, 3.2].flatMap((P) => [0.1, 0.6].map((share) => [1 - share, share, P])) },
  )
  const [b = 0, c = 0, P = 2] = fit.parameters
  const C = c * mean * rate ** (1 - P)
  const { variance, freedom } = scatter(increments, fit.objective * mean * mean, 3)
  const scaled = fit.normalInverse.map((row) => row.map((value) => (value * variance) / (mean * mean)))
  const toNatural = [
    [mean, 0, 0],
    [0, mean * rate ** (1 - P), -C * Math.log(rate)],
    [0, 0, 1],
  ]
  return {
    loss: {
      B: b * mean,
      C,
      P,
      covariance: sandwich(toNatural, scaled),
      freedom,
      ...conditions(increments, rateError),
    },
    residuals: Array.from(fit.residuals, (residual) => -residual * mean),
    objective: fit.objective * mean * mean,
    iterations: fit.iterations,
    converged: fit.converged,
    singular: fit.singular,
    exponentAtBound: fit.atBound.includes(2),
    lossAtZero: fit.atBound.includes(1),
  }
}

function fill(
  q: number[],
  y: number[],
  mean: number,
  parameters: ArrayLike<number>,
  residuals: Float64Array,
  jacobian: Float64Array | null,
): void {
  const [b = 0, c = 0, P = 2] = Array.from(parameters)
  q.forEach((rate, i) => {
    const power = rate ** (P - 1)
    residuals[i] = b + c * power - (y[i] as number) / mean
    if (jacobian) jacobian.set([1, power, c * power * Math.log(rate)], 3 * i)
  })
}

/**
 * Variance of s/Q about the model: what the steps show, but never less than the readings within the steps explain;
 * with as many unknowns as steps the readings are all there is.
 */
function scatter({ points, covariance, freedom }: StepIncrements, squares: number, unknowns: number) {
  const left = points.length - unknowns
  const shown = left > 0 ? squares / left : 0
  const explained = sum(covariance.map((row, i) => row[i] as number)) / points.length
  return shown >= explained && left > 0 ? { variance: shown, freedom: left } : { variance: explained, freedom }
}

function conditions({ points, increment_s }: StepIncrements, rateError: number) {
  const rates = points.map(({ rate_m3_s }) => rate_m3_s)
  return { rateError, increment_s, rates: { low: Math.min(...rates), high: Math.max(...rates) } }
}

const perRates = (points: StepPoint[]) => points.map(({ perRate }) => perRate)
const sum = (values: number[]) => values.reduce((total, value) => total + value, 0)

function sandwich(outer: number[][], inner: number[][]): number[][] {
  return outer.map((row) =>
    outer.map((column) =>
      sum(row.map((a, i) => sum(column.map((b, j) => a * b * ((inner[i] as number[])[j] as number))))),
    ),
  )
}
