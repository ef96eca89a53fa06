/**
 * Quadrature of Hankel transforms of order zero, H(ρ) = ∫_0^∞ x·F(x)·J0(xρ) dx = ρ⁻²·Σ weight·F(y/ρ), and of
 * ρ·dH/dρ = ρ⁻²·Σ slopeWeight·F(y/ρ), for functions F that are analytic about the positive axis, even with features that span many factors of ten, and that may fall as slowly
 * as 1/x². The points are y = A·ln(1 + e^w) at equal steps of w: spaced evenly in ln y below A, where F may have
 * features, and evenly in y above, where J0 turns. A smooth window in place of an end makes what is cut off vanish
 * against the turns of J0.
 * Source: trapezoidal rule for analytic functions, Trefethen & Weideman 2014, SIAM Review 56, 385–458.
 */
export interface HankelRule {
  /** Ascending. */
  y: Float64Array
  weight: Float64Array
  slopeWeight: Float64Array
  /** Sums of the weights of all points below: where F no longer changes it is taken once for all of them. */
  below: Float64Array
  slopeBelow: Float64Array
}

const STEP = 0.25
/** Between points spaced by ratio and by difference; the difference is A times the step, 2.5 against the 2π of a turn. */
const A = 10
const LOWEST_Y = 1e-16
/** Centre and width of the window: J0 turns often enough in the width for e^(-width²/2) to be below 1e-8. */
const WINDOW = { centre: 44, width: 6.5 }

/** Made once, on first use: points and weights are the same for every transform. */
let kept: HankelRule | null = null

export function hankelRule(): HankelRule {
  kept ??= makeRule()
  return kept
}

/** Index of the first point at y or above. */
export function firstPoint(y: number): number {
  const w = Math.log(Math.expm1(Math.max(y, LOWEST_Y) / A))
  return Math.max(0, Math.ceil((w - LOWEST_W) / STEP))
}

const LOWEST_W = Math.log(Math.expm1(LOWEST_Y / A))

function makeRule(): HankelRule {
  const highest = (WINDOW.centre + 6.5 * WINDOW.width) / A
  const w = Array.from({ length: Math.ceil((highest - LOWEST_W) / STEP) }, (_, j) => LOWEST_W + j * STEP)
  const y = w.map((value) => A * Math.log1p(Math.exp(value)))
  const share = y.map((value, j) => {
    const slope = A / (1 + Math.exp(-(w[j] as number)))
    return STEP * slope * value * normalShare((WINDOW.centre - value) / WINDOW.width)
  })
  const times = (factor: (value: number) => number) =>
    Float64Array.from(y, (value, j) => (share[j] as number) * factor(value))
  const weight = times((value) => meanOverHalfTurn(value, Math.cos))
  const slopeWeight = times((value) => -value * meanOverHalfTurn(value, (angle, sine) => Math.sin(angle) * sine))
  return { y: Float64Array.from(y), weight, slopeWeight, below: sumsBelow(weight), slopeBelow: sumsBelow(slopeWeight) }
}

function sumsBelow(weights: Float64Array): Float64Array {
  let sum = 0
  return weights.map((weight) => (sum += weight) - weight)
}

/**
 * Mean over θ from 0 to π of a function of y·sin θ and sin θ: J0(y) of the cosine, J1(y) of the sine times sin θ. The
 * midpoint rule is off by J of twice the number of points only. Source: Abramowitz & Stegun 1964, 9.1.18 and 9.1.20.
 */
function meanOverHalfTurn(y: number, value: (angle: number, sine: number) => number): number {
  const points = Math.ceil(y / 2) + 20
  let sum = 0
  for (let k = 0; k < points; k++) {
    const sine = Math.sin((Math.PI * (k + 0.5)) / points)
    sum += value(y * sine, sine)
  }
  return sum / points
}

/** Φ(x), good to the rounding error of 1, for |x| up to 7. Source: Abramowitz & Stegun 1964, 26.2.11. */
function normalShare(x: number): number {
  let term = x
  let sum = x
  for (let k = 1; Math.abs(term) > 1e-18; k++) {
    term *= (x * x) / (2 * k + 1)
    sum += term
  }
  return 0.5 + (Math.exp((-x * x) / 2) / Math.sqrt(2 * Math.PI)) * sum
}
