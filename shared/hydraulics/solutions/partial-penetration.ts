import { exponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import type { Finding } from '../analysis.ts'
import { storativity, transmissivity, type Unknown } from '../method.ts'
import { penetrationCorrection } from '../penetration.ts'
import { placeOf, type ResponsePlace } from '../place.ts'
import { theisU } from '../small-u.ts'
import type { Solution, SolutionReadings } from '../solution.ts'
import type { Respond } from '../superposition.ts'
import { theis } from '../theis.ts'
import { radiusOf } from '../wells.ts'
import { shapeStarts } from './shape-starts.ts'

/** Kz/Kr of the starts where it is fitted. */
const RATIOS = [0.01, 0.1, 1]
/** Partial penetration that changes no drawdown by more than this share tells nothing of Kz/Kr. */
const LEAST_SHARE = 0.02

/** Kz/Kr; bounds reach beyond what layered ground shows. */
export const anisotropyRatio: Unknown = {
  id: 'Kz_Kr',
  label: 'Vertical over horizontal conductivity',
  dimension: 'dimensionless',
  low: 1e-4,
  high: 1e2,
  scale: 'log',
}

/** Unit-rate response of a well open to a part of a confined aquifer; derivatives by ln T, ln S and ln(Kz/Kr). */
export function partialPenetrationRespond(parameters: ArrayLike<number>, place: ResponsePlace): Respond {
  const [T, S] = [parameters[0] as number, parameters[1] as number]
  const factor = 1 / (4 * Math.PI * T)
  const correct = penetrationCorrection(place, parameters[2] ?? 1)
  const added = new Float64Array(4)
  return (time_s, out) => {
    const u = theisU(T, S, place.distance_m, time_s)
    correct(u, added)
    const W = exponentialIntegral(u) + (added[0] as number)
    const byU = (added[1] as number) - Math.exp(-u)
    out[0] = factor * W
    out[1] = factor * (-W - byU)
    out[2] = factor * byU
    if (out.length > 3) out[3] = factor * (added[2] as number)
  }
}

/** Drawdown Q·(W(u) + added term)/(4πT) at a place. Source: Hantush 1961. @throws AnalysisError, see penetrationCorrection */
export function partialPenetrationDrawdown(
  rate_m3_s: number,
  [T, S, anisotropy]: readonly [T: number, S: number, anisotropy: number],
  place: ResponsePlace,
  time_s: number,
): number {
  const out = new Float64Array(3)
  partialPenetrationRespond([T, S, anisotropy], place)(time_s, out)
  return rate_m3_s * (out[0] as number)
}

const judge = (parameters: number[], readings: SolutionReadings): Finding[] => [
  ...theis.judge(parameters, readings),
  judgePenetration(parameters, readings),
]

/** Largest share that partial penetration takes of, or adds to, the last drawdown of a well. */
function judgePenetration([T = NaN, S = NaN, anisotropy = 1]: number[], { inputs, wells }: SolutionReadings): Finding {
  const added = new Float64Array(4)
  const shares = wells
    .filter(({ time_s }) => time_s.length > 0)
    .map(({ series, time_s }) => {
      const u = theisU(T, S, radiusOf(series), time_s.at(-1) as number)
      penetrationCorrection(placeOf(series, inputs), anisotropy)(u, added)
      return Math.abs((added[0] as number) / exponentialIntegral(u))
    })
  const params = { share: Math.max(...shares), limit: LEAST_SHARE, anisotropy }
  return params.share >= LEAST_SHARE
    ? { code: 'penetration-matters', severity: 'good', params }
    : { code: 'penetration-not-shown', severity: 'note', params }
}

const shared = {
  version: 1,
  source: 'Hantush 1961',
  aquifers: ['confined'],
  known: ['thickness', 'short-screen'],
  shift: { storages: ['S'] },
  respond: partialPenetrationRespond,
  validity: [
    ...theis.validity,
    {
      code: 'penetration-not-shown',
      statement:
        'A well is nearer than about 1.5·b·√(Kr/Kz), where partial penetration changes the drawdown by 2 % or more',
      source: 'Hantush 1961',
    },
  ],
  judge,
} as const

/** Kz/Kr fitted: needs a well near enough, best two at unlike depths. */
export const partialPenetration: Solution = {
  ...shared,
  id: 'partial-penetration',
  label: 'Partially penetrating wells, confined, anisotropy fitted (Hantush)',
  unknowns: [transmissivity, storativity, anisotropyRatio],
  guess: (readings) => shapeStarts(partialPenetrationRespond, readings, () => RATIOS.map((ratio) => [ratio])),
}

/** Kz = Kr. */
export const partialPenetrationIsotropic: Solution = {
  ...shared,
  id: 'partial-penetration-isotropic',
  label: 'Partially penetrating wells, confined, isotropic (Hantush)',
  unknowns: [transmissivity, storativity],
  guess: (readings) => shapeStarts(partialPenetrationRespond, readings, () => [[]]),
}
