import { besselK0, besselK1 } from './bessel.ts'
import { exponentialIntegral } from './exponential-integral.ts'
import { gaussLegendre } from './gauss-legendre.ts'

/** Up to these the series is short and loses less than four digits to cancellation. */
const SERIES_LIMIT = { u: 4, v: 1 }
const MOST_TERMS = 60
const TERM_SMALL = 1e-15
/** The integrand is followed until it has fallen by e^-26 = 5e-12. */
const FALL = 26
/** Beyond this exponent above that of K0 the reflected integral is below the rounding error of K0. */
const STEADY_FROM = 37
const { nodes, weights } = gaussLegendre(16)

/** Writes W(u, ρ) and its derivatives by ln u and ln ρ into the first three numbers of `out`. */
export type LeakyEvaluation = (u: number, out: Float64Array) => void

/**
 * Leaky well function W(u, ρ) = ∫_u^∞ exp(−y − ρ²/(4y))/y dy for one ρ = r/B > 0 and any number of u > 0.
 * Relative error ≤ 1e-8 for u in 1e-15…50 and ρ in 1e-6…10 (1e-11 in the tests); zero where it underflows.
 * Where u < ρ/2 the reflection W(u, ρ) = 2K0(ρ) − W(ρ²/(4u), ρ) is used, so that the integral always begins above its
 * integrand's peak.
 * @throws RangeError for ρ or u that are not positive
 * Source: Hantush & Jacob 1955; reflection and series: Hantush 1956; Hunt 1977, J. Hydrol. 33, 179–183 (from memory).
 */
export function leakyWellFunction(rho: number): LeakyEvaluation {
  if (!(rho > 0)) throw new RangeError(`The leaky well function needs r/B above zero, not ${rho}`)
  const quarter = (rho * rho) / 4
  const steady = 2 * besselK0(rho)
  const steadySlope = -2 * rho * besselK1(rho)
  return (u, out) => {
    if (!(u > 0)) throw new RangeError(`The leaky well function needs a positive u, not ${u}`)
    const v = quarter / u
    const decay = Math.exp(-u - v)
    if (v <= u) upper(u, v, out)
    else if (u + v < rho + STEADY_FROM) {
      upper(v, u, out)
      out[0] = steady - (out[0] as number)
      out[2] = steadySlope + 2 * decay - (out[2] as number)
    } else {
      out[0] = steady
      out[2] = steadySlope
    }
    out[1] = -decay
  }
}

/** W(u, r/B) alone. */
export function leakyW(u: number, rho: number): number {
  const out = new Float64Array(3)
  leakyWellFunction(rho)(u, out)
  return out[0] as number
}

/** W and its derivative by ln ρ where v = ρ²/(4u) ≤ u, into `out[0]` and `out[2]`. */
function upper(u: number, v: number, out: Float64Array): void {
  if (u <= SERIES_LIMIT.u && v <= SERIES_LIMIT.v) series(u, v, out)
  else quadrature(u, v, out)
}

/** W = Σ (−v)ⁿ/n!·E(n+1, u); the generalised exponential integrals by recurrence (Abramowitz & Stegun 5.1.14). */
function series(u: number, v: number, out: Float64Array): void {
  const decay = Math.exp(-u)
  let integral = exponentialIntegral(u)
  let power = 1
  let value = integral
  let slope = 0
  const enough = TERM_SMALL * integral
  for (let n = 1; n < MOST_TERMS; n++) {
    integral = (decay - u * integral) / n
    power *= -v / n
    const term = power * integral
    value += term
    slope += 2 * n * term
    if (Math.abs(term) * n < enough) break
  }
  out[0] = value
  out[2] = slope
}

/** With y = u·e^t the integral is ∫_0^∞ exp(−u·e^t − v·e^-t) dt, whose exponent is convex and rises from the start. */
function quadrature(u: number, v: number, out: Float64Array): void {
  const length = fallLength(u, v)
  let value = 0
  let slope = 0
  for (let i = 0; i < nodes.length; i++) {
    const t = length * (nodes[i] as number)
    const growth = Math.exp(t)
    const part = (weights[i] as number) * Math.exp(-u * growth - v / growth)
    value += part
    slope += part / growth
  }
  out[0] = length * value
  out[2] = -2 * v * length * slope
}

/** The t at which u·(e^t − 1) + v·(e^-t − 1) reaches FALL: a bound by a parabola, then Newton steps from above. */
function fallLength(u: number, v: number): number {
  const [half, difference] = [(u + v) / 2, u - v]
  let t = (2 * FALL) / (difference + Math.sqrt(difference * difference + 4 * half * FALL))
  for (let i = 0; i < 4; i++) {
    const [growth, decline] = [u * Math.exp(t), v * Math.exp(-t)]
    t -= (growth + decline - u - v - FALL) / (growth - decline)
  }
  return t
}
