import { erfcScaled } from './complementary-error.ts'
import { exponentialIntegral } from './exponential-integral.ts'

/**
 * Step in ln z, and its product with the root of the exponent's curvature: the error of the trapezoidal rule falls like
 * e^(−π²/(2·step)) or e^(−2π²/product²), and is 1e-10 here.
 */
const STEP = { most: 0.2, perWidth: 0.9 }
const MOST_STEPS = 2000
/** A term smaller than this share of the sum ends the summation on its side. */
const NEGLIGIBLE = 1e-13
/** Where the walk over the nodes begins at the least, when β is next to nothing. */
const LEAST_START = 0.1

/**
 * Writes H(u, β) = ∫_u^∞ e^-y/y·erfc(β√u/√(y(y − u))) dy and its derivatives by ln u and ln β into the first three
 * numbers of `out`; u > 0, β ≥ 0. Relative error ≤ 1e-8 for u in 1e-15…50 and β in 0…100; zero where it underflows.
 *
 * With y = u(1 + z) and nodes equidistant in ln z the integrand falls doubly exponentially on both sides (for β
 * near 0 exponentially on the left), and its logarithm is concave: the sum runs from its middle outwards.
 * @throws RangeError
 * Source: Hantush 1960, J. Geophys. Res. 65, 3713–3725; trapezoidal rule: Takahasi & Mori 1974 (both from memory).
 */
export function aquitardWellFunction(u: number, beta: number, out: Float64Array): void {
  if (!(u > 0)) throw new RangeError(`H needs a positive u, not ${u}`)
  if (!(beta >= 0)) throw new RangeError(`H needs β of zero or more, not ${beta}`)
  if (beta === 0) withoutAquitard(u, out)
  else {
    const start = startOf(u, beta)
    const step = stepAt(u, beta, start)
    out.fill(0, 0, 3)
    walk(u, beta, start, Math.exp(step), out)
    walk(u, beta, start * Math.exp(-step), Math.exp(-step), out)
    const scale = step * Math.exp(-u)
    const byBeta = (-2 / Math.sqrt(Math.PI)) * scale * (out[2] as number)
    out[0] = scale * (out[0] as number)
    out[1] = -u * scale * (out[1] as number) - byBeta / 2
    out[2] = byBeta
  }
}

/** H(u, β) alone. */
export function aquitardH(u: number, beta: number): number {
  const out = new Float64Array(3)
  aquitardWellFunction(u, beta, out)
  return out[0] as number
}

function withoutAquitard(u: number, out: Float64Array): void {
  out[0] = exponentialIntegral(u)
  out[1] = -Math.exp(-u)
  out[2] = 0
}

/** The z near the maximum of the integrand, where the exponents u·z and β²/(u·z(1 + z)) are alike. */
function startOf(u: number, beta: number): number {
  const ratio = beta / u
  return Math.max(LEAST_START, ratio < 1 ? ratio : ratio ** (2 / 3))
}

function stepAt(u: number, beta: number, z: number): number {
  const curvature = u * z + (4 * beta * beta) / (u * z * (1 + z))
  return Math.min(STEP.most, STEP.perWidth / Math.sqrt(curvature))
}

/** Adds the nodes on one side: value, −derivative by u, and the part that erfc gives to the derivatives. */
function walk(u: number, beta: number, from: number, growth: number, out: Float64Array): void {
  let [value, byU, byArgument] = [out[0] as number, out[1] as number, out[2] as number]
  let z = from
  for (let i = 0; i < MOST_STEPS; i++) {
    const argument = beta / Math.sqrt(u * z * (1 + z))
    const bell = z * Math.exp(-u * z - argument * argument)
    const term = bell * erfcScaled(argument)
    value += term / (1 + z)
    byU += term
    byArgument += (bell * argument) / (1 + z)
    if (term <= NEGLIGIBLE * byU && term <= NEGLIGIBLE * (1 + z) * value) break
    z *= growth
  }
  out[0] = value
  out[1] = byU
  out[2] = byArgument
}
