import { normalQuantile } from '#shared/numerics/normal.ts'
import { studentQuantile } from '#shared/numerics/student.ts'

/** Drawdown in the pumped well s = B·Q + C·Q^P at one time after pumping began. */
export interface WellLoss {
  B: number
  C: number
  P: number
  /** Covariance of (B, C, P); zero for an exponent that was given. */
  covariance: number[][]
  freedom: number
  /** Relative standard deviation of the rates: one meter measured all of them. */
  rateError: number
  /** Lowest and highest rate tested. */
  rates: { low: number; high: number }
  /** Time after the beginning of pumping for which it holds. */
  increment_s: number
}

/** Source: Jacob 1947 with P = 2; Rorabaugh 1953. */
export const lossDrawdown = ({ B, C, P }: Pick<WellLoss, 'B' | 'C' | 'P'>, rate_m3_s: number) =>
  B * rate_m3_s + C * rate_m3_s ** P

/**
 * Share BQ/(BQ + CQ^P) of the drawdown that grows in proportion to the rate. It is no efficiency: B holds the linear
 * losses of the well beside those of the aquifer.
 */
export const laminarShare = (loss: Pick<WellLoss, 'B' | 'C' | 'P'>, rate_m3_s: number) =>
  (loss.B * rate_m3_s) / lossDrawdown(loss, rate_m3_s)

export interface Prediction {
  rate_m3_s: number
  drawdown_m: number
  low_m: number
  high_m: number
  /** Rate per drawdown, m²/s. */
  specificCapacity: number
  laminarShare: number
  /** The rate lies outside those tested. */
  beyond: boolean
}

/** Drawdown and specific capacity at a rate, with a 95 % interval from the scatter of the steps. */
export function predict(loss: WellLoss, rate_m3_s: number): Prediction {
  const drawdown_m = lossDrawdown(loss, rate_m3_s)
  const turbulent = rate_m3_s ** loss.P
  const gradient = [rate_m3_s, turbulent, loss.C * turbulent * Math.log(rate_m3_s)]
  const half = studentQuantile(0.975, loss.freedom) * Math.sqrt(Math.max(0, quadratic(loss.covariance, gradient)))
  return {
    rate_m3_s,
    drawdown_m,
    low_m: drawdown_m - half,
    high_m: drawdown_m + half,
    specificCapacity: rate_m3_s / drawdown_m,
    laminarShare: laminarShare(loss, rate_m3_s),
    beyond: rate_m3_s < loss.rates.low || rate_m3_s > loss.rates.high,
  }
}

/** 95 % interval of B, C or P from the scatter of the steps and the common error of the rates. */
export function lossInterval(loss: WellLoss, index: 0 | 1 | 2): { value: number; low: number; high: number } {
  const value = [loss.B, loss.C, loss.P][index] as number
  const power = [1, loss.P, 0][index] as number
  const sd = Math.sqrt(Math.max(0, (loss.covariance[index] as number[])[index] as number))
  const half = Math.hypot(
    studentQuantile(0.975, loss.freedom) * sd,
    normalQuantile(0.975) * power * loss.rateError * value,
  )
  return { value, low: value - half, high: value + half }
}

const quadratic = (matrix: number[][], vector: number[]) =>
  vector.reduce(
    (sum, a, i) => sum + vector.reduce((part, b, j) => part + a * b * ((matrix[i] as number[])[j] as number), 0),
    0,
  )
