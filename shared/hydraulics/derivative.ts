/** Derivative of drawdown by ln t at one reading. */
export interface DerivativePoint {
  time_s: number
  derivative_m: number
}

/** Default smoothing, in factors of ten in time to either side (common practice 0.1 to 0.3). */
export const DERIVATIVE_SMOOTHING = 0.2

/**
 * Derivative ds/d ln t by weighted slopes to the nearest readings at least `smoothing` factors of ten away on either
 * side. Readings nearer than that to an end have no neighbour on one side and get no point, rather than a worse one.
 * @param time_s ascending, positive
 * @throws RangeError for unequal lengths or a negative smoothing
 * Source: Bourdet, Whittle, Douglas & Pirard 1983; Bourdet et al. 1989.
 */
export function logDerivative(
  time_s: ArrayLike<number>,
  drawdown_m: ArrayLike<number>,
  { smoothing = DERIVATIVE_SMOOTHING } = {},
): DerivativePoint[] {
  if (time_s.length !== drawdown_m.length) throw new RangeError('Times and drawdowns differ in number')
  if (!(smoothing >= 0)) throw new RangeError(`No smoothing over ${smoothing} factors of ten`)
  const x = Float64Array.from(time_s, Math.log)
  const reach = smoothing * Math.LN10
  const points: DerivativePoint[] = []
  let left = -1
  let right = 0
  for (let i = 1; i < x.length - 1; i++) {
    const here = x[i] as number
    while (left + 1 < i && (x[left + 1] as number) < here && (x[left + 1] as number) <= here - reach) left++
    while (right < x.length && (right <= i || (x[right] as number) <= here || (x[right] as number) < here + reach))
      right++
    if (left < 0) continue
    if (right >= x.length) break
    const dx1 = here - (x[left] as number)
    const dx2 = (x[right] as number) - here
    const slope1 = ((drawdown_m[i] as number) - (drawdown_m[left] as number)) / dx1
    const slope2 = ((drawdown_m[right] as number) - (drawdown_m[i] as number)) / dx2
    points.push({ time_s: time_s[i] as number, derivative_m: (slope1 * dx2 + slope2 * dx1) / (dx1 + dx2) })
  }
  return points
}
