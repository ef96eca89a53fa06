export interface LineFit {
  slope: number
  intercept: number
  /** Covariance of (intercept, slope) when residuals are independent. */
  covariance: [[number, number], [number, number]]
  residuals: number[]
  sumOfSquares: number
  count: number
}

/** Degrees of freedom left by a line, at least one, so that two points give an interval too wide rather than none. */
export const lineFreedom = (count: number) => Math.max(1, count - 2)

/**
 * Ordinary least squares of y on x.
 * @throws RangeError with fewer than two points, unequal lengths, or all x equal
 */
export function linearRegression(x: ArrayLike<number>, y: ArrayLike<number>): LineFit {
  const count = x.length
  if (count < 2 || y.length !== count)
    throw new RangeError(`Cannot draw a line through ${count} and ${y.length} values`)
  const { meanX, meanY, sxx, sxy } = moments(x, y)
  if (!(sxx > 0)) throw new RangeError('Cannot draw a line: all abscissas are equal')
  const slope = sxy / sxx
  return describeLine(x, y, slope, meanY - slope * meanX)
}

/** Residuals and covariance of a given line, for example one drawn by hand, over the points (x, y). */
export function describeLine(x: ArrayLike<number>, y: ArrayLike<number>, slope: number, intercept: number): LineFit {
  const count = x.length
  const { meanX, sxx } = moments(x, y)
  const residuals = Array.from(x, (xi, i) => (y[i] as number) - intercept - slope * xi)
  const sumOfSquares = residuals.reduce((sum, residual) => sum + residual * residual, 0)
  const variance = sumOfSquares / lineFreedom(count)
  const slopeVariance = sxx > 0 ? variance / sxx : 0
  const covariance: LineFit['covariance'] = [
    [variance / count + meanX * meanX * slopeVariance, -meanX * slopeVariance],
    [-meanX * slopeVariance, slopeVariance],
  ]
  return { slope, intercept, covariance, residuals, sumOfSquares, count }
}

function moments(x: ArrayLike<number>, y: ArrayLike<number>) {
  const count = x.length
  let meanX = 0
  let meanY = 0
  for (let i = 0; i < count; i++) {
    meanX += (x[i] as number) / count
    meanY += (y[i] as number) / count
  }
  let sxx = 0
  let sxy = 0
  for (let i = 0; i < count; i++) {
    const dx = (x[i] as number) - meanX
    sxx += dx * dx
    sxy += dx * ((y[i] as number) - meanY)
  }
  return { meanX, meanY, sxx, sxy }
}
