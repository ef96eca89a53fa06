import { leakyWellFunction, type LeakyEvaluation } from '#shared/numerics/leaky-well-function.ts'
import { penetrationModes, type PenetrationModes } from './penetration-modes.ts'
import type { ResponsePlace } from './place.ts'

/** Writes the added term and its derivatives by ln u, ln(Kz/Kr) and ln(r/B) into the first four numbers of `out`. */
export type PenetrationCorrection = (u: number, out: Float64Array) => void

/** A mode is steady once what its drawdown lacks is below e^-37 of it. */
const STEADY_EXPONENT = 37

/**
 * What partial penetration adds to W(u), or to W(u, r/B): Σ 2·Aₙ·A'ₙ·W(u, √((r/B)² + (nπr/b)²·Kz/Kr)), n = 1, 2, …, in
 * which Aₙ and A'ₙ are the means of cos(nπz/b) over the open parts of the pumped well and of the place. Exact for a well
 * whose inflow is the same all along its screen; modes that are steady at a time come from sums made once.
 * @param anisotropy Kz/Kr, vertical over horizontal conductivity
 * @param leakage r/B of a leaky aquifer, 0 in a confined one
 * @throws AnalysisError without thickness, without any screen, or with a screen outside the aquifer
 * Source: Hantush 1961, J. Hydraul. Div. ASCE 87(HY4), 83–98, and 87(HY5), 171–194; with leakage: Hantush 1964, Advances
 * in Hydroscience 1, 281–432.
 */
export function penetrationCorrection(place: ResponsePlace, anisotropy: number, leakage = 0): PenetrationCorrection {
  const modes = penetrationModes(place, anisotropy, leakage)
  const evaluations: LeakyEvaluation[] = []
  const values = new Float64Array(3)
  return (u, out) => {
    const moving = movingModes(modes, u)
    let [value, byU, byAnisotropy, byLeakage] = [
      modes.steady.value[moving] as number,
      0,
      modes.steady.byAnisotropy[moving] as number,
      modes.steady.byLeakage[moving] as number,
    ]
    for (let i = 0; i < moving; i++) {
      const weight = modes.weights[i] as number
      if (weight === 0) continue
      const evaluate = (evaluations[i] ??= leakyWellFunction(modes.rhos[i] as number))
      evaluate(u, values)
      const share = modes.shares[i] as number
      const byRho = weight * (values[2] as number)
      value += weight * (values[0] as number)
      byU += weight * (values[1] as number)
      byAnisotropy += (byRho * share) / 2
      byLeakage += byRho * (1 - share)
    }
    out[0] = value
    out[1] = byU
    out[2] = byAnisotropy
    out[3] = byLeakage
  }
}

/** How many modes still change: those with (ρ/(2√u) − √u)² below the exponent; ρ grows with the mode. */
function movingModes({ rhos }: PenetrationModes, u: number): number {
  const limit = 2 * Math.sqrt(u) * (Math.sqrt(u) + Math.sqrt(STEADY_EXPONENT))
  let [low, high] = [0, rhos.length]
  while (low < high) {
    const middle = (low + high) >> 1
    if ((rhos[middle] as number) < limit) low = middle + 1
    else high = middle
  }
  return low
}
