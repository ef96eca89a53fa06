import { leakyW, leakyWellFunction } from '#shared/numerics/leaky-well-function.ts'
import { exponentialIntegral } from '#shared/numerics/exponential-integral.ts'
import type { Finding } from '../analysis.ts'
import { storativity, transmissivity, type Unknown } from '../method.ts'
import type { ResponsePlace } from '../place.ts'
import { theisU } from '../small-u.ts'
import type { Solution, SolutionReadings } from '../solution.ts'
import type { Respond } from '../superposition.ts'
import { theis } from '../theis.ts'
import { radiusOf } from '../wells.ts'
import { shapeStarts } from './shape-starts.ts'

/** Leakage that changes the last drawdown by less than this share looks like a drift of the rate or of the level. */
const LEAST_SHARE = 0.05
/** r²/(4uB²) above which drawdown is within about 1 % of its steady value Q·K0(r/B)/(2πT). */
const STEADY_V = 3
/** r/B of the starts. */
const RATIOS = [0.01, 0.05, 0.2, 0.5, 1, 2]

/** B = √(T·b'/K'), thickness b' and conductivity K' of the aquitard. */
export const leakageFactor: Unknown = {
  id: 'B',
  label: 'Leakage factor',
  dimension: 'length',
  low: 1e-1,
  high: 1e6,
  scale: 'log',
}

/** Drawdown s = Q·W(u, r/B)/(4πT) in an aquifer fed through an aquitard without storage. Source: Hantush & Jacob 1955. */
export function leakyDrawdown(
  rate_m3_s: number,
  [T, S, B]: readonly [T: number, S: number, B: number],
  distance_m: number,
  time_s: number,
): number {
  return (rate_m3_s / (4 * Math.PI * T)) * leakyW(theisU(T, S, distance_m, time_s), distance_m / B)
}

/** Leakance K'/b' of the aquitard in 1/s. */
export const leakanceOf = (T: number, B: number) => T / (B * B)

/** Unit-rate response with derivatives by ln T, ln S and ln B. */
export function leakyRespond(
  parameters: ArrayLike<number>,
  { distance_m }: Pick<ResponsePlace, 'distance_m'>,
): Respond {
  const [T, S, B] = [parameters[0] as number, parameters[1] as number, parameters[2] as number]
  const factor = 1 / (4 * Math.PI * T)
  const evaluate = leakyWellFunction(distance_m / B)
  const values = new Float64Array(3)
  return (time_s, out) => {
    evaluate(theisU(T, S, distance_m, time_s), values)
    const [W, byU] = [values[0] as number, values[1] as number]
    out[0] = factor * W
    out[1] = factor * (-W - byU)
    out[2] = factor * byU
    out[3] = -factor * (values[2] as number)
  }
}

const guess = (readings: SolutionReadings) =>
  shapeStarts(leakyRespond, readings, (distance) => RATIOS.map((ratio) => [distance / ratio]))

const judge = (parameters: number[], readings: SolutionReadings): Finding[] => [
  ...theis.judge(parameters, readings),
  ...judgeLeakage(parameters, readings),
]

/** What the readings can tell of leakage: nothing, its beginning, or the steady state. */
function judgeLeakage([T = NaN, S = NaN, B = NaN]: number[], { wells }: SolutionReadings): Finding[] {
  const ends = wells
    .filter(({ time_s }) => time_s.length > 0)
    .map(({ series, time_s }) => {
      const rho = radiusOf(series) / B
      const u = theisU(T, S, radiusOf(series), time_s.at(-1) as number)
      return { rho, share: 1 - leakyW(u, rho) / exponentialIntegral(u), v: (rho * rho) / (4 * u) }
    })
  const [ratio, share] = [Math.max(...ends.map((end) => end.rho)), Math.max(...ends.map((end) => end.share))]
  if (!(share >= LEAST_SHARE)) {
    return [{ code: 'leakage-not-shown', severity: 'caution', params: { ratio, share, limit: LEAST_SHARE } }]
  }
  const steady: Finding = { code: 'leakage-steady', severity: 'good', params: {} }
  return [
    { code: 'leakance', severity: 'good', params: { ratio, share, leakance_per_s: leakanceOf(T, B) } },
    ...(ends.some(({ v }) => v >= STEADY_V) ? [steady] : []),
  ]
}

export const leaky: Solution = {
  id: 'leaky',
  label: 'Leaky aquifer curve (Hantush–Jacob)',
  version: 1,
  source: 'Hantush & Jacob 1955; ASTM D6029',
  aquifers: ['leaky'],
  shift: { storages: ['S'] },
  unknowns: [transmissivity, storativity, leakageFactor],
  respond: leakyRespond,
  guess,
  validity: [
    ...theis.validity,
    {
      code: 'leakage-not-shown',
      statement: 'Leakage changes the last drawdown by 5 % or more, which no drift of rate or level would',
      source: 'common practice',
    },
  ],
  judge,
}
