import { firstPoint, hankelRule, type HankelRule } from '#shared/numerics/hankel-transform.ts'
import type { LaplaceTransform } from '#shared/numerics/laplace-inversion.ts'
import { layerMean, waterTableShare, type LayerMean, type OpenInterval } from './water-table-layer.ts'

export interface WaterTableAquifer {
  T: number
  /** Elastic storativity of the whole thickness. */
  S: number
  Sy: number
  /** Vertical over horizontal conductivity. */
  anisotropy: number
  thickness_m: number
}

/** A line sink and a place of observation; open intervals as shares of the saturated thickness above the base. */
export interface WaterTablePlace {
  distance_m: number
  source: OpenInterval
  place: OpenInterval
}

/**
 * Below this share of the x at which the layer has its first feature its response is level: what it still changes, of
 * the order of the share's square, weighs as the square of x, so that the whole is off by the fourth power.
 */
const LEVEL_BELOW = 2e-3
/** An exponential of a larger argument adds nothing. */
const SPENT = 40

export const isWhole = ({ low, high }: OpenInterval) => low === 0 && high === 1

/**
 * Drawdown per unit rate in Laplace space, ∫ x·J0(xρ)·mean(√(x² + κ), g) dx/(2πTp), with κ = S·b²p/(aT),
 * g = Sy·b²p/(aT), ρ = (r/b)·√a and a = Kz/Kr. Where source or place is the whole thickness: what a confined aquifer
 * shows beyond this one. Writes the value, its derivative by ln Sy, that by ln r, and the rate of change in time.
 */
export function waterTableTransform(aquifer: WaterTableAquifer, { distance_m, source, place }: WaterTablePlace) {
  const { T, S, Sy, anisotropy, thickness_m } = aquifer
  const perStorage = thickness_m ** 2 / (anisotropy * T)
  const partial = isWhole(source) ? place : isWhole(place) ? source : null
  return transform({
    mean: partial ? overEtaSquared(waterTableShare(partial)) : layerMean(source, place),
    rho: (distance_m / thickness_m) * Math.sqrt(anisotropy),
    kappa: S * perStorage,
    g: Sy * perStorage,
    T,
    // Towards small x the supplied share is level below √κ, the mean of the layer below √(κ + g).
    lowest: (partial ? S : S + Sy) * perStorage,
    depth: partial ? 1 - partial.high : 0,
  })
}

interface Layer {
  mean: LayerMean
  rho: number
  /** κ and g per p. */
  kappa: number
  g: number
  T: number
  /** Square of the first feature's x, per p. */
  lowest: number
  /** The mean falls as e^(−x·depth). */
  depth: number
}

function transform(layer: Layer): LaplaceTransform {
  const { rho, lowest, T } = layer
  const rule = hankelRule()
  const end = layer.depth > 0 ? firstPoint((SPENT * rho) / layer.depth) : rule.y.length
  const sums = new Float64Array(6)
  return (re, im, out) => {
    const scale = lowest * Math.hypot(re, im)
    const first = firstPoint(LEVEL_BELOW * rho * Math.sqrt(scale / (1 + scale)))
    quadrature(layer, rule, first, Math.min(end, rule.y.length), re, im, sums)
    const size = 1 / (2 * Math.PI * T * rho * rho)
    const [overRe, overIm] = [(size * re) / (re * re + im * im), (-size * im) / (re * re + im * im)]
    for (let k = 0; k < 6; k += 2) {
      const [real, imaginary] = [sums[k] as number, sums[k + 1] as number]
      out[k] = real * overRe - imaginary * overIm
      out[k + 1] = real * overIm + imaginary * overRe
    }
    out[6] = size * (sums[0] as number)
    out[7] = size * (sums[1] as number)
  }
}

const values = new Float64Array(4)

/** Sums of the mean, of its derivative by ln g, and of the mean with the weights of the slope in ρ. */
function quadrature(
  { mean, rho, kappa, g }: Layer,
  { y, weight, slopeWeight, below, slopeBelow }: HankelRule,
  first: number,
  end: number,
  re: number,
  im: number,
  sums: Float64Array,
): void {
  let [valueRe, valueIm, byGRe, byGIm, slopeRe, slopeIm] = [0, 0, 0, 0, 0, 0]
  for (let j = first; j < end; j++) {
    const x = (y[j] as number) / rho
    const squareRe = x * x + kappa * re
    // Root with a positive real part, without cancellation on either side.
    const larger = Math.sqrt((Math.sqrt(squareRe * squareRe + (kappa * im) ** 2) + Math.abs(squareRe)) / 2)
    const smaller = (kappa * im) / (2 * larger)
    if (squareRe >= 0) mean(larger, smaller, g * re, g * im, values)
    else mean(Math.abs(smaller), im < 0 ? -larger : larger, g * re, g * im, values)
    let [w, s] = [weight[j] as number, slopeWeight[j] as number]
    if (j === first) {
      w += below[j] as number
      s += slopeBelow[j] as number
    }
    const [real, imaginary] = [values[0] as number, values[1] as number]
    valueRe += w * real
    valueIm += w * imaginary
    slopeRe += s * real
    slopeIm += s * imaginary
    byGRe += w * (values[2] as number)
    byGIm += w * (values[3] as number)
  }
  sums.set([valueRe, valueIm, byGRe, byGIm, slopeRe, slopeIm])
}

function overEtaSquared(mean: LayerMean): LayerMean {
  return (etaRe, etaIm, gRe, gIm, out) => {
    mean(etaRe, etaIm, gRe, gIm, out)
    const [re, im] = [etaRe * etaRe - etaIm * etaIm, 2 * etaRe * etaIm]
    const size = re * re + im * im
    for (let k = 0; k < 4; k += 2) {
      const [real, imaginary] = [out[k] as number, out[k + 1] as number]
      out[k] = (real * re + imaginary * im) / size
      out[k + 1] = (imaginary * re - real * im) / size
    }
  }
}
