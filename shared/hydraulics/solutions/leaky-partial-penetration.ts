import { leakyWellFunction } from '#shared/numerics/leaky-well-function.ts'
import { storativity, transmissivity } from '../method.ts'
import { penetrationCorrection } from '../penetration.ts'
import type { ResponsePlace } from '../place.ts'
import { theisU } from '../small-u.ts'
import type { Solution } from '../solution.ts'
import type { Respond } from '../superposition.ts'
import { leakageFactor, leaky } from './leaky.ts'
import { anisotropyRatio, partialPenetration } from './partial-penetration.ts'
import { shapeStarts } from './shape-starts.ts'

/** r/B and Kz/Kr of the starts. */
const RATIOS = [0.05, 0.3, 1].flatMap((leakage) => [0.01, 0.1, 1].map((anisotropy) => ({ leakage, anisotropy })))

/**
 * Unit-rate response of a well open to a part of a leaky aquifer; derivatives by ln T, ln S, ln B and ln(Kz/Kr).
 * The response is (W(u, r/B) + added term)/(4πT).
 * Source: Hantush 1964, Advances in Hydroscience 1, 281–432. @throws AnalysisError, see penetrationCorrection
 */
export function leakyPartialPenetrationRespond(parameters: ArrayLike<number>, place: ResponsePlace): Respond {
  const [T = NaN, S = NaN, B = NaN, anisotropy = NaN] = Array.from(parameters)
  const factor = 1 / (4 * Math.PI * T)
  const rho = place.distance_m / B
  const evaluate = leakyWellFunction(rho)
  const correct = penetrationCorrection(place, anisotropy, rho)
  const whole = new Float64Array(3)
  const added = new Float64Array(4)
  return (time_s, out) => {
    const u = theisU(T, S, place.distance_m, time_s)
    evaluate(u, whole)
    correct(u, added)
    const W = (whole[0] as number) + (added[0] as number)
    const byU = (whole[1] as number) + (added[1] as number)
    out[0] = factor * W
    out[1] = factor * (-W - byU)
    out[2] = factor * byU
    out[3] = -factor * ((whole[2] as number) + (added[3] as number))
    out[4] = factor * (added[2] as number)
  }
}

export const leakyPartialPenetration: Solution = {
  id: 'leaky-partial-penetration',
  label: 'Partially penetrating wells, leaky (Hantush)',
  version: 1,
  source: 'Hantush 1964',
  aquifers: ['leaky'],
  known: ['thickness', 'short-screen'],
  shift: { storages: ['S'] },
  unknowns: [transmissivity, storativity, leakageFactor, anisotropyRatio],
  respond: leakyPartialPenetrationRespond,
  guess: (readings) =>
    shapeStarts(leakyPartialPenetrationRespond, readings, (distance) =>
      RATIOS.map(({ leakage, anisotropy }) => [distance / leakage, anisotropy]),
    ),
  validity: [
    ...leaky.validity,
    ...partialPenetration.validity.filter(({ code }) => leaky.validity.every((rule) => rule.code !== code)),
  ],
  judge: ([T = NaN, S = NaN, B = NaN, anisotropy = NaN], readings) => {
    const leakage = leaky.judge([T, S, B], readings)
    const penetration = partialPenetration.judge([T, S, anisotropy], readings)
    return [...leakage, ...penetration.filter(({ code }) => leakage.every((finding) => finding.code !== code))]
  },
}
