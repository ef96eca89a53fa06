/**
 * Modified Bessel functions of orders 0 and 1 for complex arguments in the right half-plane (Re z > 0), as they are
 * needed for the inversion of Laplace transforms. Every function takes Re z and Im z and overwrites the first four
 * numbers of `out`: Re and Im of order 0, then of order 1. Nothing is allocated.
 * Relative error ≤ 1e-12 of |K|, and of the larger of |I0| and |I1| (near a zero of one of them the other measures).
 */
import { timesExponential } from './complex-pair.ts'
import { asymptoticI, asymptoticK } from './complex-bessel-asymptotic.ts'
import { seriesI, seriesK } from './complex-bessel-series.ts'
import { fractionK, recurrenceI } from './complex-bessel-recurrence.ts'

/** Up to here the power series lose at most one digit to cancellation, wherever z lies. */
const SERIES_LIMIT = 2
/** From here on the smallest term of the asymptotic series is below the rounding error: e^(-2|z|) < 1e-16. */
const ASYMPTOTIC_FROM = 18.5

/** e^z·K0(z) and e^z·K1(z), Re z > 0; finite for every such z. @throws RangeError */
export function complexKScaled(re: number, im: number, out: Float64Array): void {
  const modulus = checkedModulus(re, im)
  if (modulus <= SERIES_LIMIT) seriesK(re, im, out)
  else if (modulus < ASYMPTOTIC_FROM) fractionK(re, im, out)
  else asymptoticK(re, im, out)
}

/** e^-z·I0(z) and e^-z·I1(z), Re z > 0; finite for every such z. @throws RangeError */
export function complexIScaled(re: number, im: number, out: Float64Array): void {
  const modulus = checkedModulus(re, im)
  if (modulus <= SERIES_LIMIT) seriesI(re, im, out)
  else if (modulus < ASYMPTOTIC_FROM) recurrenceI(re, im, out)
  else asymptoticI(re, im, out)
}

/** K0(z) and K1(z), Re z > 0; zero where they underflow. @throws RangeError */
export function complexK(re: number, im: number, out: Float64Array): void {
  complexKScaled(re, im, out)
  timesExponential(-re, -im, out)
}

/** I0(z) and I1(z), Re z > 0; not finite beyond Re z of about 709. @throws RangeError */
export function complexI(re: number, im: number, out: Float64Array): void {
  complexIScaled(re, im, out)
  timesExponential(re, im, out)
}

function checkedModulus(re: number, im: number): number {
  if (!(re > 0) || !Number.isFinite(im)) throw new RangeError(`No Bessel function of ${re} + ${im}i: Re z > 0 needed`)
  return Math.hypot(re, im)
}
